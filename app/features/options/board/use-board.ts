import { useMemo, useState } from 'react';
import { mostWorks, newWorkId, type Work, type WorkSet } from '#contract/works.ts';
import { formatCount } from '#contract/formats.ts';
import { placeInWords, titleOf } from '#contract/works-words.ts';
import type { MapFoothold } from '#app/map/map-symbols.ts';
import type { Ring } from '#app/map/rings.ts';
import { readMound, type MoundErrors } from '../mound-pen.ts';
import type { DraftAction, OptionDraft } from '../option-draft.ts';
import { withField, type WorkField } from '../work-fields.ts';
import { readArea, readYear, type AreaErrors, type Span } from './area-pen.ts';
import type { BoardPens } from './board-pens.ts';
import { isAreaTool, isPattern, type BoardTool } from './board-tools.ts';
import { worksProblem, type RefusedPlace, type WorksGround } from './check-works.ts';
import type { PatternErrors } from './pattern-pen.ts';
import { plantedMound } from './planted-mounds.ts';
import { drawsOutline } from './sketch.ts';
import { useBoardTool, type Board } from './use-board-tool.ts';
import { useLaying, type Laying } from './use-laying.ts';
import type { PatternLayer } from './use-pattern.ts';

/** A surveyed foothold that was found on the map; `kept`: somebody tried to remove it. */
export interface FoundSurveyed {
  readonly id: string;
  readonly kept: boolean;
}

export interface BoardSetting {
  readonly ground: WorksGround;
  readonly span: Span;
  readonly draft: OptionDraft;
  readonly draw: (action: DraftAction) => void;
  readonly editable: boolean;
  readonly pens: BoardPens;
  readonly onPens: (pens: BoardPens) => void;
  readonly surveyed: readonly MapFoothold[];
  /** lays patterns; undefined while the ground is not complete */
  readonly layer: PatternLayer | undefined;
  /** cost of one of them; undefined where no costs are set */
  readonly unitCosts: { readonly mound: number; readonly clump: number } | undefined;
  readonly onAdded: (works: readonly Work[]) => void;
}

/** The drawing board of one option: which tool is in use, what is drawn, found, refused and wrong. */
export interface DrawingBoard extends Board {
  readonly tool: BoardTool;
  readonly setTool: (tool: BoardTool) => void;
  readonly errors: MoundErrors & AreaErrors & PatternErrors;
  /** presses that placed nothing because of what is typed, since it was last written on */
  readonly missed: number;
  readonly onPens: (pens: BoardPens) => void;
  readonly refused: RefusedPlace | undefined;
  readonly forget: () => void;
  /** Leaves the tool for selecting, and drops what it shows. */
  readonly leave: () => void;
  readonly found: FoundSurveyed | undefined;
  readonly laying: Laying;
  /** Takes works from elsewhere in one step, or says why not. */
  readonly addFound: (found: {
    readonly works: readonly Work[];
    readonly sets: readonly WorkSet[];
  }) => string | undefined;
  /** Takes changed works, or says why not. */
  readonly change: (works: readonly Work[]) => string | undefined;
  readonly edit: (id: string, field: WorkField, text: string) => string | undefined;
  readonly select: (ids: readonly string[]) => void;
}

