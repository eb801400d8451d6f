import { useQuery } from '@tanstack/react-query';
import type { ComponentProps } from 'react';
import { useLocation } from 'react-router-dom';
import { PaperLayout } from '#app/components/paper-layout.tsx';
import { TopBar } from '#app/components/top-bar.tsx';
import { sessionQuery } from '#app/features/session/session.ts';
import { useDocumentTitle } from '#app/lib/use-document-title.ts';
import { PersonMenu } from './person-menu.tsx';

/** The head of every page that belongs to no site. */
export function PageTop() {
  const { pathname } = useLocation();
  const memberships = useQuery(sessionQuery).data?.memberships ?? [];
  const links = [
    { to: '/', label: 'Sites' },
    ...memberships.map(({ teamId, teamName }) => ({ to: `/team/${teamId}`, label: teamName })),
  ];
  return (
    <TopBar
      links={links.map((link) => ({ ...link, current: link.to === pathname }))}
      person={<PersonMenu />}
    />
  );
}

/** An ordinary page for somebody who is signed in. */
export function PaperPage(props: Omit<ComponentProps<typeof PaperLayout>, 'top'>) {
  useDocumentTitle(props.title);
  return <PaperLayout top={<PageTop />} {...props} />;
}
