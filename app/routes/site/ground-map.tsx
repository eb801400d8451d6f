import { useMemo } from 'react';
import type { HabitatClass, LayerPart } from '#contract/layers.ts';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { partLabels } from '#app/features/layers/part-words.ts';
import { formatArea, formatShare } from '#app/lib/formats.ts';
import type { MapRaster } from '#app/map/map-raster.ts';
import { SiteMap } from '#app/map/SiteMap.tsx';
import { useSite } from './use-site.ts';

/** One layer of the site on the map, with the reading of each cell. */
export function GroundMap(props: {
  shown: LayerPart | undefined;
  rasters: GroundRasters;
  /** of habitat, saved or not */
  classes: readonly HabitatClass[];
}) {
  const { site } = useSite();
  const { shown, rasters, classes } = props;
  const { habitat, cover, refuge, capacity } = rasters;
  const layer = site.layers.find(({ part }) => part === shown);
  const noData = layer?.noData;
  const raster = useMemo((): MapRaster | undefined => {
    if (shown === 'habitat') return habitat && { kind: 'classes', values: habitat, classes, noData };
    if (shown === 'cover') return cover && { kind: 'cover', values: cover };
    return refuge && { kind: 'share', values: refuge, name: 'refuge' };
  }, [shown, habitat, cover, refuge, classes, noData]);

  if (shown === undefined)
    return (
      <div className="grid size-full place-content-center p-6 text-center text-lead text-ink-2">
        Nothing to show yet: the first layer appears here.
      </div>
    );
  const error = shown === 'habitat' ? rasters.errors.habitat : rasters.errors.ground;
  return (
    <>
      <SiteMap
        className="size-full"
        grid={site.grid}
        raster={raster}
        ground={shown === 'habitat' ? undefined : capacity}
        label={`${site.name}, ${partLabels[shown].toLowerCase()}`}
        summary={summary(shown)}
      />
      {raster === undefined && error === undefined && (
        <p
          role="status"
          className="busy-ticks absolute top-4 left-6 border-b border-transparent bg-ground px-2 py-1 text-note"
        >
          Fetching {shown}
        </p>
      )}
      {error !== undefined && (
        <div className="absolute inset-x-6 top-4 max-w-[520px] bg-ground">
          <ProblemNotice error={error} title={`${partLabels[shown]} cannot be shown.`}>
            <WordButton lined onClick={rasters.retry}>
              Try again
            </WordButton>
          </ProblemNotice>
        </div>
      )}
    </>
  );

  function summary(part: LayerPart): string {
    const { cellSize, width, height } = site.grid;
    const whole = width * height;
    const area = cellSize * cellSize;
    if (part === 'habitat')
      return `Classes: ${classes
        .map((row) => {
          const cells = layer?.classCounts?.find(({ value }) => value === row.value)?.cells ?? 0;
          return `${row.name} on ${formatArea(cells * area)}`;
        })
        .join(', ')}.`;
    const [amount, words] =
      part === 'cover' ? [rasters.facts?.covered, 'covered'] : [rasters.facts?.sheltered, 'with some refuge'];
    return amount === undefined
      ? `${partLabels[part]} of ${formatArea(whole * area)}.`
      : `${formatArea(amount * area)} ${words}, ${formatShare(amount / whole)} of the site.`;
  }
}
