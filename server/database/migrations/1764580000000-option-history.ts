import type { MigrationInterface, QueryRunner } from 'typeorm';

const up = [
  `ALTER TABLE "option" ADD COLUMN "place" integer NOT NULL DEFAULT (0)`,
  `ALTER TABLE "option" ADD COLUMN "note" text NOT NULL DEFAULT ('')`,
  `ALTER TABLE "option" ADD COLUMN "archived" boolean NOT NULL DEFAULT (0)`,
  `ALTER TABLE "option" ADD COLUMN "sets" text NOT NULL DEFAULT ('[]')`,
  `UPDATE "option" SET "place" = (
    SELECT COUNT(*) FROM "option" AS earlier WHERE earlier."siteId" = "option"."siteId"
      AND (earlier."wait" > "option"."wait" OR (earlier."wait" = "option"."wait"
        AND (earlier."createdAt", earlier."id") < ("option"."createdAt", "option"."id")))
  )`,
  // Works get the ids by which two versions are told apart.
  `UPDATE "option" SET "works" = (
    SELECT json_group_array(json_set(work.value, '$.id', 'w' || (work.key + 1)))
    FROM (SELECT value, key FROM json_each("option"."works") ORDER BY key) AS work
  )`,
  `CREATE TABLE "option_revision" (
    "optionId" text NOT NULL,
    "revision" integer NOT NULL,
    "name" text NOT NULL,
    "note" text NOT NULL,
    "works" integer NOT NULL,
    "drawingHash" text NOT NULL,
    "summary" text NOT NULL,
    "changedAt" text NOT NULL,
    "changedBy" text NOT NULL,
    CONSTRAINT "option_revision_option" FOREIGN KEY ("optionId") REFERENCES "option" ("id") ON DELETE CASCADE ON UPDATE NO ACTION,
    PRIMARY KEY ("optionId", "revision")
  )`,
  `CREATE TABLE "option_drawing" (
    "optionId" text NOT NULL,
    "hash" text NOT NULL,
    "body" blob NOT NULL,
    CONSTRAINT "option_drawing_option" FOREIGN KEY ("optionId") REFERENCES "option" ("id") ON DELETE CASCADE ON UPDATE NO ACTION,
    PRIMARY KEY ("optionId", "hash")
  )`,
  `CREATE TABLE "site_costs" (
    "siteId" text PRIMARY KEY NOT NULL,
    "costs" text NOT NULL,
    "changedAt" text NOT NULL,
    "changedBy" text NOT NULL,
    CONSTRAINT "site_costs_site" FOREIGN KEY ("siteId") REFERENCES "site" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
  )`,
];

/** Options get a note, an order, an archive and their history; works get ids; a site gets its costs. */
export class OptionHistory1764580000000 implements MigrationInterface {
  name = 'OptionHistory1764580000000';

  async up(runner: QueryRunner): Promise<void> {
    for (const statement of up) await runner.query(statement);
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const table of ['site_costs', 'option_drawing', 'option_revision'])
      await runner.query(`DROP TABLE "${table}"`);
    await runner.query(`UPDATE "option" SET "works" = (
      SELECT json_group_array(json_remove(work.value, '$.id', '$.name', '$.set'))
      FROM (SELECT value, key FROM json_each("option"."works") ORDER BY key) AS work
    )`);
    for (const column of ['sets', 'archived', 'note', 'place'])
      await runner.query(`ALTER TABLE "option" DROP COLUMN "${column}"`);
  }
}
