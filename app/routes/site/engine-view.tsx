import type { ReactNode } from 'react';
import { layerOf } from '#contract/layer-sources.ts';
import { featureCautions } from '#contract/grid-cautions.ts';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { formatArea, formatCounted, formatShare } from '#app/lib/formats.ts';
import type { GroundFacts } from '#app/workers/engine-ground.ts';
import type { EngineMap } from './ground-view.ts';
import { useSite } from './use-site.ts';

/** The ground as a run would start from it, in numbers, with what should make one look again. */
export function EngineView(props: {
  ground: GroundRasters;
  shown: EngineMap | undefined;
  onShow: (map: EngineMap) => void;
}) {
  const { ground, shown, onShow } = props;
  const { site } = useSite();
  const { facts } = ground;
  const area = (cells: number) => formatArea(cells * site.grid.cellSize ** 2);
  const whole = site.grid.width * site.grid.height;
  const row = (map: EngineMap, words: string, value: ReactNode) => (
    <div>
      <dt>
        <WordButton
          pressed={shown === map}
          onClick={() => onShow(map)}
          className="whitespace-normal text-left"
        >
          {words}
        </WordButton>
      </dt>
      <dd>{value}</dd>
    </div>
  );
  const has = (part: 'habitat' | 'cover') => layerOf(site, part) !== undefined;
  return (
    <section
      className="border-t border-ink py-3"
      aria-label="What the engine will see"
      aria-busy={ground.outdated || ground.coarse || undefined}
    >
      <h2 className="mb-1 text-body">What the engine will see</h2>
      {ground.error && (
        <ProblemNotice error={ground.error} title="The ground cannot be put together." className="mb-2">
          <WordButton lined onClick={ground.retry}>
            Try again
          </WordButton>
        </ProblemNotice>
      )}
      {!facts && !ground.error && (
        <p role="status" className="text-note text-ink-2">
          {site.layers.length === 0 ? 'Nothing yet: it follows from the layers.' : 'Being worked out …'}
        </p>
      )}
      {facts && (ground.outdated || ground.coarse) && (
        <p role="status" className="mb-1 text-note text-ink-2">
          Figures of before; the new ones are being worked out
          {ground.progress !== undefined && `, ${formatShare(ground.progress)} done`}.
        </p>
      )}
      {facts && (
        <dl className="grid grid-cols-[minmax(0,1fr)_auto] items-baseline gap-x-3 text-[13px] [&_dd]:text-right [&_dd]:font-semibold [&>div]:contents">
          {row(
            'capacity',
            'can hold the plant',
            has('habitat')
              ? `${area(facts.plantable)}, ${formatShare(facts.plantable / whole)}`
              : 'needs habitat',
          )}
          {has('habitat') && (
            <div>
              <dt className="pl-0.5 text-ink-2">capacity there, on average</dt>
              <dd>{formatShare(facts.meanCapacity)}</dd>
            </div>
          )}
          {row('vigour', 'vigour there, on average', formatShare(facts.meanVigour))}
          {row('exposure', 'exposure there, on average', formatShare(facts.meanExposure))}
          {row(
            'refuge',
            'surveyed refuge there',
            facts.sheltered === 0 ? 'none' : `${area(facts.shelter)} in full`,
          )}
          {facts.sheltered > 0 && (
            <div>
              <dt className="pl-0.5 text-ink-2">cells with some of it</dt>
              <dd>{area(facts.sheltered)}</dd>
            </div>
          )}
          {row('fence', 'fenced', facts.fenced === 0 ? 'none' : area(facts.fenced))}
          {row(
            'cover',
            'covered at the start',
            has('cover')
              ? `${area(facts.covered)}${facts.plantable > 0 ? `, ${formatShare(facts.covered / facts.plantable)} of that` : ''}`
              : 'needs cover',
          )}
        </dl>
      )}
      {facts && <Warnings facts={facts} area={area} more={featureCautions(site.features, site.grid)} />}
    </section>
  );
}

/** What the engine will leave out, cut or hold otherwise than it was drawn, so that nobody wonders later. */
export function Warnings(props: {
  facts: GroundFacts;
  area: (cells: number) => string;
  /** what is said besides, in whole sentences */
  more?: readonly string[];
}) {
  const { facts, area, more = [] } = props;
  const cells = (n: number) => `${formatCounted(n, 'cell')}, ${area(n)}`;
  const words = [
    facts.plantable === 0 && 'No cell can hold the plant, so no run can start.',
    facts.barren > 0 &&
      `Surveyed refuge lies on ground that cannot hold the plant (${cells(facts.barren)}, ${formatShare(
        facts.barrenShelter / (facts.shelter + facts.barrenShelter),
      )} of all refuge); it shelters nothing and is not counted.`,
    facts.stranded > 0 &&
      `Cover stands on ground that cannot hold the plant (${cells(facts.stranded)}); a run starts without it.`,
    facts.overfull > 0 &&
      `Cover stands above what the ground can hold (${cells(facts.overfull)}); a run starts at capacity there.`,
    facts.withoutElevation > 0 &&
      `Elevation is missing where the class could hold the plant (${cells(facts.withoutElevation)}); nothing grows there.`,
    ...more,
  ].filter((line) => line !== false);
  if (words.length === 0) return null;
  return (
    <Notice title="Look again:" className="mt-2">
      <ul>
        {words.map((line) => (
          <li key={line}>{line}</li>
        ))}
      </ul>
    </Notice>
  );
}
