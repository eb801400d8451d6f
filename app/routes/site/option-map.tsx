import { useMemo, useState } from 'react';
import { EmptyState } from '#app/components/empty-state.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { FlagSymbol, SurvivorSymbol } from '#app/components/symbols.tsx';
import { WordButton, WordLink } from '#app/components/word-button.tsx';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { MoundNote, type MoundNoteProps } from '#app/features/options/mound-note.tsx';
import { moundsOf, type OptionDraft } from '#app/features/options/option-draft.ts';
import { surveyedMounds } from '#app/features/options/surveyed-mounds.ts';
import { WorksTable, type MoundField } from '#app/features/options/works-table.tsx';
import { placeInWords, placeOf, worksInWords } from '#app/features/options/works-words.ts';
import { formatCounted } from '#app/lib/formats.ts';
import { MapNote } from '#app/map/MapNote.tsx';
import type { MapRaster } from '#app/map/map-raster.ts';
import type { MapFoothold } from '#app/map/map-symbols.ts';
import { SiteMap } from '#app/map/SiteMap.tsx';
import { useSite } from './use-site.ts';

/** A place that cannot be taken, and why. */
export interface RefusedPlace {
  readonly x: number;
  readonly y: number;
  readonly problem: string;
}

export interface OptionMapProps {
  ground: GroundRasters;
  draft: OptionDraft;
  /** works that come later stand faint */
  year: number;
  tool: 'place' | 'look';
  asTable: boolean;
  refused: RefusedPlace | undefined;
  editable: boolean;
  title: string;
  noteEdit: ((key: string) => MoundNoteProps['edit']) | undefined;
  onPlace: (x: number, y: number) => void;
  onSelect: (key: string | undefined) => void;
  onMove: (key: string, x: number, y: number) => void;
  onRemove: (key: string) => void;
  onEdit: (key: string, field: MoundField, text: string) => string | undefined;
  onForget: () => void;
}

/** The works on the ground, over the cover that stands today; or the same works as a table. */
export function OptionMap(props: OptionMapProps) {
  const { ground, draft, year, refused, editable } = props;
  const { site } = useSite();
  const { grid } = site;
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
  const footholds = useMemo(() => {
    const planned = draft.works.map(({ key, action }, i): MapFoothold => ({
      id: key,
      ...placeOf(action),
      kind: 'planned',
      year: action.year,
      faint: action.year > year,
      radius: action.kind === 'mound' ? action.radius + action.halo : undefined,
      name: `${action.kind} ${i + 1}`,
    }));
    return [...surveyed, ...planned];
  }, [draft.works, surveyed, year]);
  const [found, setFound] = useState<{ id: string; kept?: boolean }>();
  const surveyedOne = draft.selected === undefined ? surveyed.find((f) => f.id === found?.id) : undefined;
  const raster = useMemo(
    (): MapRaster | undefined => (ground.cover ? { kind: 'cover', values: ground.cover } : undefined),
    [ground.cover],
  );
  const mound = moundsOf(draft.works).find((work) => work.key === draft.selected);
  const number = draft.works.findIndex((work) => work.key === draft.selected) + 1;
  const works = draft.works.map((work) => work.action);

  if (props.asTable)
    return (
      <div className="size-full overflow-auto bg-ground px-4 py-3 lg:px-6">
        {draft.works.length === 0 ? (
          <EmptyState title="No works in this option.">
            {editable
              ? 'Choose “Place mounds” and press the map, or move its crosshair by keys and press Enter.'
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
        selectedId={draft.selected ?? surveyedOne?.id}
        tool={props.tool}
        onPlace={({ x, y }) => {
          setFound(undefined);
          props.onPlace(x, y);
        }}
        onSelect={(id) => {
          props.onForget();
          const isSurveyed = surveyed.some((f) => f.id === id);
          setFound(isSurveyed && id !== undefined ? { id } : undefined);
          props.onSelect(isSurveyed ? undefined : id);
        }}
        onMove={editable ? (id, { x, y }) => props.onMove(id, x, y) : undefined}
        onRemove={editable ? props.onRemove : undefined}
        onKept={editable ? (id) => setFound({ id, kept: true }) : undefined}
        label={props.title}
        summary={`Cover at the survey, with ${worksInWords(works)}${
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
        {mound && !refused && (
          <MapNote x={mound.action.x} y={mound.action.y}>
            <MoundNote key={mound.key} mound={mound} number={number} edit={props.noteEdit?.(mound.key)} />
          </MapNote>
        )}
        {surveyedOne && !refused && (
          <MapNote x={surveyedOne.x} y={surveyedOne.y}>
            <b className="block text-body leading-tight">Surveyed mound</b>
            <span className="block font-mono text-axis text-ink-2">{placeInWords(surveyedOne)}</span>
            {found?.kept && (
              <span role="alert" className="block border-l-[5px] border-danger pl-2">
                It was there already at the survey and cannot be removed.
              </span>
            )}
          </MapNote>
        )}
        {refused && (
          <MapNote x={refused.x} y={refused.y} offset={{ left: 40, top: 24 }}>
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

/** What the map still waits for, or what keeps it empty. */
function GroundState({ ground }: { ground: GroundRasters }) {
  const { site } = useSite();
  const has = (part: 'habitat' | 'cover') => site.layers.some((layer) => layer.part === part);
  const error = ground.errors.ground ?? ground.errors.habitat;
  const box = 'absolute top-10 left-4 max-w-[420px] bg-ground px-3 py-1.5 text-note lg:left-6';
  if (error)
    return (
      <div className={box}>
        <ProblemNotice error={error} title="The ground could not be fetched.">
          <WordButton lined onClick={ground.retry}>
            Try again
          </WordButton>
        </ProblemNotice>
      </div>
    );
  if (!has('cover') || !has('habitat'))
    return (
      <p className={box}>
        {has('cover')
          ? 'There is no habitat layer, so nothing says where a mound can stand.'
          : 'There is no cover layer, so the map cannot show what stands today.'}{' '}
        <WordLink to={`/sites/${site.id}/ground`}>Add it on Ground</WordLink>
      </p>
    );
  if (!ground.cover)
    return (
      <p role="status" className={`${box} busy-ticks`}>
        Fetching the cover
      </p>
    );
  return null;
}
