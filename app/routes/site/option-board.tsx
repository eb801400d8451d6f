import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo, useRef, useState } from 'react';
import type { Option } from '#contract/options.ts';
import { withoutPlanted, workTitles } from '#contract/work-titles.ts';
import type { Work } from '#contract/works.ts';
import { sayDone } from '#app/components/toast.tsx';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { useLayerRaster } from '#app/features/layers/use-layer-raster.ts';
import type { BoardPens } from '#app/features/options/board/board-pens.ts';
import { isShown } from '#app/features/options/board/place-bar.tsx';
import { useBoard } from '#app/features/options/board/use-board.ts';
import { createOptionMutation } from '#app/features/options/change-option.ts';
import { useLookOf, useQuickLook } from '#app/features/options/quick-look/use-quick-look.ts';
import { SelectionForm } from '#app/features/options/selection-form.tsx';
import { readMound } from '#app/features/options/mound-pen.ts';
import { readYear } from '#app/features/options/board/area-pen.ts';
import { standingWorks } from '#app/features/options/standing-works.ts';
import { SuggestPanel } from '#app/features/options/suggest/suggest-panel.tsx';
import { useSuggest } from '#app/features/options/suggest/use-suggest.ts';
import { useOptionDrawing } from '#app/features/options/use-option-drawing.ts';
import { useUndoKeys } from '#app/features/options/use-undo-keys.ts';
import { countOf, worksByYear } from '#contract/works-words.ts';
import { Yearline } from '#app/yearline/Yearline.tsx';
import { OptionAction } from './option-action.tsx';
import { OptionMap } from './option-map.tsx';
import { OptionMargin } from './option-margin.tsx';
import { OptionCosts, OptionMeters, useSetCosts } from './option-meters.tsx';
import type { MapShow } from './option-raster.ts';
import { OptionSentence } from './option-sentence.tsx';
import { PlaceFirst } from './option-strip.tsx';
import { OptionTools } from './option-tools.tsx';
import { SitePage } from './site-page.tsx';
import { surveyedOnOption } from './surveyed-on-option.ts';
import { tolerancesOf } from './tolerances.ts';
import { useAllowed } from './use-allowed.ts';
import { useLookStart } from './use-look-start.ts';
import { useSite } from './use-site.ts';
import { useYearParam } from './use-year-param.ts';
import { WatchStep } from './watch-step.tsx';

/** Only a habitat has classes. */
const noClasses: readonly never[] = [];

