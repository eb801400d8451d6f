import type { MigrationInterface, QueryRunner } from 'typeorm';

/** Runs of studies of what matters, beside the comparison that they are about. */
export class StudyRuns1796161000000 implements MigrationInterface {
  name = 'StudyRuns1796161000000';

  async up(runner: QueryRunner): Promise<void> {
    await runner.query(`CREATE TABLE "study_run" (
      "comparisonId" text NOT NULL,
      "option" integer NOT NULL,
      "outlook" integer NOT NULL,
      "key" text NOT NULL,
      "place" integer NOT NULL,
      "digest" text NOT NULL,
      "run" text NOT NULL,
      CONSTRAINT "study_run_comparison" FOREIGN KEY ("comparisonId") REFERENCES "comparison" ("id") ON DELETE CASCADE ON UPDATE NO ACTION,
      PRIMARY KEY ("comparisonId", "option", "outlook", "key")
    )`);
  }

  async down(runner: QueryRunner): Promise<void> {
    await runner.query(`DROP TABLE "study_run"`);
  }
}
