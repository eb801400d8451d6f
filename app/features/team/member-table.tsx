import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { BlankSelect } from '#app/components/blank.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Table, type Column } from '#app/components/table.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { roles, type Member, type Role } from '#contract/people.ts';
import { formatDate } from '#app/lib/formats.ts';
import { changeRoleMutation, endMemberSessionsMutation, removeMemberMutation } from './members.ts';

type Deed = { kind: 'remove' | 'sign-out'; member: Member };

export function MemberTable(props: {
  teamId: string;
  me: string;
  admin: boolean;
  members: readonly Member[];
}) {
  const queryClient = useQueryClient();
  const change = useMutation(changeRoleMutation(queryClient, props.teamId));
  const [deed, setDeed] = useState<Deed>();

  const changeRole = (member: Member, role: Role) =>
    change.mutate(
      { personId: member.personId, role },
      { onSuccess: () => sayDone(`${member.name} is ${role} now`) },
    );
  const columns: Column<Member>[] = [
    {
      key: 'name',
      head: 'Name',
      cell: (member) => (
        <>
          <b className="font-semibold">{member.name}</b>
          {member.personId === props.me && <span className="text-ink-2">, you</span>}
          <span className="block font-mono text-note break-all text-ink-2">{member.email}</span>
        </>
      ),
    },
    {
      key: 'role',
      head: 'Role',
      cell: (member) =>
        props.admin ? (
          <BlankSelect
            label={`Role of ${member.name}`}
            value={
              change.isPending && change.variables.personId === member.personId
                ? change.variables.role
                : member.role
            }
            disabled={change.isPending}
            onChange={(event) => changeRole(member, event.target.value as Role)}
          >
            {roles.map((role) => (
              <option key={role}>{role}</option>
            ))}
          </BlankSelect>
        ) : (
          member.role
        ),
    },
    { key: 'joined', head: 'Joined', wide: true, cell: (member) => formatDate(member.joinedAt) },
    { key: 'sessions', head: 'Signed in', number: true, wide: true, cell: (member) => openSessions(member) },
  ];
  if (props.admin) {
    columns.push({
      key: 'deeds',
      head: <span className="sr-only">What can be done</span>,
      number: true,
      cell: (member) => (
        <span className="inline-flex flex-wrap justify-end gap-x-4">
          <WordButton
            lined
            disabled={member.openSessions === 0}
            aria-label={`Sign ${member.name} out everywhere`}
            onClick={() => setDeed({ kind: 'sign-out', member })}
          >
            Sign out
          </WordButton>
          <WordButton
            lined
            aria-label={`Remove ${member.name}`}
            onClick={() => setDeed({ kind: 'remove', member })}
          >
            Remove
          </WordButton>
        </span>
      ),
    });
  }
  return (
    <>
      {change.isError && (
        <ProblemNotice error={change.error} title="The role stays as it was." className="mb-3" />
      )}
      <Table
        caption="Members of the team"
        columns={columns}
        rows={props.members}
        rowKey={(member) => member.personId}
      />
      {deed && (
        <DeedDialog
          key={deed.member.personId}
          teamId={props.teamId}
          deed={deed}
          onClose={() => setDeed(undefined)}
        />
      )}
    </>
  );
}

function openSessions({ openSessions: n }: Member): string {
  if (n === 0) return 'nowhere';
  return n === 1 ? 'in 1 place' : `in ${n} places`;
}

/** Asks before a member is removed or signed out. */
function DeedDialog(props: { teamId: string; deed: Deed; onClose: () => void }) {
  const queryClient = useQueryClient();
  const remove = useMutation(removeMemberMutation(queryClient, props.teamId));
  const signOut = useMutation(endMemberSessionsMutation(queryClient, props.teamId));
  const { kind, member } = props.deed;
  const removing = kind === 'remove';
  const deed = removing ? remove : signOut;
  return (
    <ConfirmDialog
      open
      onOpenChange={(open) => !open && props.onClose()}
      title={removing ? `Remove ${member.name} from the team?` : `Sign ${member.name} out everywhere?`}
      description={
        removing
          ? 'They lose sight of the team’s sites at once. What they made stays, with their name on it.'
          : 'Every browser where they are signed in asks for their password again, and their access tokens stop working. What they are typing there is lost.'
      }
      action={removing ? 'Remove' : 'Sign out everywhere'}
      keep={removing ? 'Keep them' : 'Leave them signed in'}
      busy={deed.isPending}
      error={deed.error}
      onConfirm={() =>
        deed.mutate(member.personId, {
          onSuccess: () => {
            sayDone(removing ? `${member.name} is out of the team` : `${member.name} is signed out`);
            props.onClose();
          },
        })
      }
    />
  );
}
