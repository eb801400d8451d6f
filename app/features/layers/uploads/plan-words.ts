import type { HeightUnit, ResamplingMethod } from '#contract/layers.ts';
import type { Upload } from '#contract/uploads.ts';
import { heightUnitLabels } from '../part-words.ts';
import { formatCount, formatCounted, formatLength, formatNumber, formatShare } from '#app/lib/formats.ts';

type Description = NonNullable<Upload['description']>;
type Plan = NonNullable<Upload['plan']>;

export const methodLabels: Record<ResamplingMethod, string> = {
  copy: 'the cell of the file beneath it',
  nearest: 'the nearest cell',
  bilinear: 'the four cells around, by distance',
  'area-weighted': 'all cells beneath, by area',
  majority: 'the commonest class beneath, by area',
};

const crsInWords = ({ name, epsg }: Description['crs']) => (epsg === null ? name : `${name} (EPSG:${epsg})`);

/** CRS, cells and bands of a file, in a sentence. */
export function fileInWords({
  width,
  height,
  crs,
  cellWidth,
  cellHeight,
  cellMetres,
  bands,
}: Description): string {
  const degrees = crs.unit === 'degree';
  const side = (size: number, metres: number) =>
    degrees ? `${formatNumber(size, 6)}° (about ${formatLength(metres)})` : formatLength(metres);
  const sides =
    Math.abs(cellWidth - cellHeight) < 1e-6 * cellWidth
      ? side(cellWidth, cellMetres.width)
      : `${side(cellWidth, cellMetres.width)} by ${side(cellHeight, cellMetres.height)}`;
  const kind = degrees ? 'In degrees: ' : crs.unit === 'metre' ? '' : 'In feet: ';
  const more = bands.length > 1 ? `; ${formatCounted(bands.length, 'band')}` : '';
  return `${kind}${crsInWords(crs)}; ${formatCount(width)} × ${formatCount(height)} cells of ${sides}${more}.`;
}

/** `under 1 %` begins a sentence with a capital. */
const atStart = (words: string) => words[0].toUpperCase() + words.slice(1);

/**
 * What will be done to bring the file onto the grid, and what is lost by it, a sentence each.
 * @param heights what its values are heights in, where they are heights
 */
export function planInWords(plan: Plan, heights?: HeightUnit): string[] {
  if (plan.sameCells)
    return [
      heights === undefined || heights === 'metre'
        ? 'It lies on the cells of the site and is taken as it is, bit for bit.'
        : `It lies on the cells of the site: the file is kept bit for bit, and its heights are read as ${heightUnitLabels[heights]} and counted in metres wherever they are used.`,
    ];
  const { reprojection, cropped, padded, scaling, cautions } = plan;
  const words: string[] = [];
  if (reprojection)
    words.push(`It is brought from ${crsInWords(reprojection.from)} to ${crsInWords(reprojection.to)}.`);
  if (cropped.cells > 0)
    words.push(
      `${atStart(formatShare(cropped.share))} of the file lies outside the site and is left out (${formatCounted(cropped.cells, 'cell')}).`,
    );
  if (padded.cells > 0)
    words.push(
      `${atStart(formatShare(padded.share))} of the site is not reached and gets no data (${formatCounted(padded.cells, 'cell')}).`,
    );
  if (cropped.cells === 0 && padded.cells === 0) words.push('It covers the site exactly.');
  if (scaling)
    words.push(
      `The file says value = stored number × ${formatNumber(scaling.scale, 6)} + ${formatNumber(scaling.offset, 6)}, and is read so.`,
    );
  return [...words, ...cautions.map(({ text }) => text)];
}

type Stated = Pick<Upload, 'state' | 'plan' | 'choices' | 'problem' | 'decisions'>;

/** Whether an upload can become a layer as it stands. */
export const isReady = ({ state, plan, choices, problem, decisions }: Stated): boolean =>
  state === 'choices' &&
  plan !== null &&
  problem === null &&
  choices.part !== null &&
  !(['part', 'band', 'heights', 'year', 'values'] as const).some((open) => decisions.includes(open));

const openWords = {
  part: 'which part it plays',
  band: 'which band to read',
  heights: 'what its heights are in',
  year: 'the year it was surveyed in',
  values: 'what its values are',
} as const;

/** What must still be said of an upload before it can become a layer, each by name. */
export const missingWords = ({ choices, decisions }: Pick<Upload, 'choices' | 'decisions'>): string[] =>
  (['part', 'band', 'heights', 'year', 'values'] as const)
    .filter((open) => decisions.includes(open) || (open === 'part' && choices.part === null))
    .map((open) => openWords[open]);

/** Of the uploads, those that nobody has to look at again before they are placed, each with a part of its own. */
export function clearUploads<T extends Stated>(uploads: readonly T[]): T[] {
  const roleOf = ({ choices }: T) => `${choices.part} ${choices.part === 'resurvey' ? choices.year : ''}`;
  const asked = uploads.filter(({ state }) => state === 'choices').map(roleOf);
  return uploads.filter(
    (upload) =>
      isReady(upload) &&
      upload.decisions.length === 0 &&
      asked.filter((role) => role === roleOf(upload)).length === 1,
  );
}
