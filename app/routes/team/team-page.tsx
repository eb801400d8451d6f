import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { NotFound } from '#app/components/message-page.tsx';
import { sessionQuery } from '#app/features/session/session.ts';
import { InviteSection } from '#app/features/team/invite-section.tsx';
import { MemberSection } from '#app/features/team/member-section.tsx';
import { OutboxSection } from '#app/features/team/outbox-section.tsx';
import { PageTop, PaperPage } from '../shell/paper-page.tsx';

export function Page() {
  const { teamId = '' } = useParams();
  const session = useQuery(sessionQuery).data;
  const membership = session?.memberships.find((entry) => entry.teamId === teamId);
  if (!session?.person || !membership) return <NotFound top={<PageTop />} what="team" />;
  const admin = membership.role === 'admin';
  return (
    <PaperPage
      title={membership.teamName}
      lead={
        admin
          ? 'Who works on the team’s sites, and what each may do.'
          : `You are ${membership.role} here. Admins of the team change members and roles.`
      }
      aside={<RoleNotes />}
    >
      <MemberSection teamId={teamId} me={session.person.id} admin={admin} />
      {admin && <InviteSection teamId={teamId} />}
      {admin && <OutboxSection teamId={teamId} />}
    </PaperPage>
  );
}

/** What the roles stand for, beside the table that sets them. */
function RoleNotes() {
  return (
    <dl className="grid gap-2.5 lg:border-t lg:border-ink lg:pt-3">
      {[
        ['modeller', 'brings rasters, sets classes, plant and outlook, draws options, runs'],
        ['manager', 'draws options and runs them; leaves rasters and rates alone'],
        ['trainer', 'opens sites and replays runs; changes nothing'],
        ['admin', 'everything in the team, and its members'],
      ].map(([role, words]) => (
        <div key={role}>
          <dt className="font-semibold text-ink">{role}</dt>
          <dd>{words}</dd>
        </div>
      ))}
    </dl>
  );
}
