import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import { briefFacts } from '../printing/brief-facts.ts';
import { mapPicture } from '../printing/map-picture.ts';
import { writePdf } from '../printing/pdf/write-pdf.ts';
import type { BriefFactsTask, TaskResults, WriteBriefTask } from './raster-tasks.ts';
import { writeHashed } from './read-layer.ts';

/** Pixels of a map's longer side: few enough that the maps of eight options stay well under 5 MB. */
const longestOf = (options: number) => (options > 4 ? 640 : 960);

/** Works out a brief's figures and draws its maps. */
export async function makeBriefFacts({ source, maps }: BriefFactsTask): Promise<TaskResults['brief-facts']> {
  const { grid, plan } = source;
  const facts = briefFacts(source);
  const drawn: TaskResults['brief-facts']['maps'] = [];
  for (const map of maps) {
    if (!map) {
      drawn.push(null);
      continue;
    }
    const { values } = decodeCellValues(await readFile(map.path), { cells: grid.width * grid.height });
    const picture = mapPicture({
      width: grid.width,
      height: grid.height,
      closing: values as Int16Array,
      surveyYear: plan.common.surveyYear,
      years: plan.common.years,
      longest: longestOf(plan.options.length),
    });
    drawn.push(await writeHashed(map.outPath, picture));
  }
  return { facts, maps: drawn };
}

/** Writes a brief as PDF to `outPath`. */
export async function writeBrief({ brief, outPath }: WriteBriefTask): Promise<TaskResults['write-brief']> {
  const pages = await writePdf(outPath, brief);
  const bytes = await readFile(outPath);
  return { ...pages, hash: createHash('sha256').update(bytes).digest('hex'), bytes: bytes.length };
}
