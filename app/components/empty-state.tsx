import type { ReactNode } from 'react';

/** Says what is not there yet, what it would take, and offers the first step. */
export function EmptyState(props: { title: string; children?: ReactNode; action?: ReactNode }) {
  return (
    <div className="border-y border-rule py-4">
      <p>
        <b className="text-lead">{props.title}</b> <span className="text-ink-2">{props.children}</span>
      </p>
      {props.action !== undefined && <div className="mt-2.5">{props.action}</div>}
    </div>
  );
}
