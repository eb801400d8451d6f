import { Table } from '#app/components/table.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { classNames } from '#app/lib/class-names.ts';
import { formatDateTime } from '#app/lib/formats.ts';
import type { AccessToken } from '#contract/access-tokens.ts';
import { hasEnded, tokenEndWords, tokenMay } from './token-words.ts';

/** My tokens, those that have ended paler and without a way to revoke them. */
export function TokenTable(props: {
  tokens: readonly AccessToken[];
  onRevoke: (token: AccessToken) => void;
}) {
  const now = new Date();
  const pale = (token: AccessToken) => (hasEnded(token, now) ? 'text-ink-2' : undefined);
  return (
    <Table
      caption="Your access tokens"
      columns={[
        {
          key: 'name',
          head: 'Token',
          cell: (token) => (
            <div className={pale(token)}>
              <b className="font-semibold [overflow-wrap:anywhere]">{token.name}</b>
              <span className="block text-axis text-ink-2">
                <span className="font-mono">{token.start}…</span> {tokenMay(token)};{' '}
                <span className="whitespace-nowrap">{tokenEndWords(token, now)}</span>
              </span>
            </div>
          ),
        },
        {
          key: 'used',
          head: 'Last used',
          cell: (token) => (
            <span className={classNames('whitespace-nowrap', pale(token))}>
              {token.lastUsedAt ? formatDateTime(token.lastUsedAt) : 'never'}
            </span>
          ),
        },
        {
          key: 'deeds',
          head: <span className="sr-only">What can be done</span>,
          number: true,
          cell: (token) =>
            !hasEnded(token, now) && (
              <WordButton lined aria-label={`Revoke ${token.name}`} onClick={() => props.onRevoke(token)}>
                Revoke
              </WordButton>
            ),
        },
      ]}
      rows={props.tokens}
      rowKey={({ id }) => id}
    />
  );
}
