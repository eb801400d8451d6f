import { useId, type ReactNode } from 'react';
import { classNames } from '#app/lib/class-names.ts';

export interface FieldProps {
  label: string;
  /** stands inside the field after the value */
  unit?: string;
  /** one line under the field; gives way to the error */
  hint?: ReactNode;
  /** what is wrong and how to mend it */
  error?: string;
  className?: string;
}

/** What the input inside a field must carry. */
export interface FieldWiring {
  id: string;
  'aria-invalid': true | undefined;
  'aria-describedby': string | undefined;
}

export const fieldInput =
  'min-w-0 flex-1 border-0 bg-transparent px-2.5 outline-none h-9 touch:h-11 touch:text-lead disabled:text-ink-3 disabled:cursor-not-allowed';

/** Label above, value on a line of ink, hint or error below. */
export function Field({
  label,
  unit,
  hint,
  error,
  className,
  children,
}: FieldProps & { children: (wiring: FieldWiring) => ReactNode }) {
  const id = useId();
  const hasNote = error !== undefined || hint !== undefined;
  return (
    <div className={className}>
      <label htmlFor={id} className="block text-[13px] font-semibold has-[+*_:disabled]:text-ink-3">
        {label}
      </label>
      <div
        className={classNames(
          'mt-[3px] flex items-center border-b-[1.5px] bg-sheet',
          'has-disabled:border-dashed has-disabled:border-rule has-disabled:bg-transparent',
          'has-focus-visible:outline-[2.5px] has-focus-visible:outline-offset-2 has-focus-visible:outline-focus',
          error === undefined ? 'border-ink' : 'border-b-[3px] border-danger',
        )}
      >
        {children({
          id,
          'aria-invalid': error === undefined ? undefined : true,
          'aria-describedby': hasNote ? `${id}-note` : undefined,
        })}
        {unit !== undefined && <span className="px-2.5 text-[13px] text-ink-2">{unit}</span>}
      </div>
      {hasNote && (
        <p
          id={`${id}-note`}
          className={classNames('mt-1 text-note', error === undefined ? 'text-ink-2' : 'text-danger')}
        >
          {error ?? hint}
        </p>
      )}
    </div>
  );
}
