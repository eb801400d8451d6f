import type { MigrationInterface, QueryRunner } from 'typeorm';

/** What cells on the edge of surveyed features get; those that are there keep the rule that they came with. */
export class FeatureEdges1796145000000 implements MigrationInterface {
  name = 'FeatureEdges1796145000000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE "feature_import" ADD COLUMN "edges" text NOT NULL DEFAULT 'centre'`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`ALTER TABLE "feature_import" DROP COLUMN "edges"`);
  }
}
