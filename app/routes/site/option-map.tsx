import { useMemo } from 'react';
import { withoutPlanted } from '#contract/work-titles.ts';
import type { Work } from '#contract/works.ts';
import type { GainMap } from '#sim-core/plan/gain-map.ts';
import type { YearLine } from '#sim-core/plan/year-lines.ts';
import { EmptyState } from '#app/components/empty-state.tsx';
import { FlagSymbol, SurvivorSymbol } from '#app/components/symbols.tsx';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { RefusedNote } from '#app/features/options/board/refused-note.tsx';
import { drawsOutline } from '#app/features/options/board/sketch.ts';
import { SketchMarks } from '#app/features/options/board/sketch-marks.tsx';
import type { DrawingBoard } from '#app/features/options/board/use-board.ts';
import { worksOnMap } from '#app/features/options/board/works-on-map.ts';
import { yearContours } from '#app/features/options/quick-look/year-contours.ts';
import type { OptionDraft } from '#app/features/options/option-draft.ts';
import { WorkNote } from '#app/features/options/work-note.tsx';
import { WorksTable } from '#app/features/options/works-table.tsx';
import { placeInWords, placeOf, worksInWords } from '#contract/works-words.ts';
import { useSameList } from '#app/lib/use-same-list.ts';
import { MapNote } from '#app/map/MapNote.tsx';
import type { MapRaster } from '#app/map/map-raster.ts';
import { SiteMap } from '#app/map/SiteMap.tsx';
import type { Look } from '#app/workers/quick-look-desk.ts';
import { closingRaster, gainRaster, type MapShow } from './option-raster.ts';
import { GroundState } from './ground-state.tsx';
import { OptionStrip } from './option-strip.tsx';
import { surveyedOnOptionInWords, type SurveyedOnOption } from './surveyed-on-option.ts';
import { useSite } from './use-site.ts';

const shownWords: Record<MapShow, string> = {
  cover: 'Cover at the survey',
  closing: 'The year in which the ground closes by growth alone',
  gain: 'What one more mound would bring in each place',
};

/** The works on the ground, over the cover that stands today; or the same works as a table. */
export function OptionMap(props: {
  ground: GroundRasters;
  draft: OptionDraft;
  board: DrawingBoard;
  surveyed: SurveyedOnOption;
  /** works that are shown before they are placed */
  preview: readonly Work[];
  show: MapShow;
  look: Look | undefined;
  lines: readonly YearLine[] | undefined;
  gain: GainMap | undefined;
  /** works that come later stand faint */
  year: number;
  asTable: boolean;
  editable: boolean;
  titles: ReadonlyMap<string, string>;
  /** ids of works that stand on marsh already */
  standing: ReadonlySet<string>;
  title: string;
  onRemove: (id: string) => void;
  onMove: () => void;
}) {
  const { ground, draft, board, year, editable, surveyed, preview, show, look, lines, gain } = props;
  const { tool, refused } = board;
  const placing = editable && tool !== 'select' && tool !== 'box';
  const { site } = useSite();
  const { grid, outlook } = site;
  const drawn = useMemo(() => worksOnMap(board.works, year), [board.works, year]);
  const faint = useMemo(() => worksOnMap(preview, year, true), [preview, year]);
  const footholds = useMemo(
    () => [...surveyed.footholds, ...drawn.footholds, ...faint.footholds],
    [surveyed.footholds, drawn, faint],
  );
  // What is painted with the outlines, thousands of contours, is painted anew only when they change.
  const areas = useSameList(
    useMemo(() => [...surveyed.areas, ...drawn.areas], [surveyed.areas, drawn.areas]),
  );
  const { surveyYear, years } = outlook;
  const raster = useMemo((): MapRaster | undefined => {
    if (show === 'gain' && gain) return gainRaster(gain);
    if (show === 'closing' && look) return closingRaster(look, surveyYear, years);
    return ground.cover ? { kind: 'cover', values: ground.cover } : undefined;
  }, [show, gain, look, ground.cover, surveyYear, years]);
  const contours = useMemo(
    () => (show === 'closing' && lines ? yearContours(lines) : undefined),
    [show, lines],
  );
  const chosen = draft.selected.size <= 2 ? board.works.filter(({ id }) => draft.selected.has(id)) : [];
  const [only, ...others] = withoutPlanted(chosen);
  const surveyedOne =
    draft.selected.size === 0 ? surveyed.footholds.find((f) => f.id === board.found?.id) : undefined;
  const selected = useMemo(
    () => (surveyedOne ? new Set([surveyedOne.id]) : draft.selected),
    [surveyedOne, draft.selected],
  );

  const surveyedWords = surveyedOnOptionInWords(surveyed);

  if (props.asTable)
    return (
      <div className="relative size-full overflow-auto bg-ground px-4 py-3 lg:px-6">
        {draft.works.length === 0 ? (
          <EmptyState title="No works in this option.">
            {editable
              ? 'Choose a tool above and press the map, or move its crosshair by keys and press Space.'
              : ''}
          </EmptyState>
        ) : (
          <WorksTable
            works={draft.works}
            grid={grid}
            selected={draft.selected}
            standing={props.standing}
            onSelect={board.select}
            onEdit={editable ? board.edit : undefined}
            onRemove={editable ? props.onRemove : undefined}
          />
        )}
      </div>
    );
  return (
    <>
      <SiteMap
        className="size-full"
        grid={grid}
        raster={raster}
        ground={ground.capacity}
        footholds={footholds}
        areas={areas}
        contours={contours}
        selected={selected}
        tool={board.mapTool}
        label={props.title}
        summary={`${raster ? shownWords[raster.kind === 'closing' ? 'closing' : raster.kind === 'share' ? 'gain' : 'cover'] : 'The site'}, with ${worksInWords(draft.works)}${
          surveyedWords ? ` and ${surveyedWords}` : ''
        }.`}
        legendTitle={
          raster?.kind === 'closing'
            ? 'Year it closes, quick look'
            : raster?.kind === 'share'
              ? 'Mean arrival sooner by one more mound'
              : `Cover in ${surveyYear}, the survey`
        }
        legend={
          <>
            <span className="flex items-center gap-1.5">
              <FlagSymbol /> planned
            </span>
            {surveyedWords && (
              <span className="flex items-center gap-1.5">
                <SurvivorSymbol /> surveyed
              </span>
            )}
          </>
        }
      >
        <SketchMarks
          sketch={board.sketch}
          closed={drawsOutline(tool)}
          shape={board.shape}
          corner={board.corner}
          box={board.box}
        />
        {/* While something is placed nothing may stand under the next press: the margin says what was placed last. */}
        {only && others.length === 0 && !refused && !placing && (
          <MapNote {...placeOf(only)}>
            <WorkNote
              work={only}
              title={props.titles.get(only.id) ?? ''}
              edit={editable ? { onMove: props.onMove, onRemove: () => props.onRemove(only.id) } : undefined}
            />
          </MapNote>
        )}
        {surveyedOne && !refused && (
          <MapNote x={surveyedOne.x} y={surveyedOne.y} passing>
            <b className="block text-body leading-tight">Surveyed mound</b>
            <span className="block font-mono text-axis text-ink-2">{placeInWords(surveyedOne)}</span>
            {board.found?.kept && (
              <span role="alert" className="block border-l-[5px] border-danger pl-2">
                It was there already at the survey and cannot be removed.
              </span>
            )}
          </MapNote>
        )}
        {refused && <RefusedNote refused={refused} onGone={board.forget} />}
      </SiteMap>
      {editable && <OptionStrip board={board} />}
      <GroundState ground={ground} />
    </>
  );
}
