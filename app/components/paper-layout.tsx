import type { ReactNode } from 'react';
import { SkipLink } from './site-layout.tsx';

/** An ordinary page: words and tables on the ground, with room at the side for notes. */
export function PaperLayout(props: {
  /** the TopBar; pages for people who are not signed in give none */
  top?: ReactNode;
  title: string;
  /** one line under the title */
  lead?: ReactNode;
  /** stands beside the title */
  action?: ReactNode;
  children: ReactNode;
  /** notes in the margin */
  aside?: ReactNode;
  /** one short form and nothing else */
  narrow?: boolean;
}) {
  return (
    <div className="flex min-h-dvh flex-col">
      <SkipLink />
      {props.top}
      <main
        id="main"
        tabIndex={-1}
        className={`mx-auto w-full flex-1 px-4 pt-8 pb-16 lg:px-6 ${props.narrow ? 'max-w-[520px]' : 'max-w-[1180px]'}`}
      >
        <div className="mb-6 flex flex-wrap items-end justify-between gap-x-6 gap-y-3">
          <div>
            <h1 className="text-figure font-heavy tracking-tight">{props.title}</h1>
            {props.lead !== undefined && (
              <p className="mt-1 max-w-[62ch] text-lead text-ink-2">{props.lead}</p>
            )}
          </div>
          {props.action}
        </div>
        {props.aside === undefined ? (
          props.children
        ) : (
          <div className="grid gap-x-14 gap-y-10 lg:grid-cols-[minmax(0,1fr)_280px]">
            <div className="min-w-0">{props.children}</div>
            <aside className="text-note text-ink-2">{props.aside}</aside>
          </div>
        )}
      </main>
    </div>
  );
}

/** A part of a page under its own heading, parted by a rule. */
export function Section(props: { title: string; note?: ReactNode; action?: ReactNode; children: ReactNode }) {
  return (
    <section className="border-t border-ink pt-3 pb-9">
      <div className="mb-2 flex flex-wrap items-baseline justify-between gap-x-6">
        <h2 className="text-lead">{props.title}</h2>
        {props.note !== undefined && <p className="text-note text-ink-2">{props.note}</p>}
        {props.action}
      </div>
      {props.children}
    </section>
  );
}
