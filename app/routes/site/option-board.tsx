import { useEffect, useMemo, useRef, useState } from 'react';
import type { Option } from '#contract/options.ts';
import { newWorkId } from '#contract/works.ts';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { moundProblem } from '#app/features/options/check-mound.ts';
import { readPen, type MoundPen } from '#app/features/options/mound-pen.ts';
import { moundsOf } from '#app/features/options/option-draft.ts';
import { useOptionDrawing } from '#app/features/options/use-option-drawing.ts';
import { countOf, worksByYear } from '#app/features/options/works-words.ts';
import type { MoundField } from '#app/features/options/works-table.tsx';
import { useUndoKeys } from '#app/features/options/use-undo-keys.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import { Yearline } from '#app/yearline/Yearline.tsx';
import { OptionAction } from './option-action.tsx';
import { OptionMap, type RefusedPlace } from './option-map.tsx';
import { OptionMargin } from './option-margin.tsx';
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
  pen: MoundPen;
  /** it was added this moment: the keyboard goes to its map */
  justMade: boolean;
  onPen: (pen: MoundPen) => void;
  onChoose: (optionId: string, isNew?: boolean) => void;
}) {
  const { option, ground, pen, justMade, onChoose } = props;
  const { site, mayDraw } = useSite();
  const { outlook, grid } = site;
  const drawing = useOptionDrawing(option);
  const { draft, draw } = drawing;
  const [asTable, setAsTable] = useState(false);
  const [refused, setRefused] = useState<RefusedPlace>();
  const [missed, setMissed] = useState(0);
  const [chosenTool, setTool] = useState<'place' | 'look'>(draft.works.length === 0 ? 'place' : 'look');
  const board = useRef<HTMLDivElement>(null);
  const focusMap = () => board.current?.querySelector<HTMLElement>('[role="application"]')?.focus();
  useEffect(() => {
    if (justMade) focusMap();
  }, [justMade]);

  const lastYear = outlook.surveyYear + outlook.years;
  const dated = draft.works.map((work) => work.action.year);
  const usual = Math.max(outlook.surveyYear + 1, ...dated);
  const { year, setYear } = useYearParam(outlook.surveyYear, lastYear, usual);

  const editable = mayDraw && !option.wait;
  const tool = editable ? chosenTool : 'look';
  useUndoKeys(editable, (type) => {
    setRefused(undefined);
    draw({ type });
  });
  const read = readPen(pen, outlook);
  const pins = useMemo(
    () =>
      worksByYear(draft.works.map((work) => work.action)).map(({ year: y, kind, count }) => ({
        year: y,
        label: countOf(kind, count),
      })),
    [draft.works],
  );

  /** Takes a place for a new or a moved mound, or says on the spot why not. */
  const allowed = (x: number, y: number): boolean => {
    const problem = moundProblem(grid, ground.capacity, x, y);
    setRefused(problem === undefined ? undefined : { x, y, problem });
    return problem === undefined;
  };
  const place = (x: number, y: number) => {
    if (!read.mound) return setMissed(missed + 1);
    if (!allowed(x, y)) return;
    draw({ type: 'place', mound: { id: newWorkId(), kind: 'mound', x, y, ...read.mound } });
    // What was just placed must not stand faint on the map.
    if (year < read.mound.year) setYear(read.mound.year);
  };
  const move = (key: string, x: number, y: number) => {
    if (allowed(x, y)) draw({ type: 'change', key, change: { x, y } });
  };
  const remove = (key: string) => {
    setRefused(undefined);
    draw({ type: 'remove', key });
  };
  const edit = (key: string, field: MoundField, text: string): string | undefined => {
    const mound = moundsOf(draft.works).find((work) => work.key === key)?.action;
    const value = parseNumber(text);
    if (!mound) return undefined;
    if (value === undefined) return `“${text}” is no number.`;
    if (field === 'year' && (!Number.isInteger(value) || value <= outlook.surveyYear || value > lastYear))
      return `Works fall in the years ${outlook.surveyYear + 1} to ${lastYear}.`;
    if (field === 'radius' && !(value > 0 && value <= 1000)) return 'A radius lies above 0 and up to 1000 m.';
    if (field === 'x' || field === 'y') {
      const to = field === 'x' ? { x: value, y: mound.y } : { x: mound.x, y: value };
      const problem = moundProblem(grid, ground.capacity, to.x, to.y);
      if (problem) return problem;
    }
    draw({ type: 'change', key, change: { [field]: value } });
    return undefined;
  };
  const noteEdit = editable
    ? (key: string) => ({
        onYear: (text: string) => edit(key, 'year', text),
        onMove: () => {
          setTool('look');
          setAsTable(false);
          focusMap();
        },
        onRemove: () => remove(key),
      })
    : undefined;

  return (
    <SitePage
      step="options"
      title={`Options, ${option.name}`}
      tools={
        <OptionTools
          {...{ option, editable, mayDraw, tool, pen, draft, draw, asTable }}
          errors={read.errors ?? {}}
          missed={missed}
          onPen={(next) => {
            setMissed(0);
            props.onPen(next);
          }}
          onTool={setTool}
          onTable={setAsTable}
        />
      }
      map={
        <div ref={board} className="size-full">
          <OptionMap
            {...{ ground, draft, year, tool, asTable, refused, editable, noteEdit }}
            title={`${site.name}, ${option.name}, ${year}`}
            onPlace={place}
            onSelect={(key) => draw({ type: 'select', key })}
            onMove={move}
            onRemove={remove}
            onEdit={edit}
            onForget={() => setRefused(undefined)}
          />
        </div>
      }
      margin={<OptionMargin {...{ drawing, option, noteEdit, mayDraw, onChoose }} options={props.options} />}
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
