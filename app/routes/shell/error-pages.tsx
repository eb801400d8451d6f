import { useRouteError } from 'react-router-dom';
import { Button } from '#app/components/button.tsx';
import { MessagePage, NotFound } from '#app/components/message-page.tsx';
import { WordLink } from '#app/components/word-button.tsx';
import { ProblemError } from '#app/lib/api-client.ts';
import { useDocumentTitle } from '#app/lib/use-document-title.ts';

export function NotFoundPage() {
  useDocumentTitle('Not found');
  return <NotFound />;
}

/** What shows when a page fails: its own words for what the server refused, plain ones for a fault of ours. */
export function RouteErrorPage() {
  const error = useRouteError();
  useDocumentTitle('Something went wrong');
  if (error instanceof ProblemError && error.status === 404) return <NotFound />;
  return (
    <MessagePage
      title="This page could not be shown"
      actions={
        <>
          <Button onClick={() => window.location.reload()}>Load it again</Button>
          <WordLink to="/">To the first page</WordLink>
        </>
      }
    >
      {error instanceof ProblemError
        ? error.message
        : 'Something went wrong on this page. What was saved is safe; what was being typed may be lost.'}
    </MessagePage>
  );
}
