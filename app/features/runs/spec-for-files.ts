import type { Run } from '#contract/runs.ts';
import { mapRasters, type LayerSource, type RasterSource, type RunSpec } from '#sim-core/spec/run-spec.ts';

type RunLayer = Pick<Run['layers'][number], 'hash' | 'part' | 'fileName'>;

/** The name under which each raster of a run lies beside its spec, by hash; the part tells equal file names apart. */
export function fileNames(layers: readonly RunLayer[]): Map<string, string> {
  const times = (name: string) =>
    layers.filter(({ fileName }) => fileName.toLowerCase() === name.toLowerCase()).length;
  return new Map(
    layers.map(({ hash, part, fileName }) => [hash, times(fileName) > 1 ? `${part}-${fileName}` : fileName]),
  );
}

/**
 * The spec of a run as the command line takes it: each raster by the name of its file instead of its hash, with the same
 * mapping.
 * @throws Error where the spec names a raster that is not among `layers`
 */
export function specForFiles(spec: RunSpec, layers: readonly RunLayer[]): RunSpec {
  const names = fileNames(layers);
  const named = (source: RasterSource): RasterSource => {
    if ('file' in source) return source;
    const { layer, ...mapping } = source;
    const file = names.get(layer);
    if (file === undefined)
      throw new Error(`Found the raster ${layer} in the spec; expected one of the run's layers.`);
    return { file, ...mapping };
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
