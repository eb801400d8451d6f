import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useNavigate } from 'react-router-dom';
import { Menu, MenuChoice, MenuItem, MenuLabel, MenuLink, MenuRule } from '#app/components/menu.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { sessionQuery } from '#app/features/session/session.ts';
import { signOutMutation } from '#app/features/session/sign-out.ts';
import { errorText } from '#app/lib/api-client.ts';
import { themeOptions } from '#app/lib/theme.ts';
import { useTheme } from '#app/lib/use-theme.ts';

/** Who is signed in, as the door to account, teams, theme and signing out. `note` is the role on the page's team. */
export function PersonMenu(props: { note?: string }) {
  const session = useQuery(sessionQuery).data;
  const { choice, setChoice } = useTheme();
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const leave = useMutation({
    ...signOutMutation(queryClient),
    onSuccess: () => void navigate('/sign-in'),
    onError: (error) => sayDone(`Still signed in: ${errorText(error)}`),
  });
  if (!session?.person) return null;
  return (
    <Menu
      trigger={
        <button
          type="button"
          className="min-h-7 touch:min-h-11 max-w-full text-right text-note leading-tight text-ink-2 hover:text-ink"
        >
          <span className="block truncate text-ink">{session.person.name}</span>
          {props.note !== undefined && <span className="block truncate">{props.note}</span>}
        </button>
      }
    >
      <MenuLabel>{session.person.email}</MenuLabel>
      <MenuLink to="/">Sites</MenuLink>
      {session.memberships.map((membership) => (
        <MenuLink key={membership.teamId} to={`/team/${membership.teamId}`}>
          {membership.teamName}
        </MenuLink>
      ))}
      <MenuLink to="/account">Account</MenuLink>
      <MenuRule />
      <MenuChoice label="Theme on this browser" options={themeOptions} value={choice} onChange={setChoice} />
      <MenuRule />
      <MenuItem onSelect={() => leave.mutate()}>Sign out</MenuItem>
    </Menu>
  );
}
