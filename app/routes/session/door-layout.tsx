import type { ReactNode } from 'react';
import { useDocumentTitle } from '#app/lib/use-document-title.ts';
import { HowItWorks } from './how-it-works.tsx';

/** Pages for people who are not signed in: the product at work on the left, one short form on the right. */
export function DoorLayout(props: {
  title: string;
  children: ReactNode;
  lead?: ReactNode;
  foot?: ReactNode;
}) {
  useDocumentTitle(props.title === 'Foothold' ? 'Sign in' : props.title);
  return (
    <div className="flex min-h-dvh flex-col lg:h-dvh lg:flex-row">
      <main
        id="main"
        tabIndex={-1}
        className="relative flex flex-col border-ink px-4 pt-8 pb-6 lg:order-last lg:w-[460px] lg:shrink-0 lg:overflow-y-auto lg:border-l lg:pt-11 lg:pr-14 lg:pl-11"
      >
        <h1 className="text-answer font-heavy tracking-[-.03em]">{props.title}</h1>
        {props.lead !== undefined && <div className="mt-1.5 text-title text-ink-2">{props.lead}</div>}
        {props.children}
        <p className="mt-auto pt-8 text-note text-ink-2">
          A simulation supports a decision; it is no permit, survey or engineering design. {props.foot}
        </p>
      </main>
      <HowItWorks />
    </div>
  );
}
