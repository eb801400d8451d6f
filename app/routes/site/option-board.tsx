import { useEffect, useMemo, useRef, useState } from 'react';
import type { Option } from '#contract/options.ts';
import { newWorkId, type Work } from '#contract/works.ts';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { readArea } from '#app/features/options/board/area-pen.ts';
import type { BoardPens } from '#app/features/options/board/board-pens.ts';
import { isAreaTool, type BoardTool } from '#app/features/options/board/board-tools.ts';
import { worksProblem, type RefusedPlace } from '#app/features/options/board/check-works.ts';
import { useBoardTool } from '#app/features/options/board/use-board-tool.ts';
import { readYear } from '#app/features/options/board/area-pen.ts';
import { readMound } from '#app/features/options/mound-pen.ts';
import { SelectionForm } from '#app/features/options/selection-form.tsx';
import { surveyedMounds } from '#app/features/options/surveyed-mounds.ts';
import { useOptionDrawing } from '#app/features/options/use-option-drawing.ts';
import { useUndoKeys } from '#app/features/options/use-undo-keys.ts';
import { withField, type WorkField } from '#app/features/options/work-fields.ts';
import { countOf, worksByYear } from '#app/features/options/works-words.ts';
import type { MapFoothold } from '#app/map/map-symbols.ts';
import { Yearline } from '#app/yearline/Yearline.tsx';
import { OptionAction } from './option-action.tsx';
import { OptionMap, type FoundSurveyed } from './option-map.tsx';
import { OptionMargin } from './option-margin.tsx';
import { OptionSentence } from './option-sentence.tsx';
import { OptionTools } from './option-tools.tsx';
import { SitePage } from './site-page.tsx';
import { tolerancesOf } from './tolerances.ts';
import { useSite } from './use-site.ts';
import { useYearParam } from './use-year-param.ts';

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
  const [refused, setRefused] = useState<RefusedPlace>();
  const [missed, setMissed] = useState(0);
  const [found, setFound] = useState<FoundSurveyed>();
  const [chosenTool, setTool] = useState<BoardTool>(draft.works.length === 0 ? 'mound' : 'select');
  const page = useRef<HTMLDivElement>(null);
  const focusMap = () => page.current?.querySelector<HTMLElement>('[role="application"]')?.focus();
  useEffect(() => {
    if (justMade) focusMap();
  }, [justMade]);

  const lastYear = outlook.surveyYear + outlook.years;
  const dated = draft.works.map((work) => work.year);
  const usual = dated.reduce((latest, year) => Math.max(latest, year), outlook.surveyYear + 1);
  const { year, setYear } = useYearParam(outlook.surveyYear, lastYear, usual);

  const editable = mayDraw && !option.wait;
  const tool = editable ? chosenTool : 'select';
  useUndoKeys(editable, (type) => {
    setRefused(undefined);
    draw({ type });
  });
  const worksGround = useMemo(
    // A site has no layer of allowed ground yet: works may go wherever the plant can grow.
    () => ({ grid, capacity: ground.capacity, allowed: undefined }),
    [grid, ground.capacity],
  );
  const surveyed = useMemo(
    (): MapFoothold[] =>
      ground.refuge
        ? surveyedMounds(grid, ground.refuge).map(({ x, y }, i) => ({
            id: `s${i}`,
            x,
            y,
            kind: 'surveyed',
            name: 'Surveyed mound',
          }))
        : [],
    [ground.refuge, grid],
  );
  const pins = useMemo(
    () =>
      worksByYear(draft.works).map(({ year: y, kind, count }) => ({ year: y, label: countOf(kind, count) })),
    [draft.works],
  );

  const mound = readMound(pens.mound);
  const workYear = readYear(pens.year, outlook);
  const area = isAreaTool(tool) ? readArea(tool, pens.area, pens.year, outlook) : undefined;
  const errors = area
    ? (area.errors ?? {})
    : { ...mound.errors, ...(typeof workYear === 'string' && { year: workYear }) };
  const miss = () => {
    setMissed(missed + 1);
    return undefined;
  };
  const show = (works: readonly Work[]) => {
    // What was just placed must not stand faint on the map.
    const first = works.reduce((least, work) => Math.min(least, work.year), lastYear);
    if (year < first) setYear(first);
  };
  const board = useBoardTool({
    ...{ ground: worksGround, draft, draw, tool, editable, surveyed },
    snap: pens.snap,
    shown: draft.selected.size === 0 ? found?.id : undefined,
    onTool: setTool,
    onSnap: () => props.onPens({ ...pens, snap: !pens.snap }),
    onSurveyed: (id, kept) => {
      setFound(id === undefined ? undefined : { id, kept });
      if (id !== undefined && draft.selected.size > 0) draw({ type: 'select', ids: [] });
    },
    onRefused: setRefused,
    moundAt: (x, y) =>
      mound.mound && typeof workYear === 'number'
        ? { kind: 'mound', id: newWorkId(), year: workYear, x, y, ...mound.mound }
        : miss(),
    workOf: (ring) =>
      area?.work
        ? {
            ...area.work,
            id: newWorkId(),
            area: { shape: 'polygon', ring: ring.map(([x, y]) => [x, y]) },
          }
        : miss(),
    onPlace: () => false,
    onAdded: show,
  });

  /** Takes changed works, or says why not. */
  const change = (works: readonly Work[]): string | undefined => {
    const problem = worksProblem(worksGround, works)?.problem;
    if (problem === undefined) draw({ type: 'change', works });
    return problem;
  };
  const edit = (id: string, field: WorkField, text: string): string | undefined => {
    const work = draft.works.find((other) => other.id === id);
    const next = work && withField(work, field, text, outlook);
    return typeof next === 'string' ? next : next && change([next]);
  };
  const select = (ids: readonly string[]) => {
    setRefused(undefined);
    setFound(undefined);
    draw({ type: 'select', ids });
  };
  const chosen = draft.works.filter((work) => draft.selected.has(work.id));

  return (
    <SitePage
      step="options"
      title={`Options, ${option.name}`}
      tools={
        <OptionTools
          {...{ option, editable, mayDraw, tool, draft, draw, asTable }}
          snap={pens.snap}
          sentence={
            <OptionSentence
              {...{ tool, pens, board, errors, missed }}
              onPens={(next) => {
                setMissed(0);
                props.onPens(next);
              }}
            />
          }
          onTool={setTool}
          onSnap={(snap) => props.onPens({ ...pens, snap })}
          onTable={setAsTable}
        />
      }
      map={
        <div ref={page} className="size-full">
          <OptionMap
            {...{ ground, draft, board, tool, surveyed, found, year, asTable, refused, editable }}
            title={`${site.name}, ${option.name}, ${year}`}
            onSelect={select}
            onEdit={edit}
            onRemove={(id) => draw({ type: 'remove', ids: new Set([id]) })}
            onMove={() => {
              setTool('select');
              setAsTable(false);
              focusMap();
            }}
            onForget={() => setRefused(undefined)}
          />
        </div>
      }
      margin={
        <OptionMargin
          {...{ drawing, option, mayDraw, onChoose }}
          options={props.options}
          selection={
            chosen.length > 0 && (
              <SelectionForm
                works={chosen}
                number={draft.works.indexOf(chosen[0]) + 1}
                span={outlook}
                edit={editable ? { onChange: change, onCopy: board.copy, onRemove: board.remove } : undefined}
              />
            )
          }
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
      action={mayDraw && <OptionAction {...{ option, drawing }} />}
    />
  );
}
