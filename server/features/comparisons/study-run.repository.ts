import { In } from 'typeorm';
import {
  StudyRunEntity,
  type EnsembleAddress,
  type StudyRunRow,
} from '#server/database/entities/comparison-parts.ts';
import type { Manager } from '#server/database/manager.ts';

export const countStudyRuns = (manager: Manager, address: EnsembleAddress): Promise<number> =>
  manager.countBy(StudyRunEntity, { ...address });

/** Of these keys, those that are stored. */
export const storedStudyRuns = (
  manager: Manager,
  address: EnsembleAddress,
  keys: readonly string[],
): Promise<StudyRunRow[]> => manager.findBy(StudyRunEntity, { ...address, key: In([...keys]) });

export async function insertStudyRuns(manager: Manager, rows: StudyRunRow[]): Promise<void> {
  if (rows.length > 0) await manager.insert(StudyRunEntity, rows);
}

/** In the order in which they came. */
export const studyRunsOf = (
  manager: Manager,
  address: EnsembleAddress,
  { offset, limit }: { offset: number; limit: number },
): Promise<[StudyRunRow[], number]> =>
  manager.findAndCount(StudyRunEntity, {
    where: { ...address },
    order: { place: 'ASC' },
    skip: offset,
    take: limit,
  });
