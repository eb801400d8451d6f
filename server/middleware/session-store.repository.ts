import { createHash } from 'node:crypto';
import { Store, type CookieOptions, type SessionData } from 'express-session';
import { LessThan, type DataSource } from 'typeorm';
import { SessionEntity } from '../database/entities/session.ts';
import type { Write } from '../database/write-queue.ts';

const day = 86_400_000;
/** A session that is not used for this long ends. */
export const idleMs = 14 * day;
/** A session ends this long after its sign-in, however much it is used. */
export const absoluteMs = 60 * day;
/** `seenAt` moves at most this often, so that reading does not mean writing. */
const touchEveryMs = 60_000;

type Done<T = void> = (error?: unknown, value?: T) => void;

/** The cookie's session id as it is stored: a copy of the database opens no session. */
export const hashSessionId = (sessionId: string): string =>
  createHash('sha256').update(sessionId).digest('hex');

const settle = <T>(work: Promise<T>, done: Done<T> | undefined): void => {
  work.then(
    (value) => done?.(null, value),
    (error: unknown) => done?.(error),
  );
};

/** Keeps the sessions of signed-in people in the table `session`; nobody else has one. */
export class SessionStore extends Store {
  readonly #dataSource: DataSource;
  readonly #write: Write;
  readonly #clock: () => Date;
  readonly #cookie: CookieOptions;

  constructor(dataSource: DataSource, write: Write, clock: () => Date, cookie: CookieOptions) {
    super();
    this.#dataSource = dataSource;
    this.#write = write;
    this.#clock = clock;
    this.#cookie = cookie;
  }

  override get(sessionId: string, done: Done<SessionData | null>): void {
    settle(this.#find(sessionId), done);
  }

  async #find(sessionId: string): Promise<SessionData | null> {
    const tokenHash = hashSessionId(sessionId);
    const row = await this.#dataSource.getRepository(SessionEntity).findOneBy({ tokenHash });
    const now = this.#clock().getTime();
    if (!row || Date.parse(row.expiresAt) <= now) return null;
    const { id, personId, device, startedAt, seenAt } = row;
    const cookie = { ...this.#cookie, originalMaxAge: idleMs, expires: new Date(row.expiresAt) };
    return { cookie, openSessionId: id, personId, device, startedAt, seenAt };
  }

  #expiry(startedAt: string): string {
    const idle = this.#clock().getTime() + idleMs;
    return new Date(Math.min(idle, Date.parse(startedAt) + absoluteMs)).toISOString();
  }

  override set(sessionId: string, session: SessionData, done?: Done): void {
    const { openSessionId: id, personId, device, startedAt, seenAt } = session;
    if (!id || !personId || !startedAt || !seenAt) return done?.();
    const row = {
      id,
      tokenHash: hashSessionId(sessionId),
      personId,
      device: device ?? '',
      startedAt,
      seenAt,
    };
    const saved = this.#write(async (manager) => {
      const sessions = manager.getRepository(SessionEntity);
      await sessions.delete({ expiresAt: LessThan(this.#clock().toISOString()) });
      await sessions.upsert({ ...row, expiresAt: this.#expiry(startedAt) }, ['tokenHash']);
    });
    settle(saved, done);
  }

  override touch(sessionId: string, session: SessionData, done?: () => void): void {
    const now = this.#clock();
    const { startedAt, seenAt } = session;
    if (!startedAt || !seenAt || now.getTime() - Date.parse(seenAt) < touchEveryMs) return done?.();
    // An update, never an insert: a session that was ended meanwhile stays ended.
    const touched = this.#write((manager) =>
      manager
        .getRepository(SessionEntity)
        .update(
          { tokenHash: hashSessionId(sessionId) },
          { seenAt: now.toISOString(), expiresAt: this.#expiry(startedAt) },
        ),
    );
    settle(touched, () => done?.());
  }

  override destroy(sessionId: string, done?: Done): void {
    const tokenHash = hashSessionId(sessionId);
    const ended = this.#write(async (manager) => {
      await manager.getRepository(SessionEntity).delete({ tokenHash });
    });
    settle(ended, done);
  }
}
