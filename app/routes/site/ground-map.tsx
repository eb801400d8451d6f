import { useMemo } from 'react';
import { layerOf } from '#contract/layer-sources.ts';
import type { HabitatClass } from '#contract/layers.ts';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { heightsOf, useLayerRaster } from '#app/features/layers/use-layer-raster.ts';
import { partLabels } from '#app/features/layers/part-words.ts';
import { placesOnMap } from '#app/features/site-features/places-on-map.ts';
import { formatArea, formatNumber, formatShare } from '#app/lib/formats.ts';
import type { MapRaster } from '#app/map/map-raster.ts';
import { SiteMap } from '#app/map/SiteMap.tsx';
import { engineLabels, type EngineMap, type GroundView } from './ground-view.ts';
import { useSite } from './use-site.ts';

/** A layer of the site on the map, or what the engine makes of the layers, with the reading of each cell. */
export function GroundMap(props: {
  view: GroundView | undefined;
  ground: GroundRasters;
  /** of habitat, saved or not */
  classes: readonly HabitatClass[];
}) {
  const { site } = useSite();
  const { view, ground, classes } = props;
  const part = view?.of === 'layer' ? view.part : undefined;
  const year = view?.of === 'layer' ? view.year : undefined;
  const layer = useLayerRaster(site, part, classes, year);
  const map = view?.of === 'engine' ? view.map : undefined;
  const values = map && ground[map];
  const seen = useMemo(
    (): MapRaster | undefined =>
      values && map
        ? map === 'cover'
          ? { kind: 'cover', values }
          : { kind: 'share', values, name: engineLabels[map] }
        : undefined,
    [values, map],
  );
  const places = useMemo(() => placesOnMap(site.features), [site.features]);

  if (view === undefined)
    return (
      <div className="grid size-full place-content-center p-6 text-center text-lead text-ink-2">
        Nothing to show yet: the first layer appears here.
      </div>
    );
  const raster = part ? layer.raster : seen;
  const error = part ? layer.error : ground.error;
  const name = part
    ? `${partLabels[part].toLowerCase()}${year === undefined ? '' : ` of ${year}`}`
    : `${engineLabels[map ?? 'capacity']}, as the engine will see it`;
  return (
    <>
      <SiteMap
        className="size-full"
        grid={site.grid}
        raster={raster}
        // Under a layer as it came, and under capacity itself, water would hide what it says.
        ground={
          part === 'habitat' || part === 'elevation' || part === 'allowed' ? undefined : ground.capacity
        }
        footholds={places.footholds}
        areas={places.areas}
        label={`${site.name}, ${name}`}
        summary={part ? layerSummary(part) : engineSummary(map ?? 'capacity')}
      />
      {(raster === undefined || (!part && (ground.outdated || ground.coarse))) && !error && (
        <p
          role="status"
          className="busy-ticks absolute top-4 left-6 border-b border-transparent bg-ground px-2 py-1 text-note"
        >
          {part ? `Fetching ${name}` : workingWords(ground)}
        </p>
      )}
      {error && (
        <div className="absolute inset-x-6 top-4 max-w-[520px] bg-ground">
          <ProblemNotice error={error} title={`${name[0].toUpperCase()}${name.slice(1)} cannot be shown.`}>
            <WordButton lined onClick={part ? layer.retry : ground.retry}>
              Try again
            </WordButton>
          </ProblemNotice>
        </div>
      )}
    </>
  );

  function layerSummary(of: NonNullable<typeof part>): string {
    const found = layerOf(site, of, year);
    if (of === 'allowed') return 'Where works may go.';
    if (!found) return '';
    const area = site.grid.cellSize ** 2;
    if (of === 'habitat')
      return `Classes: ${classes
        .map((row) => {
          const cells = found.classCounts?.find(({ value }) => value === row.value)?.cells ?? 0;
          return `${row.name} on ${formatArea(cells * area)}`;
        })
        .join(', ')}.`;
    if (of === 'elevation') {
      const { lowest, highest } = heightsOf(found);
      return `Heights from ${formatNumber(lowest)} to ${formatNumber(highest)} m.`;
    }
    return `${partLabels[of]} with values from ${formatNumber(found.minimum)} to ${formatNumber(found.maximum)}.`;
  }

  function engineSummary(of: EngineMap): string {
    const { facts } = ground;
    if (!facts) return '';
    const whole = site.grid.width * site.grid.height;
    const share = (cells: number) =>
      `${formatArea(cells * site.grid.cellSize ** 2)}, ${formatShare(cells / whole)} of the site`;
    switch (of) {
      case 'capacity':
        return `${share(facts.plantable)}, can hold the plant; capacity there is ${formatShare(facts.meanCapacity)} on average.`;
      case 'vigour':
        return `Where the plant can grow, vigour is ${formatShare(facts.meanVigour)} on average.`;
      case 'exposure':
        return `Where the plant can grow, exposure is ${formatShare(facts.meanExposure)} on average.`;
      case 'refuge':
        return `Some refuge on ${share(facts.sheltered)}, where the plant can grow${facts.barren > 0 ? '; none of it counts elsewhere' : ''}.`;
      case 'fence':
        return `Fenced: ${share(facts.fenced)}.`;
      case 'cover':
        return `Covered at the start: ${share(facts.covered)}.`;
    }
  }
}

/** What stands on the map while the engine's ground is worked out, and how far that is. */
function workingWords({ coarse, progress }: GroundRasters): string {
  const share = progress === undefined ? '' : `, ${formatShare(progress)} done`;
  return coarse
    ? `Seen from afar; the exact ground is being worked out${share}`
    : `Working out what the engine will see${share}`;
}
