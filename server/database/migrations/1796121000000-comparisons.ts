import type { MigrationInterface, QueryRunner } from 'typeorm';

const ofComparison = (table: string) =>
  `CONSTRAINT "${table}_comparison" FOREIGN KEY ("comparisonId") REFERENCES "comparison" ("id") ON DELETE CASCADE ON UPDATE NO ACTION`;

const up = [
  `CREATE TABLE "comparison" (
    "id" text PRIMARY KEY NOT NULL,
    "siteId" text NOT NULL,
    "name" text NOT NULL,
    "status" text NOT NULL,
    "ending" text,
    "plan" text NOT NULL,
    "replicates" integer NOT NULL,
    "grid" text NOT NULL,
    "crsName" text NOT NULL,
    "decision" text,
    "startedAt" text NOT NULL,
    "startedBy" text NOT NULL,
    CONSTRAINT "comparison_site" FOREIGN KEY ("siteId") REFERENCES "site" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
  )`,
  `CREATE INDEX "comparison_by_site" ON "comparison" ("siteId", "startedAt")`,
  `CREATE TABLE "replicate" (
    "comparisonId" text NOT NULL,
    "option" integer NOT NULL,
    "outlook" integer NOT NULL,
    "replicate" integer NOT NULL,
    "digest" text NOT NULL,
    "record" text NOT NULL,
    ${ofComparison('replicate')},
    PRIMARY KEY ("comparisonId", "option", "outlook", "replicate")
  )`,
  `CREATE TABLE "ensemble_map" (
    "comparisonId" text NOT NULL,
    "option" integer NOT NULL,
    "outlook" integer NOT NULL,
    "map" text NOT NULL,
    "hash" text NOT NULL,
    "bytes" integer NOT NULL,
    "replicates" integer NOT NULL,
    ${ofComparison('ensemble_map')},
    PRIMARY KEY ("comparisonId", "option", "outlook", "map")
  )`,
  `CREATE INDEX "ensemble_map_by_hash" ON "ensemble_map" ("hash")`,
  `CREATE TABLE "comparison_layer" (
    "comparisonId" text NOT NULL,
    "hash" text NOT NULL,
    ${ofComparison('comparison_layer')},
    PRIMARY KEY ("comparisonId", "hash")
  )`,
  `CREATE INDEX "comparison_layer_by_hash" ON "comparison_layer" ("hash")`,
  `CREATE TABLE "comparison_event" (
    "comparisonId" text NOT NULL,
    "place" integer NOT NULL,
    "at" text NOT NULL,
    "by" text NOT NULL,
    "what" text NOT NULL,
    ${ofComparison('comparison_event')},
    PRIMARY KEY ("comparisonId", "place")
  )`,
];

/** Comparisons: ensembles of several options with the same luck, and the decision taken on them. */
export class Comparisons1796121000000 implements MigrationInterface {
  name = 'Comparisons1796121000000';

  async up(runner: QueryRunner): Promise<void> {
    for (const statement of up) await runner.query(statement);
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const table of ['comparison_event', 'comparison_layer', 'ensemble_map', 'replicate', 'comparison'])
      await runner.query(`DROP TABLE "${table}"`);
  }
}
