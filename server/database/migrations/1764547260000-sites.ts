import type { MigrationInterface, QueryRunner } from 'typeorm';

const up = [
  `CREATE TABLE "site" (
    "id" text PRIMARY KEY NOT NULL,
    "teamId" text NOT NULL,
    "name" text NOT NULL,
    "invented" boolean NOT NULL,
    "width" integer NOT NULL,
    "height" integer NOT NULL,
    "cellSize" real NOT NULL,
    "originX" real NOT NULL,
    "originY" real NOT NULL,
    "epsg" integer NOT NULL,
    "crsName" text NOT NULL,
    "plant" text NOT NULL,
    "plantSet" boolean NOT NULL,
    "outlook" text NOT NULL,
    "outlookSet" boolean NOT NULL,
    "createdAt" text NOT NULL,
    CONSTRAINT "site_team" FOREIGN KEY ("teamId") REFERENCES "team" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
  )`,
  `CREATE INDEX "site_by_team" ON "site" ("teamId")`,
  `CREATE TABLE "layer" (
    "id" text PRIMARY KEY NOT NULL,
    "siteId" text NOT NULL,
    "part" text NOT NULL,
    "fileName" text NOT NULL,
    "hash" text NOT NULL,
    "bytes" integer NOT NULL,
    "valuesHash" text NOT NULL,
    "valuesBytes" integer NOT NULL,
    "facts" text NOT NULL,
    "unit" text NOT NULL,
    "classes" text,
    "uploadedAt" text NOT NULL,
    "uploadedBy" text NOT NULL,
    "replacedAt" text,
    CONSTRAINT "layer_site" FOREIGN KEY ("siteId") REFERENCES "site" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
  )`,
  `CREATE INDEX "layer_by_site" ON "layer" ("siteId")`,
  `CREATE INDEX "layer_by_hash" ON "layer" ("hash")`,
  `CREATE UNIQUE INDEX "layer_current" ON "layer" ("siteId", "part") WHERE "replacedAt" IS NULL`,
  `CREATE INDEX "layer_by_values" ON "layer" ("valuesHash")`,
  `CREATE TABLE "option" (
    "id" text PRIMARY KEY NOT NULL,
    "siteId" text NOT NULL,
    "wait" boolean NOT NULL,
    "name" text NOT NULL,
    "works" text NOT NULL,
    "revision" integer NOT NULL,
    "createdAt" text NOT NULL,
    "changedAt" text NOT NULL,
    "changedBy" text NOT NULL,
    CONSTRAINT "option_site" FOREIGN KEY ("siteId") REFERENCES "site" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
  )`,
  `CREATE INDEX "option_by_site" ON "option" ("siteId")`,
  `CREATE UNIQUE INDEX "option_wait" ON "option" ("siteId") WHERE "wait" = 1`,
  `CREATE TABLE "run" (
    "id" text PRIMARY KEY NOT NULL,
    "siteId" text NOT NULL,
    "optionId" text,
    "optionName" text NOT NULL,
    "name" text NOT NULL,
    "status" text NOT NULL,
    "spec" text NOT NULL,
    "grid" text NOT NULL,
    "crsName" text NOT NULL,
    "seed" text NOT NULL,
    "mode" text NOT NULL,
    "surveyYear" integer NOT NULL,
    "years" integer NOT NULL,
    "result" text,
    "recoveredYear" real,
    "digest" text,
    "closingHash" text,
    "closingBytes" integer,
    "startedAt" text NOT NULL,
    "startedBy" text NOT NULL,
    "check" text,
    CONSTRAINT "run_site" FOREIGN KEY ("siteId") REFERENCES "site" ("id") ON DELETE CASCADE ON UPDATE NO ACTION,
    CONSTRAINT "run_option" FOREIGN KEY ("optionId") REFERENCES "option" ("id") ON DELETE SET NULL ON UPDATE NO ACTION
  )`,
  `CREATE INDEX "run_by_site" ON "run" ("siteId", "startedAt")`,
  `CREATE INDEX "run_by_option" ON "run" ("optionId")`,
  `CREATE INDEX "run_by_closing" ON "run" ("closingHash")`,
  `CREATE TABLE "run_frame" (
    "runId" text NOT NULL,
    "year" integer NOT NULL,
    "hash" text NOT NULL,
    "bytes" integer NOT NULL,
    CONSTRAINT "run_frame_run" FOREIGN KEY ("runId") REFERENCES "run" ("id") ON DELETE CASCADE ON UPDATE NO ACTION,
    PRIMARY KEY ("runId", "year")
  )`,
  `CREATE INDEX "run_frame_by_hash" ON "run_frame" ("hash")`,
  `CREATE TABLE "run_layer" (
    "runId" text NOT NULL,
    "hash" text NOT NULL,
    CONSTRAINT "run_layer_run" FOREIGN KEY ("runId") REFERENCES "run" ("id") ON DELETE CASCADE ON UPDATE NO ACTION,
    PRIMARY KEY ("runId", "hash")
  )`,
  `CREATE INDEX "run_layer_by_hash" ON "run_layer" ("hash")`,
];

/** Sites with their layers and options, runs with their frames. */
export class Sites1764547260000 implements MigrationInterface {
  name = 'Sites1764547260000';

  async up(runner: QueryRunner): Promise<void> {
    for (const statement of up) await runner.query(statement);
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const table of ['run_layer', 'run_frame', 'run', 'option', 'layer', 'site'])
      await runner.query(`DROP TABLE "${table}"`);
  }
}
