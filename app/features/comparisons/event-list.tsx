import type { Comparison } from '#contract/comparisons.ts';
import { formatDateTime } from '#app/lib/formats.ts';

/** Who did what with a comparison, and when. */
export function EventList({ events }: { events: Comparison['events'] }) {
  return (
    <details className="text-note">
      <summary className="inline-block min-h-7 border-b-2 border-rule leading-7 hover:border-ink touch:min-h-11 touch:leading-[44px]">
        What happened to this comparison ({events.length})
      </summary>
      <ol className="mt-1">
        {events.map(({ at, by, what }, i) => (
          <li key={i} className="border-t border-rule-2 py-0.5">
            {formatDateTime(at)}: {what}, by {by}
          </li>
        ))}
      </ol>
    </details>
  );
}
