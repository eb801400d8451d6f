import type { FeatureImportReply } from '#contract/features.ts';
import { Notice } from '#app/components/notice.tsx';
import { Table } from '#app/components/table.tsx';
import { formatCounted, formatNumber } from '#app/lib/formats.ts';
import { featureInWords } from './feature-words.ts';

const mostShown = 100;

/** What a file was read as, row by row, before anything is kept. */
export function ImportPreview({ preview }: { preview: FeatureImportReply }) {
  const { read, good, bad, features, problems, cautions } = preview;
  const shown = features.slice(0, mostShown);
  return (
    <>
      <p className="text-[13.5px]">
        <b>{formatCounted(good, 'good one')}</b>
        {bad > 0 && `, ${bad} with a problem`}. <span className="text-ink-2">{read}</span>
      </p>
      {problems.length > 0 && (
        <Notice
          kind="problem"
          title="Not taken as they are:"
          className="relative mt-2 max-h-40 overflow-y-auto"
        >
          <ul className="mt-1">
            {problems.map(({ row, message }) => (
              <li key={`${row} ${message}`}>
                <b>Row {row}: </b>
                {message}
              </li>
            ))}
          </ul>
          {bad > problems.length && <p>And {bad - problems.length} more.</p>}
        </Notice>
      )}
      {cautions.length > 0 && (
        <Notice title="Look again:" className="mt-2">
          <ul>
            {cautions.map((words) => (
              <li key={words}>{words}</li>
            ))}
          </ul>
        </Notice>
      )}
      {shown.length > 0 && (
        // Scrolls by itself, so keys must be able to get into it.
        <div
          tabIndex={0}
          role="region"
          aria-label="What was read"
          className="relative mt-2 max-h-56 overflow-y-auto"
        >
          <Table
            caption="What was read"
            rows={shown}
            rowKey={({ row }) => String(row)}
            columns={[
              { key: 'row', head: 'row', number: true, cell: ({ row }) => row },
              { key: 'name', head: 'name', cell: ({ name }) => name || '–' },
              { key: 'what', head: 'what it is', cell: featureInWords },
              {
                key: 'where',
                head: 'E, N',
                number: true,
                wide: true,
                cell: ({ shape }) => {
                  const [x, y] = shape.shape === 'disc' ? [shape.x, shape.y] : shape.ring[0];
                  return `${formatNumber(x, 1)}, ${formatNumber(y, 1)}`;
                },
              },
            ]}
          />
        </div>
      )}
      {good > shown.length && (
        <p className="text-note text-ink-2">And {good - shown.length} more good ones.</p>
      )}
    </>
  );
}
