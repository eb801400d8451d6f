import {
  exportClosing,
  exportFrame,
  exportPackage,
  exportSeries,
  exportSpec,
  type Run,
} from '#contract/runs.ts';
import { WordAnchor } from '#app/components/word-button.tsx';
import { endpointUrl } from '#app/lib/api-client.ts';

/** What can be taken away from a run. */
export function RunExports({ run, year }: { run: Run; year: number | undefined }) {
  const params = { runId: run.id };
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
        <WordAnchor href={endpointUrl(exportPackage, { params })} download>
          Spec with rasters, ZIP
        </WordAnchor>
        <WordAnchor href={endpointUrl(exportSpec, { params })} download>
          RunSpec, JSON
        </WordAnchor>
      </div>
      <p className="text-note text-ink-2">
        Cover is kept in steps of 1/255, so this GeoTIFF holds it rounded to them; from the command line it
        comes unrounded. Unpacked, the ZIP runs from the command line as it stands and comes to the same
        digest. The RunSpec by itself names the same rasters, each with its SHA-256, and refuses any other: a
        file as it was uploaded need not be the raster that was made of it on the grid.
      </p>
    </section>
  );
}
