import { useId } from 'react';
import { classNames } from '#app/lib/class-names.ts';

/** One of a few, in words: radio buttons whose mark is the line under the word. */
export function WordChoice<Key extends string>(props: {
  label: string;
  options: readonly { key: Key; label: string; disabled?: boolean }[];
  /** undefined: none of them is in use */
  value: Key | undefined;
  onChange: (key: Key) => void;
  /** whether the label shows before the words, or is only read out */
  showLabel?: boolean;
}) {
  const name = useId();
  return (
    <div role="radiogroup" aria-labelledby={`${name}-label`} className="flex flex-wrap items-center gap-x-4">
      <span id={`${name}-label`} className={props.showLabel ? 'text-[13.5px] text-ink-2' : 'sr-only'}>
        {props.label}
      </span>
      {props.options.map((option) => (
        <label
          key={option.key}
          className={classNames(
            'relative inline-flex min-h-7 touch:min-h-11 cursor-pointer items-center border-b-2 px-0.5 text-[13.5px] whitespace-nowrap',
            'has-focus-visible:outline-[2.5px] has-focus-visible:outline-offset-2 has-focus-visible:outline-focus',
            'has-disabled:cursor-not-allowed has-disabled:text-ink-3',
            option.key === props.value ? 'border-ink font-bold' : 'border-transparent hover:border-rule',
          )}
        >
          <input
            type="radio"
            name={name}
            className="absolute inset-0 cursor-inherit opacity-0"
            checked={option.key === props.value}
            disabled={option.disabled}
            onChange={() => props.onChange(option.key)}
          />
          {option.label}
        </label>
      ))}
    </div>
  );
}
