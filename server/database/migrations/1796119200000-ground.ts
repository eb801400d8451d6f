import type { MigrationInterface, QueryRunner } from 'typeorm';

/** A layer as it was: its file lay on the site's grid, and its hash was the file's. */
const layerBefore = (name: string) => `CREATE TABLE "${name}" (
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
  )`;

const layerAfter = (name: string) => `CREATE TABLE "${name}" (
    "id" text PRIMARY KEY NOT NULL,
    "siteId" text NOT NULL,
    "part" text NOT NULL,
    "grid" text NOT NULL,
    "hash" text NOT NULL,
    "bytes" integer NOT NULL,
    "valuesHash" text NOT NULL,
    "valuesBytes" integer NOT NULL,
    "fileName" text NOT NULL,
    "sourceHash" text NOT NULL,
    "sourceBytes" integer NOT NULL,
    "source" text NOT NULL,
    "alignment" text NOT NULL,
    "note" text NOT NULL,
    "facts" text NOT NULL,
    "unit" text NOT NULL,
    "vertical" text,
    "classes" text,
    "uploadedAt" text NOT NULL,
    "uploadedBy" text NOT NULL,
    "replacedAt" text,
    CONSTRAINT "layer_site" FOREIGN KEY ("siteId") REFERENCES "site" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
  )`;

const layerIndices = [
  `CREATE INDEX "layer_by_site" ON "layer" ("siteId")`,
  `CREATE INDEX "layer_by_hash" ON "layer" ("hash")`,
  `CREATE UNIQUE INDEX "layer_current" ON "layer" ("siteId", "part") WHERE "replacedAt" IS NULL`,
  `CREATE INDEX "layer_by_values" ON "layer" ("valuesHash")`,
];

const up = [
  // Nothing refers to layers by a key, so that their table can be made anew: only with a default could it gain columns.
  layerAfter('layer_anew'),
  `INSERT INTO "layer_anew" SELECT "layer"."id", "siteId", "part",
    json_object('width', "width", 'height', "height", 'cellSize', "cellSize", 'originX', "originX", 'originY', "originY", 'epsg', "epsg"),
    "hash", "bytes", "valuesHash", "valuesBytes", "fileName", "hash", "bytes",
    json_object('crsName', json_extract("facts", '$.crsName'), 'epsg', "epsg", 'width', "width", 'height', "height",
      'cellWidth', "cellSize", 'cellHeight', "cellSize", 'band', 1, 'bands', 1, 'scale', 1, 'offset', 0),
    '{"method":"copy","reprojectedFrom":null,"cropped":0,"padded":0}',
    '', "facts", "unit", NULL, "classes", "uploadedAt", "uploadedBy", "replacedAt"
    FROM "layer" INNER JOIN "site" ON "site"."id" = "layer"."siteId"`,
  `DROP TABLE "layer"`,
  `ALTER TABLE "layer_anew" RENAME TO "layer"`,
  ...layerIndices,
  `CREATE INDEX "layer_by_source" ON "layer" ("sourceHash")`,
  `ALTER TABLE "site" ADD COLUMN "finestGrid" text`,
  `ALTER TABLE "site" ADD COLUMN "elevationCurves" text`,
  `ALTER TABLE "site" ADD COLUMN "tidalDatums" text`,
  `CREATE TABLE "upload" (
    "id" text PRIMARY KEY NOT NULL,
    "teamId" text NOT NULL,
    "siteId" text,
    "fileName" text NOT NULL,
    "hash" text NOT NULL,
    "bytes" integer NOT NULL,
    "state" text NOT NULL,
    "attempts" integer NOT NULL,
    "place" text NOT NULL,
    "putBackOf" text,
    "description" text,
    "facts" text,
    "band" integer,
    "thumbnailHash" text,
    "choices" text NOT NULL,
    "problem" text,
    "layerId" text,
    "uploadedAt" text NOT NULL,
    "uploadedBy" text NOT NULL,
    CONSTRAINT "upload_team" FOREIGN KEY ("teamId") REFERENCES "team" ("id") ON DELETE CASCADE ON UPDATE NO ACTION,
    CONSTRAINT "upload_site" FOREIGN KEY ("siteId") REFERENCES "site" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
  )`,
  `CREATE INDEX "upload_by_team" ON "upload" ("teamId", "siteId", "uploadedAt")`,
  `CREATE INDEX "upload_by_site" ON "upload" ("siteId")`,
  `CREATE INDEX "upload_by_hash" ON "upload" ("hash")`,
  `CREATE INDEX "upload_by_thumbnail" ON "upload" ("thumbnailHash")`,
  `CREATE TABLE "grid_change" (
    "siteId" text PRIMARY KEY NOT NULL,
    "id" text NOT NULL,
    "grid" text NOT NULL,
    "state" text NOT NULL,
    "attempts" integer NOT NULL,
    "problem" text,
    "askedAt" text NOT NULL,
    "askedBy" text NOT NULL,
    CONSTRAINT "grid_change_site" FOREIGN KEY ("siteId") REFERENCES "site" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
  )`,
  `CREATE TABLE "feature_import" (
    "id" text PRIMARY KEY NOT NULL,
    "siteId" text NOT NULL,
    "fileName" text NOT NULL,
    "hash" text NOT NULL,
    "crsName" text NOT NULL,
    "importedAt" text NOT NULL,
    "importedBy" text NOT NULL,
    CONSTRAINT "feature_import_site" FOREIGN KEY ("siteId") REFERENCES "site" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
  )`,
  `CREATE INDEX "feature_import_by_site" ON "feature_import" ("siteId")`,
  `CREATE INDEX "feature_import_by_hash" ON "feature_import" ("hash")`,
  `CREATE TABLE "feature" (
    "id" text PRIMARY KEY NOT NULL,
    "siteId" text NOT NULL,
    "importId" text NOT NULL,
    "row" integer NOT NULL,
    "kind" text NOT NULL,
    "name" text NOT NULL,
    "shape" text NOT NULL,
    "strength" real NOT NULL,
    "halo" real NOT NULL,
    CONSTRAINT "feature_of_import" FOREIGN KEY ("importId") REFERENCES "feature_import" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
  )`,
  `CREATE INDEX "feature_by_site" ON "feature" ("siteId")`,
  `CREATE INDEX "feature_by_import" ON "feature" ("importId")`,
];

const down = [
  ...['feature', 'feature_import', 'grid_change', 'upload'].map((table) => `DROP TABLE "${table}"`),
  ...['finestGrid', 'elevationCurves', 'tidalDatums'].map(
    (name) => `ALTER TABLE "site" DROP COLUMN "${name}"`,
  ),
  layerBefore('layer_before'),
  `INSERT INTO "layer_before" SELECT "id", "siteId", "part", "fileName", "hash", "bytes", "valuesHash", "valuesBytes",
    "facts", "unit", "classes", "uploadedAt", "uploadedBy", "replacedAt" FROM "layer"`,
  `DROP TABLE "layer"`,
  `ALTER TABLE "layer_before" RENAME TO "layer"`,
  ...layerIndices,
];

/** Layers learn what file they were made from and how; uploads, features and changes of the grid get their tables. */
export class Ground1796119200000 implements MigrationInterface {
  name = 'Ground1796119200000';

  async up(runner: QueryRunner): Promise<void> {
    for (const statement of up) await runner.query(statement);
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const statement of down) await runner.query(statement);
  }
}
