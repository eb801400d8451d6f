import type { BriefFacts, BriefFigures, BriefPart, BriefText } from '#contract/brief-content.ts';
import { formatMoney } from '#contract/format-money.ts';
import { formatCounted, formatNumber, formatShare } from '#contract/formats.ts';
import { of100 } from '#sim-core/compare/chance-words.ts';

type Figures = Omit<BriefFacts, 'suggested' | 'annex'>;

/** Fewer futures than this leave a chance open by a fifth and more: 95 % intervals of Wilson are then wider than ± 10 of 100. */
const fewFutures = 100;
/** Warnings that the page has room for; all of them stand in the annex. */
const mostWarnings = 2;

/**
 * The words that follow from the figures of a brief: what people begin with and change as they like.
 * @param warnings what the comparison was warned of, a sentence each
 */
export function suggestedText(facts: Figures, warnings: readonly string[] = []): BriefText {
  const lead = facts.options[facts.lead];
  const part = (name: BriefPart, heading: string, words: readonly string[]) => ({
    part: name,
    heading,
    words: words
      .filter((line) => line !== '')
      .join('\n')
      .slice(0, 3000)
      .trim(),
    shown: true,
  });
  return {
    title: `${facts.siteName}: ${lead.wait ? 'wait' : lead.name}`.slice(0, 160),
    parts: [
      part('question', 'The question', [question(facts)]),
      part('answer', 'The answer', answer(facts)),
      part('maps', 'When the ground closes', [mapWords(facts)]),
      part('cost', 'What it costs', costWords(facts)),
      part('sureness', 'How sure this is', sureness(facts)),
      part('change', 'What would change it', changes(facts, warnings)),
      part('decision', 'Decision', []),
      part('cautions', 'Cautions', []),
    ],
  };
}

const horizon = ({ surveyYear, years }: Figures) => surveyYear + years;
const named = ({ name, wait }: Figures['options'][number]) => (wait ? 'waiting' : `“${name}”`);
const capital = (words: string) => words.replace(/^\p{Ll}/u, (letter) => letter.toUpperCase());
const inBrackets = ({ low, high }: { low: number; high: number }) => `(${of100(low)} to ${of100(high)})`;
const years = (count: number) => formatCounted(Number(count.toFixed(1)), 'year');
const range = ({ low, high }: { low: number; high: number }) =>
  `${formatNumber(low, 1)} to ${formatNumber(high, 1)}`;
const waitOf = ({ options }: Figures) => options.findIndex(({ wait }) => wait);

function question(facts: Figures): string {
  const count = formatCounted(facts.options.length, 'option');
  return `Which of ${count} closes the ground at ${facts.siteName} before the next drought, and at what cost? Closed means that the plant covers ${formatShare(facts.target)} of what the ground can carry; a drought is a year with an index of ${formatNumber(facts.droughtThreshold)} or below.`;
}

function answer(facts: Figures): string[] {
  const [first] = facts.outlooks;
  const mine = first.options[facts.lead];
  const lead = facts.options[facts.lead];
  const wait = waitOf(facts);
  const sentences = [
    `In ${of100(mine.chance.estimate)} of 100 futures ${named(lead)} closes the ground before the next drought ${inBrackets(mine.chance)}.`,
  ];
  if (!lead.wait && wait >= 0) {
    const { chance } = first.options[wait];
    sentences.push(`Waiting does so in ${of100(chance.estimate)} ${inBrackets(chance)}.`);
  }
  if (mine.sooner)
    sentences.push(
      mine.sooner.low > 0
        ? `On the same luck it closes ${years(mine.sooner.estimate)} sooner than waiting (${range(mine.sooner)}).`
        : mine.sooner.high < 0
          ? `On the same luck it closes ${years(-mine.sooner.estimate)} later than waiting (${range({ low: -mine.sooner.high, high: -mine.sooner.low })}).`
          : 'On the same luck it closes neither clearly sooner nor clearly later than waiting.',
    );
  return [sentences.join(' ')];
}

function mapWords(facts: Figures): string {
  const futures = Math.max(0, ...facts.options.map(({ mapFutures }) => mapFutures ?? 0));
  if (futures === 0) return 'No maps are stored with this comparison.';
  const under = facts.outlooks.length > 1 ? ` under “${facts.outlooks[0].name}”` : '';
  return `The year in which each place closes: the median of ${formatCounted(futures, 'future')}${under}. Hatched ground is still open by ${horizon(facts)} in more than half of them.`;
}