/** One option on the drawing board. Keyed by the option: each has its own drawing. */
export function OptionBoard(props: {
  options: readonly Option[];
  option: Option;
  ground: GroundRasters;
  pens: BoardPens;
  /** it was added this moment: the keyboard goes to its map */
  justMade: boolean;
  onPens: (pens: BoardPens) => void;
  onChoose: (optionId: string, isNew?: boolean) => void;
}) {
  const { option, ground, pens, justMade, onChoose } = props;
  const { site, mayDraw } = useSite();
  const { outlook, grid } = site;
  const drawing = useOptionDrawing(option);
  const { draft, draw } = drawing;
  const [asTable, setAsTable] = useState(false);
  const [show, setShow] = useState<MapShow>('closing');
  const page = useRef<HTMLDivElement>(null);
  const focusMap = () => page.current?.querySelector<HTMLElement>('[role="application"]')?.focus();
  useEffect(() => {
    if (justMade) focusMap();
  }, [justMade]);

  const lastYear = outlook.surveyYear + outlook.years;
  const usual = draft.works.reduce((latest, work) => Math.max(latest, work.year), outlook.surveyYear + 1);
  const { year, setYear } = useYearParam(outlook.surveyYear, lastYear, usual);

  const editable = mayDraw && !option.wait && !option.archived;
  const allowed = useAllowed(site);
  const worksGround = useMemo(
    () => ({ grid, capacity: ground.capacity, allowed: allowed.cells }),
    [grid, ground.capacity, allowed.cells],
  );
  const refuge = useLayerRaster(site, 'refuge', noClasses).raster;
  const surveyed = useMemo(
    () => surveyedOnOption(site.features, grid, refuge?.kind === 'share' ? refuge.values : undefined),
    [site.features, grid, refuge],
  );
  const pins = useMemo(
    () =>
      worksByYear(draft.works).map(({ year: y, kind, count }) => ({ year: y, label: countOf(kind, count) })),
    [draft.works],
  );

  const costs = useSetCosts(site.id);
  const start = useLookStart(site, allowed);
  const view = useQuickLook(start);
  const board = useBoard({
    ...{ ground: worksGround, draft, draw, editable, pens, surveyed: surveyed.footholds },
    span: outlook,
    unitCosts: costs,
    layer: view.layer,
    onPens: props.onPens,
    onAdded: (works) => {
      // What was just placed must not stand faint on the map.
      const first = works.reduce((least, work) => Math.min(least, work.year), lastYear);
      if (year < first) setYear(first);
    },
  });
  const mound = useMemo(() => readMound(pens.mound).mound, [pens.mound]);
  const workYear = readYear(pens.year, outlook);
  const suggesting = useSuggest({
    ...{ start, mound, optionId: option.id },
    drawn: draft.works,
    year: typeof workYear === 'number' ? workYear : undefined,
    each: costs && mound && costs.mound + mound.clumps * costs.clump,
  });
  const preview = useMemo(
    () => [...board.laying.parked, ...board.laying.works, ...suggesting.works],
    [board.laying.parked, board.laying.works, suggesting.works],
  );
  const all = useMemo(
    () => (preview.length > 0 ? [...board.works, ...preview] : board.works),
    [board.works, preview],
  );
  useLookOf(view, all);
  const titles = useMemo(() => workTitles(draft.works), [draft.works]);
  // Not of what is being dragged: where it comes to stand is told when it is let go.
  const standing = useMemo(
    () => standingWorks([...draft.works, ...preview], grid, ground.cover),
    [draft.works, preview, grid, ground.cover],
  );
  useUndoKeys(editable, (type) => {
    board.forget();
    draw({ type });
  });

  const queryClient = useQueryClient();
  const create = useMutation(createOptionMutation(queryClient, site.id));
  const chosen = draft.works.filter((work) => draft.selected.has(work.id));
  return (
    <SitePage
      step="options"
      title={`Options, ${option.name}`}
      tools={
        <OptionTools
          {...{ option, editable, mayDraw, draft, draw, asTable }}
          tool={board.tool}
          snap={pens.snap}
          quickLook={start && show !== 'gain' ? show === 'closing' : undefined}
          onQuickLook={(shown) => setShow(shown ? 'closing' : 'cover')}
          onTool={board.setTool}
          onSnap={(snap) => props.onPens({ ...pens, snap })}
          onTable={setAsTable}
        />
      }
      sentence={
        editable && !asTable ? <OptionSentence {...{ pens, board }} currency={costs?.currency} /> : undefined
      }
      map={
        <div ref={page} className="size-full">
          <OptionMap
            {...{ ground, draft, board, surveyed, preview, year, asTable, editable, show }}
            standing={standing.ids}
            titles={titles}
            look={view.look}
            lines={view.lines}
            gain={suggesting.gain.result}
            title={`${site.name}, ${option.name}, ${year}`}
            onRemove={(id) => draw({ type: 'remove', ids: new Set([id]) })}
            onMove={() => {
              board.setTool('select');
              setAsTable(false);
              focusMap();
            }}
          />
        </div>
      }
      margin={
        <OptionMargin
          {...{ drawing, option, ground, mayDraw, onChoose }}
          onAdd={board.addFound}
          options={props.options}
          selection={
            chosen.length > 0 && (
              <SelectionForm
                works={chosen}
                title={titles.get(withoutPlanted(chosen)[0].id) ?? ''}
                standing={chosen.some((work) => standing.ids.has(work.id))}
                span={outlook}
                edit={
                  editable
                    ? {
                        onChange: board.change,
                        onCopy: board.copy,
                        onRemove: board.remove,
                        onLay: layable(draft.sets, chosen, board.laying.takeUp),
                      }
                    : undefined
                }
              />
            )
          }
          costs={<OptionCosts works={all} view={view} />}
          suggest={
            editable && (
              <SuggestPanel
                {...{ suggesting }}
                currency={costs?.currency}
                moundWords={`Each as the sentence of “one by one” says, in ${pens.year}.`}
                gainShown={show === 'gain'}
                onShowGain={(shown) => setShow(shown ? 'gain' : 'closing')}
                busy={create.isPending}
                onAdd={() => {
                  draw({ type: 'add', works: suggesting.works });
                  suggesting.forget();
                  sayDone('Added to this option; not saved yet');
                }}
                onNewOption={() =>
                  create.mutate(
                    {
                      name: `${option.name}, with ${suggesting.taken} suggested`.slice(0, 100),
                      works: [...draft.works, ...suggesting.works],
                      sets: [...draft.sets],
                    },
                    {
                      onSuccess: (made) => {
                        suggesting.forget();
                        onChoose(made.id, true);
                      },
                    },
                  )
                }
              />
            )
          }
        />
      }
      dock={
        <OptionMeters
          {...{ view, works: all, faint: preview.length, standing: standing.words }}
          possible={start !== undefined}
        />
      }
      yearline={
        <Yearline
          surveyYear={outlook.surveyYear}
          {...{ lastYear, year, pins }}
          onYear={setYear}
          droughtIndex={outlook.droughtIndex}
          tolerances={tolerancesOf(site.plant.rates)}
          label="Year that the map shows"
        />
      }
      action={
        mayDraw ? (
          <PlaceFirst board={board}>
            <OptionAction {...{ option, drawing }} waits={isShown(board.laying)} />
          </PlaceFirst>
        ) : (
          <WatchStep first="run" optionId={option.id} />
        )
      }
    />
  );
}

/** The way to lay a set anew, where the selection belongs to one that a pattern laid. */
function layable(
  sets: Option['sets'] | readonly Option['sets'][number][],
  chosen: readonly Work[],
  takeUp: (setId: string) => void,
): (() => void) | undefined {
  const [{ set }] = chosen;
  if (set === undefined || chosen.some((work) => work.set !== set)) return undefined;
  return sets.some(({ id }) => id === set) ? () => takeUp(set) : undefined;
}
