import type { Option } from '#contract/options.ts';
import { WordButton } from '#app/components/word-button.tsx';
import { formatCounted, formatDate } from '#app/lib/formats.ts';
import { worksInWords } from '#contract/works-words.ts';

/** Options that were put away: to be looked at, and brought back. Open while one of them is chosen. */
export function ArchiveList(props: {
  options: readonly Option[];
  chosen: string;
  onChoose: (optionId: string) => void;
}) {
  const { options, chosen } = props;
  if (options.length === 0) return null;
  return (
    <details
      className="mt-2 border-t border-rule-2 pt-1"
      open={options.some(({ id }) => id === chosen) || undefined}
    >
      <summary className="min-h-7 w-max cursor-pointer text-[13.5px] touch:min-h-11">
        Archive: {formatCounted(options.length, 'option')}
      </summary>
      <ul>
        {options.map((option) => (
          <li key={option.id} className="border-t border-rule-2 py-1 first:border-0">
            <WordButton
              className="max-w-full whitespace-normal text-left"
              pressed={option.id === chosen || undefined}
              onClick={() => props.onChoose(option.id)}
            >
              {option.name}
            </WordButton>
            <span className="block text-note text-ink-2">
              {worksInWords(option.works)}; last changed by {option.changedBy} on{' '}
              {formatDate(option.changedAt)}
            </span>
          </li>
        ))}
      </ul>
    </details>
  );
}
