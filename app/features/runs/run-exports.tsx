import { exportClosing, exportFrame, exportSeries, type Run } from '#contract/runs.ts';
import { WordAnchor, WordButton } from '#app/components/word-button.tsx';
import { endpointUrl } from '#app/lib/api-client.ts';
import { saveFile } from '#app/lib/save-file.ts';
import { fileNames, specForFiles } from './spec-for-files.ts';

/** What can be taken away from a run. */
export function RunExports({ run, year }: { run: Run; year: number | undefined }) {
  const params = { runId: run.id };
  const names = fileNames(run.layers);
  return (
    <section aria-label="Take away" className="border-t border-rule py-2">
      <h2 className="text-body font-bold">Take away</h2>
      <div className="flex flex-wrap gap-x-4">
        {run.result && (
          <WordAnchor href={endpointUrl(exportSeries, { params })} download>
            Series, CSV
          </WordAnchor>
        )}
        {year !== undefined && (
          <WordAnchor href={endpointUrl(exportFrame, { params: { ...params, year } })} download>
            Cover in {year}, GeoTIFF
          </WordAnchor>
        )}
        {run.hasClosing && (
          <WordAnchor href={endpointUrl(exportClosing, { params })} download>
            Closing years, GeoTIFF
          </WordAnchor>
        )}
        <WordButton lined onClick={() => downloadSpec(run)}>
          RunSpec, JSON
        </WordButton>
      </div>
      {run.layers.length > 0 && (
        <p className="text-note break-words text-ink-2">
          The RunSpec runs from the command line with its rasters beside it, under these names:{' '}
          {run.layers.map(({ part, hash }) => `${names.get(hash)} (${part})`).join(', ')}.
        </p>
      )}
    </section>
  );
}

/** The spec is at hand already, so it is written to a file without asking the server. */
function downloadSpec(run: Run): void {
  const json = JSON.stringify(specForFiles(run.spec, run.layers), null, 2);
  saveFile(
    `${run.name.replace(/[^\p{L}\p{N}]+/gu, '-').toLowerCase()}-spec.json`,
    new Blob([json], { type: 'application/json' }),
  );
}
