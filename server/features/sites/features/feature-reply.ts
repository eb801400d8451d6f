import { featureEdgesSchema, featureKindSchema, type Feature } from '#contract/features.ts';
import { areaSchema } from '#sim-core/spec/run-spec.ts';
import type { FeatureImportRow } from '#server/database/entities/feature-import.ts';
import type { FeatureRow } from '#server/database/entities/feature.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { featureRows, importRows } from './feature.repository.ts';

/** The rule that the edges of a feature go by: that of its file, but for allowed ground. */
export const edgesOf = (kind: string, edges: string): Feature['edges'] =>
  kind === 'allowed' ? 'centre' : featureEdgesSchema.parse(edges);

const featureOf = (row: FeatureRow, file: FeatureImportRow): Feature => ({
  id: row.id,
  kind: featureKindSchema.parse(row.kind),
  name: row.name,
  shape: readJson(areaSchema, row.shape),
  strength: row.strength,
  halo: row.halo,
  edges: edgesOf(row.kind, file.edges),
  source: {
    importId: row.importId,
    fileName: file.fileName,
    hash: file.hash,
    row: row.row,
    crsName: file.crsName,
    importedAt: file.importedAt,
    importedBy: file.importedBy,
  },
});

/** The features of a site, in the order of their files and rows. */
export async function featuresOfSite(manager: Manager, siteId: string): Promise<Feature[]> {
  const files = await importRows(manager, siteId);
  const order = new Map(files.map((file, i) => [file.id, i]));
  return (await featureRows(manager, siteId))
    .sort((a, b) => order.get(a.importId)! - order.get(b.importId)! || a.row - b.row)
    .map((row) => featureOf(row, files[order.get(row.importId)!]));
}
