import type { Site } from '#contract/sites.ts';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import type { CellValues, Ground } from '#sim-core/grid/ground.ts';
import { buildGround } from '#sim-core/index.ts';
import type { LayerSources } from '#sim-core/spec/run-spec.ts';
import { findLayerByHash } from '../features/sites/layer.repository.ts';
import type { Services } from '../services.ts';

/** The decoded values of a site's layer. */
export async function layerValues(services: Services, siteId: string, hash: string): Promise<CellValues> {
  const layer = await findLayerByHash(services.dataSource.manager, siteId, hash);
  if (!layer) throw new Error(`The demo has lost its layer ${hash}.`);
  return decodeCellValues(await services.blobs.read(layer.valuesHash)).values;
}

/** What the runs of a site stand on, by the sources that their specification names. */
export async function demoGround(services: Services, site: Site, sources: LayerSources): Promise<Ground> {
  const rasters = new Map<string, { values: CellValues; noData: number | null }>();
  for (const { hash, noData } of site.layers)
    rasters.set(hash, { values: await layerValues(services, site.id, hash), noData });
  return buildGround(sources, site.grid, (source) => {
    if (!('layer' in source)) throw new Error('The demo runs on uploaded layers alone.');
    return rasters.get(source.layer)!;
  });
}
