import type { ReactNode } from 'react';
import { PaperLayout } from './paper-layout.tsx';
import { WordLink } from './word-button.tsx';

/** A page that only says something and offers a way on. */
export function MessagePage(props: {
  top?: ReactNode;
  title: string;
  children: ReactNode;
  actions?: ReactNode;
}) {
  return (
    <PaperLayout top={props.top} title={props.title}>
      <div className="max-w-[62ch] border-t border-ink pt-4 text-lead">{props.children}</div>
      <div className="mt-5 flex flex-wrap items-center gap-4">
        {props.actions ?? <WordLink to="/">To the first page</WordLink>}
      </div>
    </PaperLayout>
  );
}

/** What is not there, or belongs to another team: both look the same. */
export function NotFound(props: { top?: ReactNode; what?: string }) {
  return (
    <MessagePage top={props.top} title={`There is no such ${props.what ?? 'page'}`}>
      The address may be mistyped, the {props.what ?? 'page'} may have been deleted, or it belongs to a team
      that you are not a member of.
    </MessagePage>
  );
}
