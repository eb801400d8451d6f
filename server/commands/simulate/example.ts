import { mkdir, readFile, rename, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { demoClasses, habitatValue } from '#rasters/demo/classes.ts';
import { demoMounds, demoRasters, demoSurveyYear } from '#rasters/demo/sallow-reach.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { runSpecVersion, type RunSpecInput } from '#sim-core/spec/run-spec.ts';

/** Invented, like the place: wetter and drier years, a drought every eight or so. Palmer scale. */
const inventedDrought = [
  0.4, -0.8, 1.2, 0.6, -0.3, -1.1, 0.2, -2.9, -1.4, 0.8, 1.5, 0.1, -0.6, 0.9, -0.2, -3.4, -2.1, -0.5, 0.7,
  1.1, 0.3, -1.2, 0.5, -2.6, 0.2,
];
/** Invented: chronic stress by habitat class. */
const exposureByClass = { [habitatValue.bank]: 0.3, [habitatValue.high]: 0.4, [habitatValue.levee]: 0.1 };

/**
 * A complete spec on the invented site's rasters, which it writes into `folder` where they are missing or of another
 * version. It names them by absolute path, so it can be saved anywhere.
 */
export async function exampleSpec(folder: string): Promise<RunSpecInput> {
  await mkdir(folder, { recursive: true });
  const paths: Record<string, string> = {};
  for (const { name, fileName, bytes } of demoRasters()) {
    const path = (paths[name] = join(folder, fileName));
    const there = await readFile(path).catch(() => undefined);
    if (there?.equals(bytes)) continue;
    await writeFile(`${path}.partial`, bytes);
    await rename(`${path}.partial`, path);
  }
  const byClass = (of: 'capacity' | 'vigour') => ({
    file: paths.habitat,
    classes: Object.fromEntries(demoClasses.map((row) => [String(row.value), row[of]])),
  });
  return {
    version: runSpecVersion,
    mode: 'counts',
    seed: 'sallow reach',
    replicate: 0,
    surveyYear: demoSurveyYear,
    years: inventedDrought.length,
    stepsPerYear: 1,
    boundary: 'mirror',
    rates: defaultRates,
    processes: {},
    droughtIndex: inventedDrought,
    actions: demoMounds().map(({ x, y }) => ({
      kind: 'mound' as const,
      year: demoSurveyYear + 2,
      x,
      y,
      radius: 2,
      strength: 1,
      halo: 2,
    })),
    target: 0.9,
    layers: {
      capacity: byClass('capacity'),
      vigour: byClass('vigour'),
      exposure: { file: paths.habitat, classes: exposureByClass },
      refuge: { file: paths.refuge },
      fence: 0,
      cover: { file: paths.cover },
    },
    reportYears: [0, 5, 10, 15, 20, 25].map((years) => demoSurveyYear + years),
  };
}
