import { useMemo } from 'react';
import { layerParts, type LayerPart } from '#contract/layers.ts';
import { FileDrop } from '#app/components/file-drop.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { classesForMap } from '#app/features/layers/class-draft.ts';
import { ClassList, ClassTable } from '#app/features/layers/class-table.tsx';
import { plantableArea } from '#app/features/layers/ground-facts.ts';
import { LayerEntry } from '#app/features/layers/layer-entry.tsx';
import { partLabels, partReasons } from '#app/features/layers/part-words.ts';
import { UnitChoice } from '#app/features/layers/unit-choice.tsx';
import { UploadList } from '#app/features/layers/upload-list.tsx';
import type { UploadStore } from '#app/features/layers/upload-store.ts';
import type { ClassDraft } from '#app/features/layers/use-class-draft.ts';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { formatArea, formatCount, formatLength, formatShare } from '#app/lib/formats.ts';
import { formatCoordinate } from '#app/map/map-ticks.ts';
import { SiteSettings } from './site-settings.tsx';
import { useSite } from './use-site.ts';

interface GroundMarginProps {
  rasters: GroundRasters;
  classes: ClassDraft;
  shown: LayerPart | undefined;
  onShow: (part: LayerPart) => void;
  uploads: UploadStore;
  taken: readonly LayerPart[];
  /** the class table waits to be saved, so that is the action that matters now */
  unsaved: boolean;
  onFiles: (files: File[]) => void;
}

/** What stands on the site and what is missing, in words. */
export function GroundMargin(props: GroundMarginProps) {
  const { site, mayKeepGround } = useSite();
  const { grid, layers } = site;
  return (
    <>
      <h1 className="text-lead">Ground</h1>
      <p className="mt-0.5 mb-2 text-note text-ink-2">
        The working grid: {site.crsName} (EPSG:{grid.epsg}), {formatCount(grid.width)} ×{' '}
        {formatCount(grid.height)} cells of {formatLength(grid.cellSize)},{' '}
        {formatArea(grid.width * grid.height * grid.cellSize ** 2)}. North-west corner{' '}
        <span className="font-mono text-axis whitespace-nowrap">
          E {formatCoordinate(grid.originX)} N {formatCoordinate(grid.originY)}
        </span>
        .
      </p>
      {layerParts.map((part) => {
        const layer = layers.find((each) => each.part === part);
        if (!layer) return <MissingPart key={part} part={part} />;
        return (
          <LayerEntry
            key={part}
            siteId={site.id}
            layer={layer}
            shown={props.shown === part}
            onShow={() => props.onShow(part)}
            editable={mayKeepGround}
          >
            {part === 'habitat' ? (
              <Classes {...props} />
            ) : part === 'elevation' ? undefined : (
              <UnitChoice siteId={site.id} layer={layer} editable={mayKeepGround} />
            )}
          </LayerEntry>
        );
      })}
      <EngineView rasters={props.rasters} classes={props.classes} />
      {mayKeepGround ? (
        <section aria-label="Add layers" className="border-t border-ink pt-3">
          <h2 className="mb-2 text-body">Add or replace a layer</h2>
          <UploadList store={props.uploads} taken={props.taken} primary={!props.unsaved} />
          <FileDrop
            label="Drop GeoTIFFs here"
            hint="One band each, on the same cells as the working grid. A layer of the same part is replaced; runs keep the old one."
            accept=".tif,.tiff,image/tiff"
            onFiles={props.onFiles}
          />
        </section>
      ) : (
        <p className="border-t border-ink pt-2 text-note text-ink-2">
          Layers, units and classes are changed by modellers and admins of the team.
        </p>
      )}
      <SiteSettings />
    </>
  );
}

function MissingPart({ part }: { part: LayerPart }) {
  return (
    <section className="border-t border-rule py-2.5" aria-label={partLabels[part]}>
      <h2 className="text-body text-ink-2">
        {partLabels[part]}{' '}
        <span className="text-note font-normal">
          {part === 'habitat' || part === 'cover' ? 'is missing' : 'none'}
        </span>
      </h2>
      <p className="text-note text-ink-2">{partReasons[part]}</p>
    </section>
  );
}

function Classes({ classes }: GroundMarginProps) {
  const { site, mayKeepGround } = useSite();
  const layer = site.layers.find(({ part }) => part === 'habitat');
  if (!layer) return null;
  const table = { layer, rows: classes.rows, cellSize: site.grid.cellSize };
  if (!mayKeepGround)
    return classes.suggested ? (
      <p>No class table yet: a modeller or admin says what each class can hold.</p>
    ) : (
      <ClassList {...table} />
    );
  return (
    <>
      <p className="mb-1.5 text-ink-2">
        {classes.suggested && 'No class table yet; this one is a suggestion. '}
        Capacity is the largest share of a cell that the plant can hold (0: cannot grow); vigour is growth as
        a share of growth on good ground.
      </p>
      <ClassTable {...table} onChange={classes.change} />
      {classes.error !== null && <ProblemNotice error={classes.error} className="mt-2" />}
    </>
  );
}

/** The ground as a run would take it, in words. Follows the class table while it is edited. */
function EngineView({ rasters, classes }: Pick<GroundMarginProps, 'rasters' | 'classes'>) {
  const { site } = useSite();
  const { grid, layers } = site;
  const has = (part: LayerPart) => layers.some((layer) => layer.part === part);
  const habitat = layers.find(({ part }) => part === 'habitat');
  const whole = grid.width * grid.height * grid.cellSize ** 2;
  const plantable = useMemo(
    () => habitat && plantableArea(habitat, classesForMap(classes.rows), grid.cellSize),
    [habitat, classes.rows, grid.cellSize],
  );
  const pending = 'being counted';
  const { facts } = rasters;
  const covered = facts && facts.covered * grid.cellSize ** 2;
  return (
    <section className="border-t border-ink py-3" aria-label="What the engine will see">
      <h2 className="mb-1 text-body">What the engine will see</h2>
      <dl className="grid grid-cols-[1fr_auto] gap-x-3 text-[13px] [&_dd]:text-right [&_dd]:font-semibold [&>div]:contents">
        <div>
          <dt>can hold the plant</dt>
          <dd>
            {plantable === undefined
              ? 'needs habitat'
              : `${formatArea(plantable)}, ${formatShare(plantable / whole)}`}
          </dd>
        </div>
        <div>
          <dt>covered at the survey</dt>
          <dd>
            {!has('cover')
              ? 'needs cover'
              : covered === undefined
                ? pending
                : `${formatArea(covered)}${plantable ? `, ${formatShare(covered / plantable)} of that` : ''}`}
          </dd>
        </div>
        <div>
          <dt>with surveyed refuge</dt>
          <dd>
            {!has('refuge')
              ? 'none'
              : facts === undefined
                ? pending
                : formatArea(facts.sheltered * grid.cellSize ** 2)}
          </dd>
        </div>
      </dl>
      {classes.dirty && (
        <p className="mt-1 text-note text-ink-2">
          The first line follows the table above as typed; the others follow once it is saved.
        </p>
      )}
    </section>
  );
}
