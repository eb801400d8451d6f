import type { Role } from '#contract/people.ts';
import { Table } from '#app/components/table.tsx';
import { WordButton } from '#app/components/word-button.tsx';

interface Account {
  role: Role;
  email: string;
  password: string;
}

/** The invented accounts, while the demo is on: one press fills the form. */
export function DemoAccounts(props: {
  accounts: readonly Account[];
  filledIn: string;
  onFillIn: (account: Account) => void;
}) {
  const passwords = new Set(props.accounts.map((account) => account.password));
  const shared = passwords.size === 1 ? props.accounts[0].password : undefined;
  return (
    <section className="mt-8" aria-label="Demo accounts">
      <p className="text-note font-semibold text-ink-2">
        Demo accounts, invented.
        {shared !== undefined && (
          <>
            {' '}
            Password <span className="font-mono">{shared}</span>
          </>
        )}
      </p>
      <Table
        caption="Demo accounts"
        headless
        columns={[
          { key: 'role', head: 'Role', cell: ({ role }) => <b className="font-semibold">{role}</b> },
          {
            key: 'email',
            head: 'E-mail',
            cell: ({ email }) => <span className="font-mono text-note break-all">{email}</span>,
          },
          {
            key: 'fill',
            head: 'Fill in',
            number: true,
            cell: (account) => (
              <WordButton
                lined
                pressed={props.filledIn === account.email}
                aria-label={`Fill in the ${account.role}’s account`}
                onClick={() => props.onFillIn(account)}
              >
                {props.filledIn === account.email ? 'filled in' : 'fill in'}
              </WordButton>
            ),
          },
        ]}
        rows={props.accounts}
        rowKey={(account) => account.email}
      />
    </section>
  );
}
