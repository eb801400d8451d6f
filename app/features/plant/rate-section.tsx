import type { ReactNode } from 'react';

/** Rates that belong together, under their title. */
export function RateSection(props: { title: string; note: string; children: ReactNode }) {
  return (
    <section aria-label={props.title} className="border-t border-ink pt-2.5 pb-6">
      <div className="mb-1.5 flex flex-wrap items-baseline justify-between gap-x-6">
        <h2 className="text-lead">{props.title}</h2>
        <p className="text-note text-ink-2">{props.note}</p>
      </div>
      {props.children}
    </section>
  );
}
