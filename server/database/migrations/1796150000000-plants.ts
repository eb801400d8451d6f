import type { MigrationInterface, QueryRunner } from 'typeorm';

/** The team's library of plants, and where the plant of a site was taken from. */
export class Plants1796150000000 implements MigrationInterface {
  name = 'Plants1796150000000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`CREATE TABLE "library_plant" (
      "id" text PRIMARY KEY NOT NULL,
      "teamId" text NOT NULL,
      "name" text NOT NULL,
      "archived" boolean NOT NULL,
      "createdAt" text NOT NULL,
      CONSTRAINT "library_plant_team" FOREIGN KEY ("teamId") REFERENCES "team" ("id") ON DELETE CASCADE ON UPDATE NO ACTION
    )`);
    await runner.query(`CREATE INDEX "library_plant_by_team" ON "library_plant" ("teamId")`);
    await runner.query(`CREATE TABLE "plant_version" (
      "plantId" text NOT NULL,
      "version" integer NOT NULL,
      "plant" text NOT NULL,
      "note" text NOT NULL,
      "savedAt" text NOT NULL,
      "savedBy" text NOT NULL,
      CONSTRAINT "plant_version_plant" FOREIGN KEY ("plantId") REFERENCES "library_plant" ("id") ON DELETE CASCADE ON UPDATE NO ACTION,
      PRIMARY KEY ("plantId", "version")
    )`);
    await runner.query(`ALTER TABLE "site" ADD COLUMN "plantOrigin" text`);
    // Plants that are kept get the new parts, empty, so that they are the contract's shape as they stand.
    const sites = (await runner.query(`SELECT "id", "plant" FROM "site"`)) as { id: string; plant: string }[];
    for (const { id, plant } of sites) {
      const whole = { beliefs: {}, sources: {}, fieldNumbers: {}, ...(JSON.parse(plant) as object) };
      await runner.query(`UPDATE "site" SET "plant" = ? WHERE "id" = ?`, [JSON.stringify(whole), id]);
    }
  }

  async down(runner: QueryRunner): Promise<void> {
    const sites = (await runner.query(`SELECT "id", "plant" FROM "site"`)) as { id: string; plant: string }[];
    for (const { id, plant } of sites) {
      const { beliefs, sources, fieldNumbers, ...before } = JSON.parse(plant) as Record<string, unknown>;
      void [beliefs, sources, fieldNumbers];
      await runner.query(`UPDATE "site" SET "plant" = ? WHERE "id" = ?`, [JSON.stringify(before), id]);
    }
    await runner.query(`ALTER TABLE "site" DROP COLUMN "plantOrigin"`);
    await runner.query(`DROP TABLE "plant_version"`);
    await runner.query(`DROP TABLE "library_plant"`);
  }
}
