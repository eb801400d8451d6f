import { useState } from 'react';
import type { Layer } from '#contract/layers.ts';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { CurveChart } from './curve-chart.tsx';
import { curveNames, type CurveName } from './curve-draft.ts';
import { CurveTable } from './curve-table.tsx';
import { curveInWords, curveMeanings } from './curve-words.ts';
import { heightAt, siteHeights } from './elevation-facts.ts';
import { anchorsOf, startingCurves, startingPoint } from './starting-curves.ts';
import { TideLevels } from './tide-levels.tsx';
import type { ElevationDrafting } from './use-elevation-draft.ts';

/** What elevation does to capacity, vigour and exposure: drawn, dragged, typed. */
export function ElevationCurvesEditor(props: {
  layer: Layer;
  drafting: ElevationDrafting;
  editable: boolean;
}) {
  const { layer, drafting, editable } = props;
  const { draft, tell } = drafting;
  const [chosen, setChosen] = useState<CurveName>('capacity');
  const heights = siteHeights(layer);
  const curve = draft.elevationCurves[chosen];
  const startAt = Math.round(heightAt(heights, 0.5) * 100) / 100;
  return (
    <div className="mt-1.5 border-t border-rule-2 pt-1.5">
      <WordChoice
        label="Elevation sets"
        showLabel
        options={curveNames.map((key) => ({ key, label: key }))}
        value={chosen}
        onChange={setChosen}
      />
      <p className="text-ink-2">{curveMeanings[chosen]}</p>
      <CurveChart {...{ heights, draft, chosen, editable, tell }} />
      {curve === null ? (
        <p>
          No curve: elevation does nothing to {chosen}.{' '}
          {editable && (
            <WordButton
              lined
              onClick={() =>
                tell({
                  type: 'set',
                  curves: {
                    [chosen]: [
                      [Math.round(heightAt(heights, 0.05) * 100) / 100, chosen === 'exposure' ? 0 : 1],
                      [Math.round(heightAt(heights, 0.95) * 100 + 1) / 100, chosen === 'exposure' ? 0 : 1],
                    ],
                  },
                })
              }
            >
              Draw one
            </WordButton>
          )}
        </p>
      ) : (
        <>
          <p>{curveInWords(chosen, curve)}</p>
          <details className="mt-1">
            <summary className="text-ink-2 underline decoration-rule underline-offset-4">
              Points in numbers
            </summary>
            <CurveTable name={chosen} {...{ curve, editable, tell }} />
          </details>
        </>
      )}
      {editable && (
        <div className="flex flex-wrap gap-x-4">
          <WordButton lined disabled={!drafting.canUndo} onClick={() => tell({ type: 'undone' })}>
            Undo
          </WordButton>
          <WordButton lined disabled={!drafting.canRedo} onClick={() => tell({ type: 'redone' })}>
            Redo
          </WordButton>
          {curve !== null && (
            <WordButton lined onClick={() => tell({ type: 'set', curves: { [chosen]: null } })}>
              Take the curve off
            </WordButton>
          )}
        </div>
      )}
      <TideLevels datums={draft.tidalDatums} {...{ startAt, editable, tell }} />
      {editable && <StartingCurves {...{ heights, drafting }} />}
      {drafting.error && <ProblemNotice error={drafting.error} className="mt-2" />}
    </div>
  );
}

const levelNames = 'mean low water, mean sea level and mean high water';
const tenths = 'the lowest, middle and highest tenths of this site';
const hungOn = {
  given: levelNames,
  missing: `${tenths}, as ${levelNames} are not all given`,
  'out of order': `${tenths}, as ${levelNames} are out of order: each must stand above the one before. Check their heights`,
} as const;

function StartingCurves(props: { heights: ReturnType<typeof siteHeights>; drafting: ElevationDrafting }) {
  const { heights, drafting } = props;
  const anchors = anchorsOf(heights, drafting.draft.tidalDatums);
  return (
    <div className="mt-2 text-ink-2">
      <div className="flex flex-wrap items-center gap-x-4">
        Start from a usual shape:
        {startingCurves.map((of) => (
          <WordButton
            key={of}
            lined
            onClick={() => drafting.tell({ type: 'set', curves: startingPoint(of, anchors) })}
          >
            {of}
          </WordButton>
        ))}
      </div>
      <p>
        Hung on {hungOn[anchors.levels]}. A starting point only (common practice, no source): check it against
        the plants on your site.
      </p>
    </div>
  );
}
