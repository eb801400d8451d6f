import type { MigrationInterface, QueryRunner } from 'typeorm';

const up = [
  `CREATE TABLE "drought_record" (
    "id" text PRIMARY KEY NOT NULL,
    "siteId" text NOT NULL,
    "record" text NOT NULL,
    "fileName" text NOT NULL,
    "uploadedAt" text NOT NULL,
    "uploadedBy" text NOT NULL,
    "replacedAt" text,
    CONSTRAINT "drought_record_site" FOREIGN KEY ("siteId") REFERENCES "site" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
  )`,
  `CREATE INDEX "drought_record_by_site" ON "drought_record" ("siteId")`,
  `ALTER TABLE "site" ADD COLUMN "otherOutlooks" text`,
  `ALTER TABLE "run" ADD COLUMN "cautions" text NOT NULL DEFAULT ('[]')`,
  `ALTER TABLE "comparison" ADD COLUMN "cautions" text NOT NULL DEFAULT ('[]')`,
];

/** Several outlooks a site, its drought record, and what was cautioned when a run or a comparison was started. */
export class Outlooks1796140000000 implements MigrationInterface {
  name = 'Outlooks1796140000000';

  async up(runner: QueryRunner): Promise<void> {
    for (const statement of up) await runner.query(statement);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE "comparison" DROP COLUMN "cautions"`);
    await runner.query(`ALTER TABLE "run" DROP COLUMN "cautions"`);
    await runner.query(`ALTER TABLE "site" DROP COLUMN "otherOutlooks"`);
    await runner.query(`DROP TABLE "drought_record"`);
  }
}
