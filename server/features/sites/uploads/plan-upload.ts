import { methodsFor } from '#rasters/align/methods.ts';
import { planAlignment } from '#rasters/align/plan-alignment.ts';
import { outlineOn } from '#rasters/align/outline.ts';
import { newGridFor, suggestGrid } from '#rasters/align/suggest-grid.ts';
import { RasterError } from '#rasters/read/raster-error.ts';
import { guessUnit } from '#rasters/read/summary.ts';
import type { LayerFacts, LayerPart, ResamplingMethod, ValueUnit, Vertical } from '#contract/layers.ts';
import type { RasterDescription, Upload, UploadChoices } from '#contract/uploads.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { maximumCells } from '#sim-core/spec/limits.ts';
import { contentOf, valueComplaint } from '#server/jobs/layer-facts.ts';

/** What an upload comes to with its present choices. */
export type UploadPlan = Pick<
  Upload,
  'plan' | 'suggestedGrid' | 'outline' | 'decisions' | 'heights' | 'problem'
>;

/** What is known of an upload whose band has been read. */
export interface SurveyedUpload {
  description: RasterDescription;
  facts: LayerFacts;
  /** the band that `facts` are about */
  band: number;
  choices: UploadChoices;
}

/**
 * What will be done with a raster, and what a person should look at first.
 * @param siteGrid null for a raster that a site is yet to be made from
 */
export function planUpload(upload: SurveyedUpload, siteGrid: Grid | null): UploadPlan {
  const { description, facts, band, choices } = upload;
  let suggestedGrid: Upload['suggestedGrid'] = null;
  const decisions: Upload['decisions'] = [];
  if (choices.part === null) decisions.push('part');
  if (choices.part === 'resurvey' && choices.year === null) decisions.push('year');
  if (choices.band === null && description.bands.filter(({ role }) => role === 'data').length > 1)
    decisions.push('band');
  const heights = heightsOf(upload);
  if (choices.part === 'elevation' && !choices.vertical && heights && heights.unit !== 'metre')
    decisions.push('heights');
  const complaint = choices.part && valueComplaint(choices.part, facts, unitOf(upload));
  if (complaint) decisions.push('values');
  try {
    if (!siteGrid) suggestedGrid = suggestGrid(description);
    const grid = siteGrid ?? chosenGrid(description, choices, suggestedGrid!.grid);
    const plan = planAlignment(description, {
      band,
      content: choices.part ? contentOf(choices.part) : facts.classCounts ? 'classes' : 'amounts',
      grid,
      method: usableMethod(choices),
    });
    if (plan.reprojection) decisions.push('reprojection');
    else if (plan.method !== 'copy') decisions.push('resampling');
    if (plan.cropped.cells > 0) decisions.push('crop');
    if (plan.padded.cells > 0) decisions.push('pad');
    const problem = complaint
      ? { code: 'raster-values' as const, detail: sentence(complaint), ...complaint }
      : null;
    return { plan, suggestedGrid, outline: outlineOn(description, grid), decisions, heights, problem };
  } catch (error) {
    if (!(error instanceof RasterError)) throw error;
    const { code, message, found, expected, remedy } = error;
    const problem = { code, detail: message, found, expected, remedy };
    return { plan: null, suggestedGrid, outline: null, decisions, heights, problem };
  }
}

const sentence = ({ found, expected, remedy }: { found: string; expected: string; remedy: string }) =>
  `Found ${found}; expected ${expected}. ${remedy}`;

/** How the values are read: as was chosen, else as they most likely are. */
export const unitOf = ({ choices, facts }: Pick<SurveyedUpload, 'choices' | 'facts'>): ValueUnit =>
  choices.unit ?? guessUnit(facts.dataType.startsWith('float'), facts.minimum, facts.maximum);

/** Whether a method fits what a part's values are. */
export const fitsPart = (method: ResamplingMethod, part: LayerPart): boolean =>
  methodsFor(contentOf(part)).some((fitting) => fitting === method);

/** A method that was chosen for another part means nothing for this one. */
const usableMethod = ({ method, part }: UploadChoices): ResamplingMethod | undefined =>
  method && part && fitsPart(method, part) ? method : undefined;

/** @throws RasterError `raster-crs`, `raster-too-large` */
function chosenGrid(description: RasterDescription, { grid: chosen }: UploadChoices, suggested: Grid): Grid {
  const same = !chosen || (chosen.epsg === suggested.epsg && chosen.cellSize === suggested.cellSize);
  const grid = same ? suggested : newGridFor(description, chosen.epsg, chosen.cellSize);
  if (grid.width * grid.height > maximumCells)
    throw new RasterError('raster-too-large', {
      found: `${grid.width} × ${grid.height} cells of ${grid.cellSize} m`,
      expected: `at most ${maximumCells} cells`,
      remedy: 'Choose larger cells, or clip the raster to the site (gdal_translate -projwin).',
    });
  return grid;
}

/**
 * What heights are most likely in, and what of the file says so: the unit that the band carries, the vertical system, or, as
 * the weakest, coordinates in feet. Null where nothing does.
 */
export function heightsOf({
  description,
  band,
}: {
  description: Pick<RasterDescription, 'heightUnit'> & {
    bands: readonly Pick<RasterDescription['bands'][number], 'unit'>[];
    crs: Pick<RasterDescription['crs'], 'unit'>;
  };
  /** from 1 */
  band: number;
}): Upload['heights'] {
  const written = description.bands[band - 1].unit?.trim() ?? '';
  const named = written.toLowerCase();
  if (/^(ft|foot|feet)\b|\bf(oo|ee)t\b|^ft/.test(named))
    return { unit: /us|survey/.test(named) ? 'us-foot' : 'foot', because: `its unit is “${written}”` };
  if (/^(m|metres?|meters?)$/.test(named)) return { unit: 'metre', because: `its unit is “${written}”` };
  const { heightUnit, crs } = description;
  if (heightUnit) return { unit: heightUnit, because: 'its vertical system says so' };
  if (crs.unit === 'foot' || crs.unit === 'us-foot')
    return { unit: crs.unit, because: 'its coordinates are in feet' };
  return null;
}

/** How heights are read: as was chosen, else as the file says, else in metres. Feet are asked about before they are placed. */
export const verticalOf = (upload: SurveyedUpload): Vertical =>
  upload.choices.vertical ?? { datum: '', unit: heightsOf(upload)?.unit ?? 'metre' };
