import type { MigrationInterface, QueryRunner } from 'typeorm';

const tables = [
  `CREATE TABLE "person" (
    "id" text PRIMARY KEY NOT NULL,
    "email" text NOT NULL,
    "name" text NOT NULL,
    "passwordHash" text NOT NULL,
    "createdAt" text NOT NULL,
    CONSTRAINT "person_email" UNIQUE ("email"))`,
  `CREATE TABLE "team" (
    "id" text PRIMARY KEY NOT NULL,
    "name" text NOT NULL,
    "createdAt" text NOT NULL)`,
  `CREATE TABLE "membership" (
    "teamId" text NOT NULL,
    "personId" text NOT NULL,
    "role" text NOT NULL,
    "joinedAt" text NOT NULL,
    CONSTRAINT "membership_team" FOREIGN KEY ("teamId") REFERENCES "team" ("id") ON DELETE CASCADE,
    CONSTRAINT "membership_person" FOREIGN KEY ("personId") REFERENCES "person" ("id") ON DELETE CASCADE,
    PRIMARY KEY ("teamId", "personId"))`,
  `CREATE INDEX "membership_by_person" ON "membership" ("personId")`,
  `CREATE TABLE "session" (
    "id" text PRIMARY KEY NOT NULL,
    "tokenHash" text NOT NULL,
    "personId" text NOT NULL,
    "device" text NOT NULL,
    "startedAt" text NOT NULL,
    "seenAt" text NOT NULL,
    "expiresAt" text NOT NULL,
    CONSTRAINT "session_token" UNIQUE ("tokenHash"),
    CONSTRAINT "session_person" FOREIGN KEY ("personId") REFERENCES "person" ("id") ON DELETE CASCADE)`,
  `CREATE INDEX "session_by_person" ON "session" ("personId")`,
  `CREATE TABLE "invite" (
    "id" text PRIMARY KEY NOT NULL,
    "teamId" text NOT NULL,
    "email" text NOT NULL,
    "role" text NOT NULL,
    "tokenHash" text NOT NULL,
    "sentAt" text NOT NULL,
    "expiresAt" text NOT NULL,
    "invitedById" text,
    CONSTRAINT "invite_token" UNIQUE ("tokenHash"),
    CONSTRAINT "invite_address" UNIQUE ("teamId", "email"),
    CONSTRAINT "invite_team" FOREIGN KEY ("teamId") REFERENCES "team" ("id") ON DELETE CASCADE,
    CONSTRAINT "invite_inviter" FOREIGN KEY ("invitedById") REFERENCES "person" ("id") ON DELETE SET NULL)`,
  `CREATE TABLE "one_time_link" (
    "tokenHash" text PRIMARY KEY NOT NULL,
    "kind" text NOT NULL,
    "personId" text,
    "expiresAt" text NOT NULL,
    CONSTRAINT "one_time_link_person" FOREIGN KEY ("personId") REFERENCES "person" ("id") ON DELETE CASCADE)`,
  `CREATE INDEX "one_time_link_by_person" ON "one_time_link" ("personId")`,
  `CREATE TABLE "outbox_message" (
    "id" text PRIMARY KEY NOT NULL,
    "teamId" text NOT NULL,
    "recipient" text NOT NULL,
    "subject" text NOT NULL,
    "text" text NOT NULL,
    "sentAt" text NOT NULL,
    "status" text NOT NULL,
    "error" text,
    CONSTRAINT "outbox_message_team" FOREIGN KEY ("teamId") REFERENCES "team" ("id") ON DELETE CASCADE)`,
  `CREATE INDEX "outbox_message_by_team" ON "outbox_message" ("teamId", "sentAt")`,
];

const dropOrder = [
  'outbox_message',
  'one_time_link',
  'invite',
  'session',
  'membership',
  'team',
  'person',
] as const;

/** People, teams and what lets them in. */
export class People1764547200000 implements MigrationInterface {
  async up(runner: QueryRunner): Promise<void> {
    for (const statement of tables) await runner.query(statement);
  }

  async down(runner: QueryRunner): Promise<void> {
    for (const table of dropOrder) await runner.query(`DROP TABLE "${table}"`);
  }
}
