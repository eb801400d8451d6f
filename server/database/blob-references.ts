import type { EntityManager } from 'typeorm';

/** Every column that names a blob. Whatever stands in none of them may be deleted. */
const references = [
  ['layer', 'hash'],
  ['layer', 'valuesHash'],
  ['layer', 'sourceHash'],
  ['upload', 'hash'],
  ['upload', 'thumbnailHash'],
  ['feature_import', 'hash'],
  ['run_frame', 'hash'],
  ['run', 'closingHash'],
  ['ensemble_map', 'hash'],
  ['brief_version', 'pdfHash'],
  ['brief_map', 'hash'],
] as const;

const anyReference = references
  .map(([table, column]) => `EXISTS (SELECT 1 FROM "${table}" WHERE "${column}" = ?)`)
  .join(' OR ');

/** Those of `hashes` that no row refers to. */
export async function unreferencedHashes(
  manager: EntityManager,
  hashes: Iterable<string>,
): Promise<string[]> {
  const free: string[] = [];
  for (const hash of new Set(hashes)) {
    const rows: unknown[] = await manager.query(
      `SELECT 1 WHERE ${anyReference}`,
      references.map(() => hash),
    );
    if (rows.length === 0) free.push(hash);
  }
  return free;
}
