import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { RasterPicture } from '#app/components/raster-picture.tsx';
import { closingQuery } from '#app/features/runs/closing-years.ts';
import type { RunSummary } from '#contract/runs.ts';
import type { SiteSummary } from '#contract/sites.ts';

/** Above this many cells the bytes behind a picture would keep a field connection busy for too long. */
const cellsAtMost = 1_500_000;

const closingRamp =
  'bg-[linear-gradient(to_right,var(--color-closing-0),var(--color-closing-2),var(--color-closing-4),var(--color-closing-6),var(--color-closing-8))]';

/** The site as its latest finished run leaves it: the year in which each cell closes. */
export function SitePicture({ site, latest }: { site: SiteSummary; latest: RunSummary | undefined }) {
  const { width, height } = site.grid;
  const shown = latest !== undefined && width * height <= cellsAtMost;
  const closing = useQuery({ ...closingQuery(latest?.id ?? ''), enabled: shown });
  const raster = useMemo(
    () =>
      closing.data &&
      latest && {
        kind: 'closing' as const,
        values: closing.data,
        surveyYear: latest.surveyYear,
        lastYear: latest.surveyYear + latest.years,
      },
    [closing.data, latest],
  );
  const shape = { aspectRatio: `${width} / ${height}` };
  if (!raster || !latest) {
    return (
      <div
        style={{ ...shape, maxHeight: 120 }}
        className="flex w-full items-end border border-dashed border-rule p-2 text-note text-ink-2"
      >
        {pictureWords(latest !== undefined, shown, closing.isError)}
      </div>
    );
  }
  return (
    <figure>
      <RasterPicture
        {...{ raster, width, height }}
        label={`Map of the year in which each part of ${site.name} closes`}
        className="max-h-[300px] w-full border border-rule object-cover"
      />
      <figcaption className="mt-1.5 flex flex-wrap items-center gap-x-2 text-note text-ink-2">
        <span className="min-w-0 flex-1 truncate max-sm:basis-full">
          Closing year, latest run: {latest.optionName}
        </span>
        <span className="font-mono text-axis">{latest.surveyYear + 1}</span>
        <span aria-hidden="true" className={`h-2 w-24 ${closingRamp}`} />
        <span className="font-mono text-axis">{raster.lastYear}</span>
        <span aria-hidden="true" className="size-2 bg-late" />
        <span>still open</span>
      </figcaption>
    </figure>
  );
}

function pictureWords(hasRun: boolean, shown: boolean, failed: boolean): string {
  if (!hasRun) return 'A picture comes with the first finished run.';
  if (!shown) return 'Too large for a picture here; open it to see its map.';
  return failed ? 'The picture did not come.' : 'Fetching the picture';
}