function costWords(facts: Figures): string[] {
  const { currency, options, outlooks, lead } = facts;
  const mine = options[lead];
  if (currency === null || mine.cost === null)
    return ['No unit costs were set when the options were compared, so nothing is said of their price.'];
  const price = `${capital(named(mine))} costs ${formatMoney(mine.cost, currency)} to ${horizon(facts)}.`;
  const wait = waitOf(facts);
  if (mine.wait || wait < 0) return [price];
  const [figures] = outlooks;
  const gained = (figures.options[lead].covered - figures.options[wait].covered) / 10_000;
  const extra = mine.cost - (options[wait].cost ?? 0);
  const perHectare =
    gained > 0
      ? `By ${horizon(facts)} it covers ${formatNumber(gained, 2)} ha more than waiting on average: ${formatMoney(extra / gained, currency)} for each of these hectares.`
      : `By ${horizon(facts)} it covers no more ground than waiting on average.`;
  return [`${price} ${perHectare}`];
}

function sureness(facts: Figures): string[] {
  const { done } = facts.comparison;
  const [first] = facts.outlooks;
  const { neither } = first.options[facts.lead];
  const under =
    facts.outlooks.length > 1 ? ` under each of ${formatCounted(facts.outlooks.length, 'outlook')}` : '';
  return [
    `${formatCounted(done, 'future')} of each option${under} were run on the same luck. Ranges in brackets are 95 % intervals of chance alone (chances: Wilson; years: bootstrap of pairs).`,
    neither > 0
      ? `In ${neither} of ${done} futures of ${named(facts.options[facts.lead])} neither closing nor a drought came by ${horizon(facts)}; they count as not closed in time.`
      : '',
    'Whether the rates and the outlook are right is not part of these ranges.',
  ];
}

function changes(facts: Figures, warnings: readonly string[]): string[] {
  const [first, ...others] = facts.outlooks;
  const { lead, options } = facts;
  const mine = first.options[lead];
  const lines: string[] = [];
  const close = first.options.flatMap(({ chance }, i) =>
    i !== lead && overlap(chance, mine.chance) ? [named(options[i])] : [],
  );
  if (close.length > 0)
    lines.push(
      `${capital(listed(close))} ${close.length > 1 ? 'come' : 'comes'} close: the ranges of chance overlap.`,
    );
  if (facts.comparison.done < fewFutures)
    lines.push(
      `More futures may: with ${facts.comparison.done} the chance is only known to lie between ${of100(mine.chance.low)} and ${of100(mine.chance.high)} of 100.`,
    );
  for (const outlook of others) {
    const there = outlook.options[lead];
    const best = bestOf(outlook.options);
    const better = best !== lead && outlook.options[best].chance.estimate > there.chance.estimate;
    lines.push(
      `Under the outlook “${outlook.name}” ${named(options[lead])} closes in time in ${of100(there.chance.estimate)} of 100 futures ${inBrackets(there.chance)}${better ? `; there ${named(options[best])} does better, with ${of100(outlook.options[best].chance.estimate)}` : ''}.`,
    );
  }
  if (mine.lostAgain > 0)
    lines.push(
      `Closing is not for good: in ${mine.lostAgain} of ${facts.comparison.done} futures the ground falls open again after it had closed.`,
    );
  lines.push(...warnings.slice(0, mostWarnings));
  if (warnings.length > mostWarnings)
    lines.push(`${formatCounted(warnings.length - mostWarnings, 'further warning')}: see the annex, part C.`);
  if (facts.decision?.reservations)
    lines.push(`Reservations: ${facts.decision.reservations.replace(/\s+/g, ' ')}`);
  return lines.map((line) => `- ${line}`);
}

const overlap = (a: { low: number; high: number }, b: { low: number; high: number }) =>
  a.low <= b.high && b.low <= a.high;
const bestOf = (options: readonly BriefFigures[]) =>
  options.reduce((best, { chance }, i) => (chance.estimate > options[best].chance.estimate ? i : best), 0);
const listed = (words: readonly string[]) =>
  words.length < 2 ? words.join('') : `${words.slice(0, -1).join(', ')} and ${words.at(-1)}`;
