import { useQuery } from '@tanstack/react-query';
import { Navigate, Outlet, useLocation } from 'react-router-dom';
import { Button } from '#app/components/button.tsx';
import { MessagePage } from '#app/components/message-page.tsx';
import { errorText } from '#app/lib/api-client.ts';
import { sessionQuery } from '#app/features/session/session.ts';
import { OpeningPage } from './opening-page.tsx';

/** Guards the pages inside: who is not signed in is sent to the sign-in page, and back here afterwards. */
export function SignedIn() {
  const session = useQuery(sessionQuery);
  const { pathname, search } = useLocation();
  // What was known last stays in use while it is asked again: an outage must not take a page away.
  if (session.data !== undefined) {
    if (session.data.person !== null) return <Outlet />;
    return <Navigate to={signInPath(pathname + search)} replace />;
  }
  if (session.isPending) return <OpeningPage />;
  return (
    <MessagePage
      title="Foothold cannot be reached"
      actions={<Button onClick={() => void session.refetch()}>Try again</Button>}
    >
      {errorText(session.error)}
    </MessagePage>
  );
}

/** The sign-in page that leads on to `to`. */
export function signInPath(to: string): string {
  return to === '/' ? '/sign-in' : `/sign-in?${new URLSearchParams({ to }).toString()}`;
}

/** Where to go after signing in: only ever a page of ours, whatever the address says. */
export function pageAfterSignIn(to: string | null): string {
  return to !== null && /^\/(?![/\\])/.test(to) && !to.startsWith('/sign-in') ? to : '/';
}
