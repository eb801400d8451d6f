import { useState } from 'react';
import { layerOf, resurveysOf } from '#contract/layer-sources.ts';
import { layerParts, type HabitatClass, type Layer, type LayerPart } from '#contract/layers.ts';
import { FileDrop } from '#app/components/file-drop.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { ElevationCurvesEditor } from '#app/features/elevation/elevation-curves.tsx';
import type { ElevationDrafting } from '#app/features/elevation/use-elevation-draft.ts';
import { readRows } from '#app/features/layers/class-draft.ts';
import { ClassFiles } from '#app/features/layers/class-files.tsx';
import { ClassList, ClassTable } from '#app/features/layers/class-table.tsx';
import { LayerEntry } from '#app/features/layers/layer-entry.tsx';
import { hasUnit, neededParts, partLabels, partReasons } from '#app/features/layers/part-words.ts';
import { HeightChoice, UnitChoice } from '#app/features/layers/unit-choice.tsx';
import { YearChoice } from '#app/features/layers/year-choice.tsx';
import type { SendingStore } from '#app/features/layers/uploads/sending-store.ts';
import { UploadPanel } from '#app/features/layers/uploads/upload-panel.tsx';
import type { ClassDraft } from '#app/features/layers/use-class-draft.ts';
import type { GroundRasters } from '#app/features/layers/use-ground-rasters.ts';
import { FeatureSection } from '#app/features/site-features/feature-section.tsx';
import { CellSizeDialog } from '#app/features/working-cell/cell-size-dialog.tsx';
import { GridChangeProgress } from '#app/features/working-cell/grid-change-progress.tsx';
import { formatArea, formatCount, formatLength } from '#app/lib/formats.ts';
import { formatCoordinate } from '#app/map/map-ticks.ts';
import { EngineView } from './engine-view.tsx';
import type { GroundView } from './ground-view.ts';
import { SiteSettings } from './site-settings.tsx';
import { useSite } from './use-site.ts';

interface GroundMarginProps {
  ground: GroundRasters;
  classes: ClassDraft;
  elevation: ElevationDrafting;
  view: GroundView | undefined;
  onShow: (view: GroundView) => void;
  sending: SendingStore;
  /** something waits to be saved, so that is the action that matters now */
  unsaved: boolean;
  /** `part` where the file is to replace the layer of one */
  onFiles: (files: File[], part?: LayerPart) => void;
}

/** What stands on the site and what is missing, in words. */
export function GroundMargin(props: GroundMarginProps) {
  const { site, mayKeepGround } = useSite();
  const { view, onShow, onFiles } = props;
  const layers = layerParts.flatMap((part) =>
    part === 'resurvey' ? resurveysOf(site) : (layerOf(site, part) ?? []),
  );
  const missing = layerParts.filter(
    (part) =>
      layers.every((layer) => layer.part !== part) && site.features.every(({ kind }) => kind !== part),
  );
  return (
    <>
      <h1 className="text-lead">Ground</h1>
      <WorkingGrid />
      {mayKeepGround && (
        <section aria-label="Add layers" className="border-t border-ink pt-2.5 pb-3">
          <UploadPanel
            teamId={site.teamId}
            siteId={site.id}
            grid={site.grid}
            layers={site.layers}
            store={props.sending}
            primary={!props.unsaved}
          />
          <FileDrop
            label="Drop GeoTIFFs here"
            hint="Any number, of any CRS and cell size, anywhere on the page: each is read, and you decide about it before it is placed."
            accept=".tif,.tiff,image/tiff"
            onFiles={onFiles}
          />
        </section>
      )}
      {layers.map((layer) => (
        <LayerEntry
          key={layer.year ?? layer.part}
          siteId={site.id}
          layer={layer}
          shown={view?.of === 'layer' && view.part === layer.part && (view.year ?? null) === layer.year}
          onShow={() =>
            onShow({ of: 'layer', part: layer.part, ...(layer.year !== null && { year: layer.year }) })
          }
          editable={mayKeepGround}
          onFile={(file) => onFiles([file], layer.part)}
        >
          {layer.part === 'habitat' && <Classes {...props} layer={layer} />}
          {layer.part === 'elevation' && (
            <>
              <HeightChoice siteId={site.id} layer={layer} editable={mayKeepGround} />
              <ElevationCurvesEditor layer={layer} drafting={props.elevation} editable={mayKeepGround} />
            </>
          )}
          {layer.year !== null && <YearChoice siteId={site.id} layer={layer} editable={mayKeepGround} />}
          {hasUnit(layer.part) && <UnitChoice siteId={site.id} layer={layer} editable={mayKeepGround} />}
        </LayerEntry>
      ))}
      {missing.length > 0 && <Missing parts={missing} />}
      <FeatureSection siteId={site.id} features={site.features} editable={mayKeepGround} />
      <EngineView
        ground={props.ground}
        shown={view?.of === 'engine' ? view.map : undefined}
        onShow={(map) => onShow({ of: 'engine', map })}
      />
      {!mayKeepGround && (
        <p className="border-t border-ink pt-2 text-note text-ink-2">
          Layers, classes, curves, points and areas are changed by modellers and admins of the team.
        </p>
      )}
      <SiteSettings />
    </>
  );
}

