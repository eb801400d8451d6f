import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Runs keep by name which outlook and plant they took. */
export class RunOrigins1796174000000 implements MigrationInterface {
  name = 'RunOrigins1796174000000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE "run" ADD COLUMN "origins" text`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE "run" DROP COLUMN "origins"`);
  }
}
