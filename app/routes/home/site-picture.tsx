import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { RasterPicture } from '#app/components/raster-picture.tsx';
import { closingQuery } from '#app/features/runs/closing-years.ts';
import type { RunSummary } from '#contract/runs.ts';
import type { SiteSummary } from '#contract/sites.ts';

/** Above this many cells the bytes behind a picture would keep a field connection busy for too long. */
const cellsAtMost = 1_500_000;

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
  return (
    <div className="max-md:mb-2" style={{ aspectRatio: `${width} / ${height}`, maxHeight: 200 }}>
      {raster ? (
        <RasterPicture
          {...{ raster, width, height }}
          label={`The year each part of ${site.name} closes in its latest run, ${latest?.optionName ?? ''}`}
          className="size-full border border-rule object-cover"
        />
      ) : (
        <div className="flex size-full items-end border border-dashed border-rule p-2 text-note text-ink-2">
          {pictureWords(latest !== undefined, shown, closing.isError)}
        </div>
      )}
    </div>
  );
}

function pictureWords(hasRun: boolean, shown: boolean, failed: boolean): string {
  if (!hasRun) return 'A picture comes with the first finished run.';
  if (!shown) return 'Too large for a picture here; open it to see its map.';
  return failed ? 'The picture did not come.' : 'Fetching the picture';
}