/** The cells that everything lies on, and the way to coarser ones. */
function WorkingGrid() {
  const { site, mayKeepGround } = useSite();
  const { grid } = site;
  const [choosing, setChoosing] = useState(false);
  return (
    <>
      <p className="mt-0.5 mb-2 text-note text-ink-2">
        The working grid: {site.crsName} (EPSG:{grid.epsg}), {formatCount(grid.width)} ×{' '}
        {formatCount(grid.height)} cells of {formatLength(grid.cellSize)},{' '}
        {formatArea(grid.width * grid.height * grid.cellSize ** 2)}. North-west corner{' '}
        <span className="font-mono text-axis whitespace-nowrap">
          E {formatCoordinate(grid.originX)} N {formatCoordinate(grid.originY)}
        </span>
        .{' '}
        {mayKeepGround && (
          <WordButton lined onClick={() => setChoosing(true)}>
            Another cell size
          </WordButton>
        )}
      </p>
      <GridChangeProgress siteId={site.id} editable={mayKeepGround} />
      {choosing && <CellSizeDialog site={site} onClose={() => setChoosing(false)} />}
    </>
  );
}

function Missing({ parts }: { parts: readonly LayerPart[] }) {
  return (
    <section className="border-t border-rule py-2.5" aria-label="Layers that are not there">
      <h2 className="text-body text-ink-2">Not there yet</h2>
      <dl className="text-note text-ink-2">
        {parts.map((part) => (
          <div key={part} className="mt-0.5">
            <dt className="inline font-semibold">
              {partLabels[part]}
              {neededParts.includes(part) && ' is missing'}.
            </dt>{' '}
            <dd className="inline">{partReasons[part]}</dd>
          </div>
        ))}
      </dl>
    </section>
  );
}

function Classes({ classes, layer }: Pick<GroundMarginProps, 'classes'> & { layer: Layer }) {
  const { site, mayKeepGround } = useSite();
  const table = { layer, rows: classes.rows, cellSize: site.grid.cellSize };
  const saved: readonly HabitatClass[] | undefined = mayKeepGround
    ? readRows(classes.rows)
    : (layer.classes ?? undefined);
  const files = (
    <ClassFiles
      classes={saved}
      fileName={`${site.name.replace(/[^\p{L}\p{N}]+/gu, '-').toLowerCase()}-classes.csv`}
      onImport={mayKeepGround ? classes.fill : undefined}
    />
  );
  if (!mayKeepGround)
    return classes.suggested ? (
      <p>No class table yet: a modeller or admin says what each class can hold.</p>
    ) : (
      <>
        <ClassList {...table} />
        {files}
      </>
    );
  return (
    <>
      <p className="mb-1.5 text-ink-2">
        {classes.suggested && 'No class table yet; this one is a suggestion. '}
        Capacity is the largest share of a cell that the plant can hold (0: cannot grow); vigour is growth as
        a share of growth on good ground.
      </p>
      <ClassTable {...table} onChange={classes.change} />
      {files}
      {classes.error !== null && <ProblemNotice error={classes.error} className="mt-2" />}
    </>
  );
}
