/** First codes of UTM zones in the EPSG register: code = base + zone. */
const bases: readonly { readonly pattern: RegExp; readonly north: number; readonly south?: number }[] = [
  { pattern: /^WGS[ _]?(?:19)?84$/i, north: 32600, south: 32700 },
  { pattern: /^NAD[ _]?(?:19)?83$/i, north: 26900 },
  { pattern: /^ETRS[ _]?(?:19)?89$/i, north: 25800 },
];

/**
 * EPSG code of a UTM zone that a file names without its code, such as `WGS_1984_UTM_Zone_17N` or
 * `WGS 84 / UTM zone 17N`, or undefined.
 * @param meridian the central meridian that the file spells out, which must be the zone's
 */
export function utmByName(name: string | undefined, meridian: number | undefined): number | undefined {
  const said = /^(.+?)[ _]*(?:\/[ _]*)?UTM[ _]zone[ _](\d{1,2})[ _]?([NS])$/i.exec(name ?? '');
  if (!said) return undefined;
  const [, datum, digits, side] = said;
  const zone = Number(digits);
  const base = bases.find(({ pattern }) => pattern.test(datum))?.[
    side.toUpperCase() === 'N' ? 'north' : 'south'
  ];
  if (base === undefined || zone < 1 || zone > 60) return undefined;
  if (meridian !== undefined && Math.abs(meridian - (6 * zone - 183)) > 1e-6) return undefined;
  return base + zone;
}
