import type { Run } from '#contract/runs.ts';
import { mapRasters, type LayerSource, type RasterSource, type RunSpec } from '#sim-core/spec/run-spec.ts';

type RunLayer = Pick<Run['layers'][number], 'hash' | 'part' | 'fileName' | 'sourceHash'>;

/** Folder of the rasters beside the spec, so that none can take the place of another part of the package. */
const folder = 'rasters';

/**
 * Where each raster of a run lies beside its spec, by hash. A file that was brought onto the grid has other bytes than the
 * file as it came, so it gets another name; part or hash tell equal names apart.
 */
export function rasterPaths(layers: readonly RunLayer[]): Map<string, string> {
  const taken = new Set<string>();
  return new Map(
    layers.map((layer) => {
      const name = rasterName(layer);
      const names = [name, `${layer.part}-${name}`, `${layer.hash.slice(0, 12)}-${name}`];
      const free = names.find((one) => !taken.has(one.toLowerCase())) ?? layer.hash;
      taken.add(free.toLowerCase());
      return [layer.hash, `${folder}/${free}`];
    }),
  );
}

/** A name that every file system takes, close to that of the file as it came. */
function rasterName({ hash, fileName, sourceHash }: RunLayer): string {
  const [, stem, ending] = /^(.*?)(\.tiff?)?$/i.exec(fileName) ?? [];
  const safe = stem
    .normalize('NFC')
    .replace(/[^\p{L}\p{N} ._-]+/gu, '-')
    .replace(/^[ ._-]+|[ .]+$/g, '');
  return `${safe || 'raster'}${hash === sourceHash ? '' : '-on-grid'}${ending ?? '.tif'}`;
}

/**
 * The spec of a run as the command line takes it: each raster by its path and its SHA-256 instead of its hash alone, with
 * the same mapping.
 * @throws Error where the spec names a raster that is not among `layers`
 */
export function specForFiles(spec: RunSpec, layers: readonly RunLayer[]): RunSpec {
  const paths = rasterPaths(layers);
  const named = (source: RasterSource): RasterSource => {
    if ('file' in source) return source;
    const { layer, ...mapping } = source;
    const file = paths.get(layer);
    if (file === undefined)
      throw new Error(`Found the raster ${layer} in the spec; expected one of the run's layers.`);
    return { file, sha256: layer, ...mapping };
  };
  const onFile = (source: LayerSource) => mapRasters(source, named);
  const { capacity, vigour, exposure, refuge, fence, cover } = spec.layers;
  return {
    ...spec,
    layers: {
      capacity: onFile(capacity),
      vigour: onFile(vigour),
      exposure: onFile(exposure),
      refuge: onFile(refuge),
      fence: onFile(fence),
      cover: onFile(cover),
    },
  };
}
