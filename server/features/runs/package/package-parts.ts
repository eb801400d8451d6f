import type { Run } from '#contract/runs.ts';
import type { ZipPart } from '#server/files/zip-stream.ts';
import type { BlobStore } from '#server/files/blob-store.ts';
import { rasterPaths, specForFiles } from './spec-for-files.ts';

/** The spec of a run as the JSON text that the command line reads. */
export const specText = (run: Run): string =>
  `${JSON.stringify(specForFiles(run.spec, run.layers), null, 2)}\n`;

/**
 * Everything that somebody needs to run a run again: the spec, the rasters that it stood on under the names that the spec
 * uses, and what it is about in words.
 * @throws BlobMissing before anything is sent, where a raster is not there
 */
export async function packageParts(
  blobs: BlobStore,
  run: Run,
  { siteName, invented }: { siteName: string; invented: boolean },
): Promise<ZipPart[]> {
  const rasters = [...rasterPaths(run.layers)].map(async ([hash, path]) => {
    const bytes = await blobs.size(hash);
    return { path, bytes, open: async () => (await blobs.open(hash)).stream };
  });
  return [
    textPart('README.txt', readme(run, siteName, invented)),
    textPart('spec.json', specText(run)),
    ...(await Promise.all(rasters)),
  ];
}

function textPart(path: string, text: string): ZipPart {
  const bytes = Buffer.from(text, 'utf8');
  return { path, bytes: bytes.length, open: () => [bytes] };
}

function readme(run: Run, siteName: string, invented: boolean): string {
  const paths = rasterPaths(run.layers);
  const rasters = run.layers.flatMap(({ hash, part, fileName, sourceHash }) => [
    `${paths.get(hash)}  (${part})`,
    `  raster on the grid, SHA-256 ${hash}`,
    hash === sourceHash
      ? `  this is the file as it came, ${fileName}`
      : `  made from the file ${fileName}, SHA-256 as it came ${sourceHash}; that file lies on other cells and gives another digest`,
  ]);
  return [
    `${run.name}, ${siteName}: one simulated future`,
    ...(invented ? ['Invented place, people and data.'] : []),
    '',
    'To run it again, in the folder of Foothold, with this package unpacked in FOLDER:',
    '  npm run simulate -- FOLDER/spec.json --out FOLDER/result',
    run.result && run.digest !== null
      ? `Made by engine ${run.result.engineVersion}. The digest in FOLDER/result/summary.json must be\n  ${run.digest}`
      : `The run is ${run.status}, so there is no digest yet to compare with.`,
    'A raster with other bytes is refused: the spec carries the SHA-256 of each.',
    '',
    ...rasters,
    '',
    'A simulation supports a decision; it is no permit, survey or engineering design. Intertidal field work needs tide,',
    'weather and mud precautions; moving bivalves or plants can need permits and biosecurity checks. Follow local codes and',
    'licensed practice.',
    '',
  ].join('\n');
}
