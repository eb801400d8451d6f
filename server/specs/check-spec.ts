import type { Grid } from '#sim-core/grid/grid.ts';
import { gridProblems } from '#sim-core/run/grid-problems.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import { rasterSources, type RunSpec } from '#sim-core/spec/run-spec.ts';
import type { Manager } from '#server/database/manager.ts';
import { foreignHashes } from './site-layers.repository.ts';

const named = (spec: RunSpec) =>
  Object.entries(spec.layers).flatMap(([name, source]) =>
    rasterSources(source).map(({ at, raster }) => ({ field: `spec.layers.${name}${at}`, raster })),
  );

/** The uploaded rasters that a spec names, each at its field. */
export const layerHashes = (spec: RunSpec): { field: string; hash: string; band: number | undefined }[] =>
  named(spec).flatMap(({ field, raster }) =>
    'layer' in raster ? [{ field, hash: raster.layer, band: raster.band }] : [],
  );

/** What is wrong with the layers of a spec that should run on a site; empty when nothing is. */
export async function checkLayers(manager: Manager, siteId: string, spec: RunSpec): Promise<FieldProblem[]> {
  const problems: FieldProblem[] = [];
  for (const { field, raster } of named(spec))
    if ('file' in raster)
      problems.push({
        field: `${field}.file`,
        message:
          'Found a file; runs of a site take its uploaded layers, named by the SHA-256 of their raster on the grid in `layer`' +
          (raster.sha256 ? `: "layer": "${raster.sha256}"` : ''),
      });
  const used = layerHashes(spec);
  const foreign = await foreignHashes(
    manager,
    siteId,
    used.map(({ hash }) => hash),
  );
  for (const { field, hash, band } of used) {
    if (foreign.has(hash))
      problems.push({
        field: `${field}.layer`,
        message: `No layer of this site has the SHA-256 ${hash.slice(0, 12)}… on the cells that it has now; it was replaced or never uploaded. Load the site again`,
      });
    if (band !== undefined && band !== 1)
      problems.push({ field: `${field}.band`, message: `Found band ${band}; uploaded layers have one band` });
  }
  return problems;
}

/** What makes a spec impossible on a grid, whatever its layers hold; empty when nothing does. */
export const checkOnGrid = (spec: RunSpec, grid: Grid): FieldProblem[] =>
  gridProblems(spec, grid).map(({ field, message }) => ({ field: `spec.${field}`, message }));
