import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Keys that people make for their scripts. */
export class AccessTokens1796172000000 implements MigrationInterface {
  name = 'AccessTokens1796172000000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`CREATE TABLE "access_token" (
      "id" text PRIMARY KEY NOT NULL,
      "tokenHash" text NOT NULL,
      "start" text NOT NULL,
      "personId" text NOT NULL,
      "name" text NOT NULL,
      "scope" text NOT NULL,
      "teamId" text,
      "createdAt" text NOT NULL,
      "expiresAt" text NOT NULL,
      "lastUsedAt" text,
      "revokedAt" text,
      CONSTRAINT "access_token_hash" UNIQUE ("tokenHash"),
      CONSTRAINT "access_token_person" FOREIGN KEY ("personId") REFERENCES "person" ("id") ON DELETE CASCADE ON UPDATE NO ACTION,
      CONSTRAINT "access_token_team" FOREIGN KEY ("teamId") REFERENCES "team" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
    )`);
    await runner.query(`CREATE INDEX "access_token_by_person" ON "access_token" ("personId")`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE "access_token"`);
  }
}
