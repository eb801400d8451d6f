import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { classNames } from '#app/lib/class-names.ts';
import { buttonClass, type ButtonKind } from './button.tsx';

/** A link to a page of ours that stands where a button would. */
export function LinkButton(props: {
  to: string;
  kind?: ButtonKind;
  className?: string;
  children: ReactNode;
}) {
  return (
    <Link to={props.to} className={classNames(buttonClass(props.kind ?? 'quiet'), props.className)}>
      {props.children}
    </Link>
  );
}
