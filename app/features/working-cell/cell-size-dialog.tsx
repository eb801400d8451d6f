import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import type { Site } from '#contract/sites.ts';
import type { CellSize } from '#contract/working-grid.ts';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { WordLink } from '#app/components/word-button.tsx';
import { Table } from '#app/components/table.tsx';
import { classNames } from '#app/lib/class-names.ts';
import { formatBytes, formatCount, formatDuration, formatLength, formatNumber } from '#app/lib/formats.ts';
import { cellSizesQuery, startGridChangeMutation } from './cell-size-query.ts';

/** Below this the kernel's shape shows in the front (see docs/model.md, Spread kernel). */
const fairFront = 0.95;

/** Another working cell for the site, with what that does to the front, to run time and to memory. */
export function CellSizeDialog(props: { site: Site; onClose: () => void }) {
  const { site, onClose } = props;
  const sizes = useQuery(cellSizesQuery(site.id));
  const now = sizes.data?.find(({ grid }) => grid.cellSize === site.grid.cellSize);
  const [chosen, setChosen] = useState<CellSize>();
  const queryClient = useQueryClient();
  const start = useMutation(startGridChangeMutation(queryClient, site.id));
  const shown = chosen ?? now;
  const { lateralSpread } = site.plant.rates;
  const impossible = sizes.data?.filter(({ problem }) => problem !== null) ?? [];
  return (
    <Dialog
      open
      wide
      onOpenChange={onClose}
      title="Working cell"
      description="Coarser cells make runs faster and smaller, and the plant’s front less round. All layers are brought onto the new cells from their files; options keep their places, and runs already made keep their own grid."
    >
      {sizes.isPending && <LoadingLines label="Reckoning what each cell would mean" lines={4} />}
      {sizes.error && <ProblemNotice error={sizes.error} className="mt-3" />}
      {sizes.data && (
        <div className="relative mt-3 overflow-x-auto">
          <Table
            caption="Working cells that this site may have"
            rows={sizes.data}
            rowKey={({ factor }) => String(factor)}
            selected={({ factor }) => factor === shown?.factor}
            columns={[
              {
                key: 'cell',
                head: 'cell',
                cell: (size) => (
                  <label
                    className={classNames(
                      'inline-flex min-h-7 touch:min-h-11 items-center gap-2 whitespace-nowrap',
                      size.problem === null ? 'cursor-pointer' : 'text-ink-2',
                    )}
                  >
                    <input
                      type="radio"
                      name="working-cell"
                      className="accent-ink"
                      checked={size.factor === shown?.factor}
                      disabled={size.problem !== null && size !== now}
                      aria-describedby={size.problem === null ? undefined : whyNotId(size)}
                      onChange={() => setChosen(size)}
                    />
                    {formatLength(size.grid.cellSize)}
                    {size === now && ' (now)'}
                  </label>
                ),
              },
              {
                key: 'cells',
                head: 'cells',
                number: true,
                wide: true,
                cell: ({ cells }) => formatCount(cells),
              },
              {
                key: 'front',
                head: 'diagonal front',
                number: true,
                cell: ({ frontRatio }) =>
                  frontRatio === null ? 'no run can start' : formatNumber(frontRatio, 3),
              },
              {
                key: 'time',
                head: 'a year takes',
                number: true,
                cell: (size) => yearTime(size.secondsPerYear),
              },
              {
                key: 'memory',
                head: 'memory',
                number: true,
                cell: (size) => <span className="whitespace-nowrap">{formatBytes(size.memoryBytes)}</span>,
              },
            ]}
          />
          <p className="mt-1 text-note text-ink-2">
            Diagonal front: speed of a front along the diagonal over that along the rows; 1 is round, and from{' '}
            {fairFront} on it is fair. Time and memory are estimates for one run.
          </p>
        </div>
      )}
      {impossible.length > 0 && (
        <div className="mt-2 text-note">
          <p>
            On {impossible.map(({ grid }) => formatLength(grid.cellSize)).join(', ')} no run can start with a
            lateral spread of {formatNumber(lateralSpread, 4)} m a year
            {lateralSpread === defaultRates.lateralSpread && ', which is the starting value'}.{' '}
            <WordLink to={`/sites/${site.id}/plant`}>Change it under Plant</WordLink>
          </p>
          <details className="text-ink-2">
            <summary className="min-h-7 cursor-pointer py-1 touch:min-h-11 touch:py-2.5">
              Why, cell by cell
            </summary>
            <dl>
              {impossible.map((size) => (
                <div key={size.factor} id={whyNotId(size)} className="mt-0.5">
                  <dt className="inline font-semibold">{formatLength(size.grid.cellSize)}:</dt>{' '}
                  <dd className="inline">{size.problem}</dd>
                </div>
              ))}
            </dl>
          </details>
        </div>
      )}
      {shown && shown.warnings.length > 0 && (
        <Notice className="mt-2">
          <ul>
            {shown.warnings.map((words) => (
              <li key={words}>{words}</li>
            ))}
          </ul>
        </Notice>
      )}
      {start.error && <ProblemNotice error={start.error} className="mt-2" />}
      <DialogActions>
        <Button
          kind="primary"
          disabled={!chosen || chosen === now}
          busy={start.isPending}
          onClick={() => chosen && start.mutate(chosen.factor, { onSuccess: onClose })}
        >
          {chosen && chosen !== now
            ? `Use cells of ${formatLength(chosen.grid.cellSize)}`
            : 'Use these cells'}
        </Button>
        <Button onClick={onClose}>Leave it</Button>
      </DialogActions>
    </Dialog>
  );
}

const whyNotId = ({ factor }: CellSize) => `no-run-on-${factor}`;

const yearTime = (seconds: number) =>
  seconds < 0.001
    ? 'under 1 ms'
    : seconds < 1
      ? `${formatNumber(seconds * 1000, 0)} ms`
      : seconds < 10
        ? `${formatNumber(seconds, 1)} s`
        : formatDuration(seconds);
