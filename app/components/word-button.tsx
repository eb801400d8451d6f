import type { AnchorHTMLAttributes, ButtonHTMLAttributes, ReactNode, Ref } from 'react';
import { Link } from 'react-router-dom';
import { classNames } from '#app/lib/class-names.ts';

const word =
  'inline-flex min-h-7 touch:min-h-11 items-center gap-1.5 border-b-2 px-0.5 text-[13.5px] whitespace-nowrap ' +
  'no-underline transition-colors duration-150 disabled:text-ink-3 disabled:cursor-not-allowed disabled:border-transparent';
const rest = 'border-transparent enabled:hover:border-rule';
const plain = 'border-transparent hover:border-rule';
const lined = 'border-rule hover:border-ink';
const on = 'border-ink font-bold';

export interface WordButtonProps extends Omit<ButtonHTMLAttributes<HTMLButtonElement>, 'type'> {
  /** for modes and tools: whether this is the one in use; leave out for a plain action */
  pressed?: boolean;
  /** stands alone among text, so it needs a line to be seen as something to press */
  lined?: boolean;
  busy?: boolean;
  ref?: Ref<HTMLButtonElement>;
}

/** An action, mode or tool that is just a word. */
export function WordButton({
  pressed,
  lined: isLined = false,
  busy = false,
  className,
  onClick,
  ...props
}: WordButtonProps) {
  return (
    <button
      type="button"
      aria-pressed={pressed}
      aria-disabled={busy || undefined}
      aria-busy={busy || undefined}
      onClick={(event) => {
        if (!busy) onClick?.(event);
      }}
      className={classNames(word, pressed ? on : isLined ? lined : rest, busy && 'busy-ticks', className)}
      {...props}
    />
  );
}

/** A word that leads to a page of ours; `plain` among other words that need no line either. */
export function WordLink(props: { to: string; plain?: boolean; className?: string; children: ReactNode }) {
  return (
    <Link to={props.to} className={classNames(word, props.plain ? plain : lined, props.className)}>
      {props.children}
    </Link>
  );
}

/** A word that downloads or leaves: a plain link. */
export function WordAnchor({ className, ...props }: AnchorHTMLAttributes<HTMLAnchorElement>) {
  return <a className={classNames(word, lined, className)} {...props} />;
}
