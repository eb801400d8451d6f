import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Runs learn when they lost again what they had recovered; for runs that are kept already it is read off their series. */
export class LostYear1764576000000 implements MigrationInterface {
  name = 'LostYear1764576000000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE "run" ADD COLUMN "lostYear" integer`);
    // As `lostYear` in sim-core/measure says it: only a row at the end of a year has a whole number for its time.
    await runner.query(`UPDATE "run" SET "lostYear" = (
      SELECT MIN(CAST(json_extract(row.value, '$.time') AS integer)) FROM json_each("run"."result", '$.series') AS row
      WHERE json_extract(row.value, '$.time') = CAST(json_extract(row.value, '$.time') AS integer)
        AND json_extract(row.value, '$.time') >= "run"."recoveredYear"
        AND json_extract(row.value, '$.recoveredShare') < json_extract("run"."spec", '$.target')
    ) WHERE "recoveredYear" IS NOT NULL AND "result" IS NOT NULL`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE "run" DROP COLUMN "lostYear"`);
  }
}
