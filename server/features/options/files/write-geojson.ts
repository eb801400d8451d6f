import type { Option } from '#contract/options.ts';
import type { Work } from '#contract/works.ts';
import type { Area } from '#sim-core/spec/run-spec.ts';
import type { OptionFeature, OptionGeoJson } from './geojson-format.ts';
import { inDegrees, projectionBetween, wgs84, type Point } from '#server/files/place-projection.ts';

/**
 * An option as GeoJSON, in WGS 84 with nine decimals (a tenth of a millimetre), or in the site's own CRS with all digits.
 */
export function optionGeoJson(
  option: Pick<Option, 'name' | 'note' | 'works' | 'sets'>,
  siteEpsg: number,
  crs: 'wgs84' | 'site',
): OptionGeoJson {
  const { fromSite } = projectionBetween(wgs84, siteEpsg);
  const place = (point: Point): [number, number] =>
    crs === 'site' ? [point[0], point[1]] : inDegrees(fromSite(point));
  return {
    type: 'FeatureCollection',
    foothold: {
      format: 'option',
      version: 1,
      name: option.name,
      note: option.note,
      sets: option.sets,
      siteCrs: `EPSG:${siteEpsg}`,
    },
    ...(crs === 'site' && {
      crs: { type: 'name' as const, properties: { name: `urn:ogc:def:crs:EPSG::${siteEpsg}` } },
    }),
    features: option.works.map((work) => featureOf(work, place)),
  };
}

type Place = (point: Point) => [number, number];

function featureOf(work: Work, place: Place): OptionFeature {
  const { id, kind, name, set, year } = work;
  const shared = { year, ...(name !== undefined && { name }), ...(set !== undefined && { set }) };
  const feature = <G, P>(geometry: G, properties: P) => ({
    type: 'Feature' as const,
    id,
    geometry,
    properties: { kind, ...shared, ...properties },
  });
  switch (work.kind) {
    case 'mound': {
      const { radius, strength, halo } = work;
      return feature(pointAt(place([work.x, work.y])), { radius, strength, halo });
    }
    case 'clumps': {
      const coordinates = work.points.map(place);
      return feature({ type: 'MultiPoint' as const, coordinates }, { each: work.each });
    }
    case 'planting':
      return feature(geometryOf(work.area, place), { ...radiusOf(work.area), cover: work.cover });
    case 'fence': {
      const until = work.until === undefined ? {} : { until: work.until };
      return feature(geometryOf(work.area, place), {
        ...radiusOf(work.area),
        strength: work.strength,
        ...until,
      });
    }
    case 'loss':
      return feature(geometryOf(work.area, place), { ...radiusOf(work.area), share: work.share });
  }
}

const pointAt = (coordinates: [number, number]) => ({ type: 'Point' as const, coordinates });

const radiusOf = (area: Area) => (area.shape === 'disc' ? { radius: area.radius } : {});

function geometryOf(area: Area, place: Place) {
  if (area.shape === 'disc') return pointAt(place([area.x, area.y]));
  // RFC 7946, section 3.1.6: an outer ring runs anticlockwise, a hole clockwise. Each keeps its first corner.
  const turned = (corners: readonly [number, number][], way: 1 | -1) => {
    const ring = corners.map(place);
    const right = signedArea(ring) * way < 0 ? [ring[0], ...ring.slice(1).reverse()] : ring;
    return [...right, ring[0]];
  };
  const holes = (area.holes ?? []).map((hole) => turned(hole, -1));
  return { type: 'Polygon' as const, coordinates: [turned(area.ring, 1), ...holes] };
}

const signedArea = (ring: readonly (readonly [number, number])[]): number =>
  ring.reduce((sum, [x, y], i) => {
    const [nextX, nextY] = ring[(i + 1) % ring.length];
    return sum + (x * nextY - nextX * y) / 2;
  }, 0);
