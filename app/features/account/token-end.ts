import { longestTokenDays } from '#contract/access-tokens.ts';

/** How long a token may be wanted for. */
export const tokenEnds = [
  { key: '30', label: 'after 30 days' },
  { key: '90', label: 'after 90 days' },
  { key: '365', label: 'after a year' },
  { key: 'date', label: 'on a date' },
] as const;
export type TokenEnd = (typeof tokenEnds)[number]['key'];

const dayMs = 86_400_000;

/** `2027-03-01`, where the person is. */
export function dayOf(time: Date): string {
  const two = (n: number) => String(n).padStart(2, '0');
  return `${time.getFullYear()}-${two(time.getMonth() + 1)}-${two(time.getDate())}`;
}

/** The first and the last day that a token may end on. */
export const endDays = (now: Date): { first: string; last: string } => ({
  first: dayOf(now),
  last: dayOf(new Date(now.getTime() + (longestTokenDays - 1) * dayMs)),
});

/**
 * When a token ends: so many days from now, or with the end of a day where the person is.
 * @returns undefined where the day is missing, over, or too far off
 */
export function endOf(end: TokenEnd, day: string, now: Date): string | undefined {
  if (end !== 'date') return new Date(now.getTime() + Number(end) * dayMs).toISOString();
  const { first, last } = endDays(now);
  if (!/^\d{4}-\d{2}-\d{2}$/.test(day) || day < first || day > last) return undefined;
  return new Date(`${day}T23:59:59.999`).toISOString();
}
