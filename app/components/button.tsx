import type { ButtonHTMLAttributes, Ref } from 'react';
import { classNames } from '#app/lib/class-names.ts';

/** `primary` is coral: the one action of a page that matters now. */
export type ButtonKind = 'primary' | 'quiet' | 'danger';

const base =
  'inline-flex min-h-[34px] touch:min-h-[46px] items-center justify-center gap-2 rounded-edge border-[1.5px] px-3.5 ' +
  'font-semibold whitespace-nowrap no-underline transition-colors duration-150';
const off =
  'disabled:border-dashed disabled:border-rule disabled:bg-transparent disabled:bg-none disabled:text-ink-3 ' +
  'disabled:cursor-not-allowed';
/** The pole of the flag: a stripe of ink along the left edge, drawn as a background so that the border stays whole. */
const pole =
  'border-ink dark:border-flag pl-[18px] text-on-flag bg-flag ' +
  'bg-[linear-gradient(var(--color-on-flag),var(--color-on-flag))] bg-no-repeat bg-[size:3px_100%] ' +
  'enabled:hover:bg-ink enabled:hover:text-sheet ' +
  'enabled:hover:bg-[linear-gradient(var(--color-flag),var(--color-flag))] enabled:hover:bg-[size:6px_100%]';
const kinds: Record<ButtonKind, string> = {
  primary: pole,
  quiet: 'border-ink text-ink enabled:hover:bg-ink enabled:hover:text-sheet',
  danger: 'border-danger text-danger enabled:hover:bg-danger enabled:hover:text-sheet',
};

/** For what must look like a button and is none (a link). */
export function buttonClass(kind: ButtonKind): string {
  return classNames(base, kinds[kind].replaceAll('enabled:hover:', 'hover:'));
}

export interface ButtonProps extends Omit<ButtonHTMLAttributes<HTMLButtonElement>, 'type'> {
  kind?: ButtonKind;
  type?: 'button' | 'submit';
  /** work is under way: the button shows it, says so, and takes no further press */
  busy?: boolean;
  /** what the button says while busy; its own words when left out */
  busyLabel?: string;
  ref?: Ref<HTMLButtonElement>;
}

export function Button({
  kind = 'quiet',
  type = 'button',
  busy = false,
  busyLabel,
  className,
  children,
  onClick,
  ...rest
}: ButtonProps) {
  return (
    <button
      type={type}
      aria-disabled={busy || undefined}
      aria-busy={busy || undefined}
      // A busy button keeps its focus, so it is not disabled: it only takes no press.
      onClick={(event) => {
        if (busy) event.preventDefault();
        else onClick?.(event);
      }}
      className={classNames(base, busy ? busyClass(kind) : kinds[kind], off, className)}
      {...rest}
    >
      {busy ? (busyLabel ?? children) : children}
    </button>
  );
}

function busyClass(kind: ButtonKind): string {
  const colours = {
    primary: 'border-ink dark:border-flag bg-flag text-on-flag pl-[18px]',
    quiet: 'border-ink text-ink',
    danger: 'border-danger text-danger',
  };
  return classNames(colours[kind], 'busy-ticks cursor-progress!');
}
