import { useQuery } from '@tanstack/react-query';
import { Section } from '#app/components/paper-layout.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { WordLink } from '#app/components/word-button.tsx';
import { FoundTeam } from '#app/features/account/found-team.tsx';
import { NameForm } from '#app/features/account/name-form.tsx';
import { PasswordForm } from '#app/features/account/password-form.tsx';
import { SessionSection } from '#app/features/account/session-section.tsx';
import { TokenSection } from '#app/features/account/token-section.tsx';
import { sessionQuery } from '#app/features/session/session.ts';
import { themeOptions } from '#app/lib/theme.ts';
import { useTheme } from '#app/lib/use-theme.ts';
import { PaperPage } from '../shell/paper-page.tsx';

export function Page() {
  const session = useQuery(sessionQuery).data;
  const { choice, setChoice } = useTheme();
  if (!session?.person) return null;
  return (
    <PaperPage title="Account" lead={session.person.email}>
      <div className="grid gap-x-14 lg:grid-cols-2">
        <div>
          <Section title="Name">
            <NameForm name={session.person.name} />
          </Section>
          <Section title="Password">
            <PasswordForm email={session.person.email} />
          </Section>
          <TokenSection memberships={session.memberships} />
        </div>
        <div>
          <SessionSection />
          <Section title="Theme on this browser">
            <WordChoice
              label="Theme on this browser"
              options={themeOptions}
              value={choice}
              onChange={setChoice}
            />
          </Section>
          <Section title="Teams">
            <ul className="mb-4">
              {session.memberships.map(({ teamId, teamName, role }) => (
                <li
                  key={teamId}
                  className="flex items-baseline gap-3 border-t border-rule-2 py-1 first:border-t-0"
                >
                  <WordLink to={`/team/${teamId}`}>{teamName}</WordLink>
                  <span className="text-note text-ink-2">as {role}</span>
                </li>
              ))}
            </ul>
            <FoundTeam />
          </Section>
        </div>
      </div>
    </PaperPage>
  );
}
