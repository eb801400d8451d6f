import type { Curve, LayerSource, LayerSources } from '#sim-core/spec/run-spec.ts';
import { featureEdgesSchema, type Feature } from './features.ts';
import { heightUnitScale, valueUnitScale, type Layer, type LayerPart } from './layers.ts';
import type { Site } from './sites.ts';

/** The layer that plays a part on a site; of resurveys that of a year. */
export const layerOf = (site: Pick<Site, 'layers'>, part: LayerPart, year?: number): Layer | undefined =>
  site.layers.find((layer) => layer.part === part && (year === undefined || layer.year === year));

/** The resurveys of a site, by year. */
export const resurveysOf = (site: Pick<Site, 'layers'>): (Layer & { year: number })[] =>
  site.layers
    .flatMap((layer) =>
      layer.part === 'resurvey' && layer.year !== null ? [{ ...layer, year: layer.year }] : [],
    )
    .toSorted((a, b) => a.year - b.year);

/**
 * What a site's ground is to the engine; each raster is named by its hash.
 *
 * - capacity, vigour: what the class of `habitat` says, times the curve of elevation;
 * - exposure: the highest of the layer `exposure` and the curve of elevation;
 * - refuge: the highest of the layer `refuge`, surveyed mounds (discs) and surveyed areas;
 * - fence: surveyed fences; cover: the layer `cover`, without which nothing stands.
 *
 * No data counts as 0 in every raster: ground without an elevation cannot hold the plant where capacity hangs on it.
 */
export function layerSources(
  site: Pick<Site, 'layers' | 'features' | 'elevationCurves'>,
): Required<LayerSources> {
  const habitat = layerOf(site, 'habitat');
  const elevation = layerOf(site, 'elevation');
  const { classes } = habitat ?? {};
  const ofClass = (of: 'capacity' | 'vigour'): LayerSource | undefined =>
    habitat && classes
      ? {
          layer: habitat.hash,
          classes: Object.fromEntries(classes.map((row) => [String(row.value), row[of]])),
        }
      : undefined;
  const byHeight = (curve: Curve | null): LayerSource | undefined => {
    if (!elevation || !curve) return undefined;
    const scale = heightUnitScale[elevation.vertical?.unit ?? 'metre'];
    return { layer: elevation.hash, ...(scale !== 1 && { scale }), curve };
  };
  const shares = (part: LayerPart): LayerSource | undefined => {
    const layer = layerOf(site, part);
    return layer && { layer: layer.hash, scale: valueUnitScale[layer.unit] };
  };
  const { capacity, vigour, exposure } = site.elevationCurves;
  return {
    capacity: product(ofClass('capacity'), byHeight(capacity)),
    vigour: product(ofClass('vigour'), byHeight(vigour)),
    exposure: highest(shares('exposure'), byHeight(exposure)),
    refuge: highest(shares('refuge'), ...moundsOf(site.features), ...areasOf(site.features, 'refuge')),
    fence: highest(...areasOf(site.features, 'fence')),
    cover: highest(shares('cover')),
  };
}

/** Where works may go: in the layer `allowed` or an allowed area; undefined where neither says, so that they may go anywhere. */
export function allowedSource(site: Pick<Site, 'layers' | 'features'>): LayerSource | undefined {
  const layer = layerOf(site, 'allowed');
  const shares: MaySource = layer && { layer: layer.hash, scale: valueUnitScale[layer.unit] };
  const sources = given([shares, ...areasOf(site.features, 'allowed')]);
  return sources.length > 0 ? highest(...sources) : undefined;
}

type MaySource = LayerSource | undefined;
const given = (sources: MaySource[]) => sources.filter((source) => source !== undefined);

function product(...sources: MaySource[]): LayerSource {
  const [first, ...others] = given(sources);
  return others.length > 0 ? { product: [first, ...others] } : (first ?? 1);
}

function highest(...sources: MaySource[]): LayerSource {
  const [first, ...others] = given(sources);
  return others.length > 0 ? { highest: [first, ...others] } : (first ?? 0);
}

/** Surveyed points that shelter, as mounds of an option would; a source for each rule that edges go by. */
function moundsOf(features: readonly Feature[]): MaySource[] {
  return edgeRules.map((rule) => {
    const mounds = features.flatMap(({ kind, shape, strength, halo, edges }) =>
      kind === 'refuge' && shape.shape === 'disc' && edges === rule
        ? [{ x: shape.x, y: shape.y, radius: shape.radius, strength, halo }]
        : [],
    );
    return mounds.length > 0 ? { mounds, ...sharing(rule) } : undefined;
  });
}

/** Areas of a kind; of refuges, those that are no mounds. */
function areasOf(features: readonly Feature[], of: Feature['kind']): MaySource[] {
  return edgeRules.map((rule) => {
    const areas = features.flatMap(({ kind, shape, strength, edges }) =>
      kind === of && edges === rule && (of !== 'refuge' || shape.shape === 'polygon')
        ? [{ area: shape, strength: of === 'allowed' ? 1 : strength }]
        : [],
    );
    return areas.length > 0 ? { areas, ...sharing(rule) } : undefined;
  });
}

const edgeRules = featureEdgesSchema.options;
const sharing = (rule: Feature['edges']) => (rule === 'shared' ? { edges: rule } : {});
