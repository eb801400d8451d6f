import { useMemo } from 'react';
import { EmptyState } from '#app/components/empty-state.tsx';
import { FlagSymbol, SurvivorSymbol } from '#app/components/symbols.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import type { RefusedPlace } from '#app/features/options/board/check-works.ts';
import { SketchMarks } from '#app/features/options/board/sketch-marks.tsx';
import { drawsOutline, type Board } from '#app/features/options/board/use-board-tool.ts';
import { worksOnMap } from '#app/features/options/board/works-on-map.ts';
import type { BoardTool } from '#app/features/options/board/board-tools.ts';
import type { OptionDraft } from '#app/features/options/option-draft.ts';
import type { WorkField } from '#app/features/options/work-fields.ts';
import { WorkNote } from '#app/features/options/work-note.tsx';
import { WorksTable } from '#app/features/options/works-table.tsx';
import { placeInWords, placeOf, worksInWords } from '#app/features/options/works-words.ts';
import { formatCounted } from '#app/lib/formats.ts';
import { MapNote } from '#app/map/MapNote.tsx';
import type { MapRaster } from '#app/map/map-raster.ts';
import type { MapFoothold } from '#app/map/map-symbols.ts';
import { SiteMap } from '#app/map/SiteMap.tsx';
import { GroundState } from './ground-state.tsx';
import { useSite } from './use-site.ts';

/** A surveyed foothold that was found on the map; `kept`: somebody tried to remove it. */
export interface FoundSurveyed {
  readonly id: string;
  readonly kept: boolean;
}

/** The works on the ground, over the cover that stands today; or the same works as a table. */
export function OptionMap(props: {
  ground: GroundRasters;
  draft: OptionDraft;
  board: Board;
  tool: BoardTool;
  surveyed: readonly MapFoothold[];
  found: FoundSurveyed | undefined;
  /** works that come later stand faint */
  year: number;
  asTable: boolean;
  refused: RefusedPlace | undefined;
  editable: boolean;
  title: string;
  onSelect: (ids: readonly string[]) => void;
  onEdit: (id: string, field: WorkField, text: string) => string | undefined;
  onRemove: (id: string) => void;
  onMove: () => void;
  onForget: () => void;
}) {
  const { ground, draft, board, year, refused, editable, surveyed, tool } = props;
  const { site } = useSite();
  const { grid } = site;
  const drawn = useMemo(() => worksOnMap(board.works, year), [board.works, year]);
  const footholds = useMemo(() => [...surveyed, ...drawn.footholds], [surveyed, drawn]);
  const raster = useMemo(
    (): MapRaster | undefined => (ground.cover ? { kind: 'cover', values: ground.cover } : undefined),
    [ground.cover],
  );
  const [onlyId] = draft.selected.size === 1 ? draft.selected : [];
  const only = board.works.find((work) => work.id === onlyId);
  const surveyedOne = draft.selected.size === 0 ? surveyed.find((f) => f.id === props.found?.id) : undefined;
  const selected = useMemo(
    () => (surveyedOne ? new Set([surveyedOne.id]) : draft.selected),
    [surveyedOne, draft.selected],
  );

  if (props.asTable)
    return (
      <div className="size-full overflow-auto bg-ground px-4 py-3 lg:px-6">
        {draft.works.length === 0 ? (
          <EmptyState title="No works in this option.">
            {editable
              ? 'Choose a tool above and press the map, or move its crosshair by keys and press Space.'
              : ''}
          </EmptyState>
        ) : (
          <WorksTable
            works={draft.works}
            selected={draft.selected}
            onSelect={props.onSelect}
            onEdit={editable ? props.onEdit : undefined}
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
        areas={drawn.areas}
        selected={selected}
        tool={board.mapTool}
        label={props.title}
        summary={`Cover at the survey, with ${worksInWords(draft.works)}${
          surveyed.length > 0 ? ` and ${formatCounted(surveyed.length, 'surveyed mound')}` : ''
        }.`}
        legendTitle={`Cover in ${site.outlook.surveyYear}, the survey`}
        legend={
          <>
            <span className="flex items-center gap-1.5">
              <FlagSymbol /> planned
            </span>
            {surveyed.length > 0 && (
              <span className="flex items-center gap-1.5">
                <SurvivorSymbol /> surveyed mound
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
        {only && !refused && (
          <MapNote {...placeOf(only)}>
            <WorkNote
              work={only}
              number={draft.works.findIndex((work) => work.id === onlyId) + 1}
              edit={editable ? { onMove: props.onMove, onRemove: () => props.onRemove(only.id) } : undefined}
            />
          </MapNote>
        )}
        {surveyedOne && !refused && (
          <MapNote x={surveyedOne.x} y={surveyedOne.y}>
            <b className="block text-body leading-tight">Surveyed mound</b>
            <span className="block font-mono text-axis text-ink-2">{placeInWords(surveyedOne)}</span>
            {props.found?.kept && (
              <span role="alert" className="block border-l-[5px] border-danger pl-2">
                It was there already at the survey and cannot be removed.
              </span>
            )}
          </MapNote>
        )}
        {refused && (
          <MapNote x={refused.x} y={refused.y} offset={{ left: 40, top: 24 }} always>
            <span role="alert" className="block border-l-[5px] border-danger pl-2">
              <b className="text-danger">Not here.</b> {refused.problem}
            </span>
            <WordButton lined onClick={props.onForget}>
              Understood
            </WordButton>
          </MapNote>
        )}
      </SiteMap>
      <GroundState ground={ground} />
    </>
  );
}
