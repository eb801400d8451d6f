import { In } from 'typeorm';
import { LayerEntity } from '#server/database/entities/layer.ts';
import type { Manager } from '#server/database/manager.ts';

/** Those of `hashes` that are no layer of the site, present or replaced. */
export async function foreignHashes(
  manager: Manager,
  siteId: string,
  hashes: readonly string[],
): Promise<Set<string>> {
  const known = await manager.find(LayerEntity, {
    where: { siteId, hash: In([...hashes]) },
    select: { hash: true },
  });
  const foreign = new Set(hashes);
  for (const { hash } of known) foreign.delete(hash);
  return foreign;
}