export function useBoard(setting: BoardSetting): DrawingBoard {
  const { ground, span, draft, draw, editable, pens } = setting;
  const [chosenTool, setTool] = useState<BoardTool>(draft.works.length === 0 ? 'mound' : 'select');
  const [refused, setRefused] = useState<RefusedPlace>();
  const [missed, setMissed] = useState(0);
  const [found, setFound] = useState<FoundSurveyed>();
  const tool = editable ? chosenTool : 'select';

  const mound = useMemo(() => readMound(pens.mound), [pens.mound]);
  const year = readYear(pens.year, span);
  const wrongYear = typeof year === 'string' ? { year } : {};
  const area = isAreaTool(tool) ? readArea(tool, pens.area, pens.year, span) : undefined;
  const miss = () => {
    setMissed((n) => n + 1);
    return undefined;
  };
  const choose = (next: BoardTool) => {
    if (isPattern(tool) && !isPattern(next)) laying.park();
    turnTo(next);
    if (!isPattern(tool) && isPattern(next)) laying.resume(next);
  };
  const turnTo = (next: BoardTool) => {
    setRefused(undefined);
    setMissed(0);
    setTool(next);
    // An outline that was drawn for one pattern serves the next.
    if (!isPattern(tool) || !isPattern(next) || drawsOutline(tool) !== drawsOutline(next))
      board.clearSketch();
  };
  const workOf = (ring: Ring): Work | undefined =>
    area?.work
      ? { ...area.work, id: newWorkId(), area: { shape: 'polygon', ring: ring.map(([x, y]) => [x, y]) } }
      : miss();

  const board = useBoardTool({
    ...{ ground, draft, draw, tool, editable },
    surveyed: setting.surveyed,
    snap: pens.snap,
    shown: draft.selected.size === 0 ? found?.id : undefined,
    onTool: choose,
    onSnap: () => setting.onPens({ ...pens, snap: !pens.snap }),
    onSurveyed: (id, kept) => {
      setFound(id === undefined ? undefined : { id, kept });
      if (id !== undefined && draft.selected.size > 0) draw({ type: 'select', ids: [] });
    },
    onRefused: setRefused,
    moundAt: (x, y) =>
      mound.mound && typeof year === 'number' ? plantedMound(newWorkId, mound.mound, { x, y, year }) : miss(),
    workOf,
    onSketch: () => {
      if (!isPattern(tool) || pens.patterns[tool].region === 'outline') return;
      const pen = { ...pens.patterns[tool], region: 'outline' } as const;
      setting.onPens({ ...pens, patterns: { ...pens.patterns, [tool]: pen } });
    },
    wholeSite: isPattern(tool) && tool !== 'line' && pens.patterns[tool].region === 'site',
    // Called by a key, when all below is there.
    onPlace: () => laying.place(),
    onLeave: () => turnTo('select'),
    onAdded: setting.onAdded,
  });
  const laying = useLaying({
    ...{ tool, pens, draft, draw },
    sketch: board.sketch,
    mound: mound.mound,
    year: typeof year === 'number' ? year : undefined,
    layer: setting.layer,
    unitCosts: setting.unitCosts,
    onMissed: miss,
    onPlaced: (works) => {
      board.clearSketch();
      setting.onAdded(works);
      turnTo('select');
    },
    onAdded: setting.onAdded,
    onTool: choose,
    onPens: setting.onPens,
    onSketch: board.send,
  });
  const errors = area
    ? (area.errors ?? {})
    : isPattern(tool)
      ? { ...(laying.ofMounds ? mound.errors : {}), ...wrongYear, ...laying.errors }
      : tool === 'mound'
        ? { ...mound.errors, ...wrongYear }
        : {};

  const change = (works: readonly Work[]): string | undefined => {
    const problem = worksProblem(ground, works)?.problem;
    if (problem === undefined) draw({ type: 'change', works });
    return problem;
  };
  const addFound: DrawingBoard['addFound'] = ({ works, sets }) => {
    const sum = draft.works.length + works.length;
    if (sum > mostWorks)
      return `That would make ${formatCount(sum)} works; an option holds at most ${formatCount(mostWorks)}. Save them as an option of their own.`;
    for (const work of works) {
      const read = readYear(String(work.year), span);
      if (typeof read === 'string') return `${titleOf(work, works.indexOf(work) + 1)} of the file: ${read}`;
    }
    const problem = worksProblem(ground, works);
    if (problem)
      return `At ${placeInWords(problem)}: ${problem.problem} Mend the file, or save it as an option and mend it there.`;
    draw({ type: 'add', works, sets });
    setting.onAdded(works);
    return undefined;
  };
  return {
    ...board,
    addFound,
    ...{ tool, errors, missed, refused, found, laying, change },
    setTool: choose,
    onPens: (next) => {
      setMissed(0);
      setting.onPens(next);
    },
    forget: () => setRefused(undefined),
    leave: () => turnTo('select'),
    edit: (id, field, text) => {
      const work = draft.works.find((other) => other.id === id);
      const next = work && withField(work, field, text, span);
      return typeof next === 'string' ? next : next && change([next]);
    },
    select: (ids) => {
      setRefused(undefined);
      setFound(undefined);
      draw({ type: 'select', ids });
    },
  };
}
