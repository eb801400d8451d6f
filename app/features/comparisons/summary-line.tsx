import type { OutlookFigures } from '#sim-core/compare/comparison-figures.ts';
import { fewFuturesWords, summaryWords } from '#sim-core/compare/summary-words.ts';

/** What can and what cannot be told apart under an outlook, in a sentence, with a warning where futures are few. */
export function SummaryLine({ figures }: { figures: OutlookFigures }) {
  const said = summaryWords(figures);
  const few = fewFuturesWords(figures);
  if (!said && !few) return null;
  return (
    <section aria-label="In short" className="pt-3">
      {said && <p className="max-w-[76ch] text-lead leading-snug">{said}</p>}
      {said && (
        <p className="mt-1 max-w-[92ch] text-note text-ink-2">
          In brackets the 95 % interval of the difference, future by future; a difference can be told where
          the interval leaves out none. A difference that can be told may still be small.
        </p>
      )}
      {few && <p className="mt-2 max-w-[92ch] border-l-[6px] border-flag pl-3">{few}</p>}
    </section>
  );
}
