import type { InputHTMLAttributes, Ref, SelectHTMLAttributes } from 'react';
import { classNames } from '#app/lib/class-names.ts';

const blank =
  'inline-block h-6 touch:h-11 rounded-none border-0 border-b-[1.5px] border-ink bg-transparent px-1 pb-0.5 text-center ' +
  'font-mono text-[13.5px] font-semibold hover:bg-sheet disabled:border-dashed disabled:border-rule disabled:text-ink-3 ' +
  'aria-invalid:border-b-[3px] aria-invalid:border-danger aria-invalid:text-danger';

interface Labelled {
  /** what the blank stands for: read out, since the sentence around it is not its label */
  label: string;
  /** what is wrong; it also shows as a tooltip, and the page says it in full beside the sentence */
  error?: string;
}

export interface BlankProps extends Labelled, InputHTMLAttributes<HTMLInputElement> {
  /** width in characters; follows the value when left out */
  characters?: number;
  ref?: Ref<HTMLInputElement>;
}

/** A setting as a blank in a sentence: `Scatter [40] mounds at least [28] m apart`. */
export function Blank({ label, error, characters, className, style, ...input }: BlankProps) {
  const shown = input.value ?? input.defaultValue;
  const text = typeof shown === 'string' || typeof shown === 'number' ? String(shown) : '';
  const length = characters ?? Math.max(2, text.length);
  return (
    <input
      aria-label={label}
      aria-invalid={error !== undefined || undefined}
      title={error}
      autoComplete="off"
      className={classNames(blank, className)}
      style={{ width: `calc(${length}ch + 14px)`, ...style }}
      {...input}
    />
  );
}

export interface BlankSelectProps extends Labelled, SelectHTMLAttributes<HTMLSelectElement> {
  ref?: Ref<HTMLSelectElement>;
}

/** A blank that takes one of a few. */
export function BlankSelect({ label, error, className, ...select }: BlankSelectProps) {
  return (
    <select
      aria-label={label}
      aria-invalid={error !== undefined || undefined}
      title={error}
      className={classNames(blank, 'field-sizing-content font-sans', className)}
      {...select}
    />
  );
}
