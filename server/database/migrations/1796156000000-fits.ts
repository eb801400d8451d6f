import type { MigrationInterface, QueryRunner } from 'typeorm';

const up = [
  `ALTER TABLE "layer" ADD COLUMN "year" integer NOT NULL DEFAULT (0)`,
  `DROP INDEX "layer_current"`,
  `CREATE UNIQUE INDEX "layer_current" ON "layer" ("siteId", "part", "year") WHERE "replacedAt" IS NULL`,
  `CREATE TABLE "fit" (
    "id" text PRIMARY KEY NOT NULL,
    "siteId" text NOT NULL,
    "name" text NOT NULL,
    "status" text NOT NULL,
    "plan" text NOT NULL,
    "state" text NOT NULL,
    "runs" integer NOT NULL,
    "generations" integer NOT NULL,
    "grid" text NOT NULL,
    "accepted" text,
    "startedAt" text NOT NULL,
    "startedBy" text NOT NULL,
    CONSTRAINT "fit_site" FOREIGN KEY ("siteId") REFERENCES "site" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
  )`,
  `CREATE INDEX "fit_by_site" ON "fit" ("siteId", "startedAt")`,
  `CREATE TABLE "fit_layer" (
    "fitId" text NOT NULL,
    "hash" text NOT NULL,
    CONSTRAINT "fit_layer_fit" FOREIGN KEY ("fitId") REFERENCES "fit" ("id") ON DELETE CASCADE ON UPDATE NO ACTION,
    PRIMARY KEY ("fitId", "hash")
  )`,
  `CREATE INDEX "fit_layer_by_hash" ON "fit_layer" ("hash")`,
];

const down = [
  `DROP TABLE "fit_layer"`,
  `DROP TABLE "fit"`,
  // The parts before know no surveys of later years.
  `DELETE FROM "layer" WHERE "part" = 'resurvey'`,
  `DROP INDEX "layer_current"`,
  `CREATE UNIQUE INDEX "layer_current" ON "layer" ("siteId", "part") WHERE "replacedAt" IS NULL`,
  `ALTER TABLE "layer" DROP COLUMN "year"`,
];

/** Resurveys, one a year, and fits of rates to them. */
export class Fits1796156000000 implements MigrationInterface {
  name = 'Fits1796156000000';

  async up(runner: QueryRunner): Promise<void> {
    for (const statement of up) await runner.query(statement);
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const statement of down) await runner.query(statement);
  }
}
