import { damaged } from '#rasters/read/raster-error.ts';

/** What GDAL's metadata says of a band. */
export interface BandMetadata {
  readonly name: string | null;
  readonly scale: number;
  readonly offset: number;
  readonly unit: string | null;
}

const nothing: BandMetadata = { name: null, scale: 1, offset: 0, unit: null };

/**
 * Reads the items of GDAL's metadata tag (42112) that have a role: the description, scale, offset and unit of each band,
 * by its number from 1. As XML they are flat, so no parser is needed: `<Item name="…" sample="0" role="scale">…</Item>`.
 * @throws RasterError `raster-truncated` at a scale or offset that is no number
 */
export function readGdalMetadata(xml: string | undefined): (band: number) => BandMetadata {
  const bands = new Map<number, BandMetadata>();
  for (const [, attributes, body] of (xml ?? '').matchAll(/<Item\b([^<>]*)>([^<]*)<\/Item>/g)) {
    const attribute = (name: string) => new RegExp(`\\b${name}="([^"]*)"`).exec(attributes)?.[1];
    const band = Number(attribute('sample') ?? NaN) + 1;
    const role = attribute('role');
    // GDAL escapes values once more before they go into the XML.
    const text = unescapeXml(unescapeXml(body)).trim();
    const known = bands.get(band) ?? nothing;
    if (!Number.isInteger(band) || text === '') continue;
    if (role === 'description') bands.set(band, { ...known, name: oneLine(text) });
    else if (role === 'unittype') bands.set(band, { ...known, unit: oneLine(text) });
    else if (role === 'scale') bands.set(band, { ...known, scale: finite(text, 'scale') });
    else if (role === 'offset') bands.set(band, { ...known, offset: finite(text, 'offset') });
  }
  return (band) => bands.get(band) ?? nothing;
}

function finite(text: string, what: 'scale' | 'offset'): number {
  const value = Number(text);
  if (!Number.isFinite(value) || (what === 'scale' && value === 0))
    throw damaged(`${what === 'scale' ? 'a scale' : 'an offset'} of “${text.slice(0, 40)}”`);
  return value;
}

const oneLine = (text: string): string =>
  text
    .replace(/[\p{C}\p{Z}]+/gu, ' ')
    .trim()
    .slice(0, 100);

const entities: Readonly<Record<string, string>> = {
  '&lt;': '<',
  '&gt;': '>',
  '&quot;': '"',
  '&apos;': "'",
  '&amp;': '&',
};
const unescapeXml = (text: string): string =>
  text.replace(/&(?:lt|gt|quot|apos|amp);/g, (entity) => entities[entity]);
