import { useQuery } from '@tanstack/react-query';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Section } from '#app/components/paper-layout.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatCounted } from '#app/lib/formats.ts';
import { MemberTable } from './member-table.tsx';
import { membersQuery } from './members.ts';

/** The members of a team; an admin changes them here. */
export function MemberSection(props: { teamId: string; me: string; admin: boolean }) {
  const members = useQuery(membersQuery(props.teamId));
  return (
    <Section title="Members" note={members.data && formatCounted(members.data.length, 'member')}>
      {members.isPending && <LoadingLines label="Fetching the members" />}
      {members.isError && (
        <ProblemNotice error={members.error} title="The members did not come.">
          <WordButton lined onClick={() => void members.refetch()}>
            Try again
          </WordButton>
        </ProblemNotice>
      )}
      {members.isSuccess && <MemberTable {...props} members={members.data} />}
    </Section>
  );
}
