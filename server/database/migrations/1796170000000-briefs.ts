import type { MigrationInterface, QueryRunner } from 'typeorm';

const ofBrief = (table: string) =>
  `CONSTRAINT "${table}_brief" FOREIGN KEY ("briefId") REFERENCES "brief" ("id") ON DELETE CASCADE ON UPDATE NO ACTION`;

const up = [
  `CREATE TABLE "brief" (
    "id" text PRIMARY KEY NOT NULL,
    "siteId" text NOT NULL,
    "comparisonId" text,
    "version" integer NOT NULL,
    "createdAt" text NOT NULL,
    CONSTRAINT "brief_site" FOREIGN KEY ("siteId") REFERENCES "site" ("id") ON DELETE CASCADE ON UPDATE NO ACTION,
    CONSTRAINT "brief_comparison" FOREIGN KEY ("comparisonId") REFERENCES "comparison" ("id") ON DELETE SET NULL ON UPDATE NO ACTION
  )`,
  `CREATE INDEX "brief_by_site" ON "brief" ("siteId")`,
  `CREATE INDEX "brief_by_comparison" ON "brief" ("comparisonId")`,
  `CREATE TABLE "brief_version" (
    "briefId" text NOT NULL,
    "version" integer NOT NULL,
    "text" text NOT NULL,
    "facts" text NOT NULL,
    "pdfHash" text NOT NULL,
    "bytes" integer NOT NULL,
    "pages" integer NOT NULL,
    "briefPages" integer NOT NULL,
    "at" text NOT NULL,
    "by" text NOT NULL,
    ${ofBrief('brief_version')},
    PRIMARY KEY ("briefId", "version")
  )`,
  `CREATE INDEX "brief_version_by_hash" ON "brief_version" ("pdfHash")`,
  `CREATE TABLE "brief_map" (
    "briefId" text NOT NULL,
    "version" integer NOT NULL,
    "option" integer NOT NULL,
    "hash" text NOT NULL,
    ${ofBrief('brief_map')},
    PRIMARY KEY ("briefId", "version", "option")
  )`,
  `CREATE INDEX "brief_map_by_hash" ON "brief_map" ("hash")`,
  `CREATE TABLE "brief_message" (
    "id" text PRIMARY KEY NOT NULL,
    "briefId" text NOT NULL,
    "key" text NOT NULL,
    "version" integer NOT NULL,
    "subject" text NOT NULL,
    "text" text NOT NULL,
    "attached" boolean NOT NULL,
    "recipients" text NOT NULL,
    "sentAt" text NOT NULL,
    "sentBy" text NOT NULL,
    ${ofBrief('brief_message')}
  )`,
  `CREATE UNIQUE INDEX "brief_message_by_key" ON "brief_message" ("briefId", "key")`,
];

/** Briefs: what is handed over of a comparison, in versions that never change, and to whom it was sent. */
export class Briefs1796170000000 implements MigrationInterface {
  name = 'Briefs1796170000000';

  async up(runner: QueryRunner): Promise<void> {
    for (const statement of up) await runner.query(statement);
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const table of ['brief_message', 'brief_map', 'brief_version', 'brief'])
      await runner.query(`DROP TABLE "${table}"`);
  }
}
