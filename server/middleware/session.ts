import { randomUUID } from 'node:crypto';
import { promisify } from 'node:util';
import type { Request, RequestHandler, Response } from 'express';
import session from 'express-session';
import type { Services } from '../services.ts';
import { describeDevice } from './device.ts';
import { idleMs, SessionStore } from './session-store.repository.ts';

declare module 'express-session' {
  interface SessionData {
    /** shown in the list of sessions; opens nothing */
    openSessionId: string;
    personId: string;
    device: string;
    startedAt: string;
    seenAt: string;
  }
}

export const cookieName = 'foothold.sid';

const cookieOptions = (publicUrl: string) => ({
  path: '/',
  httpOnly: true,
  sameSite: 'lax' as const,
  secure: publicUrl.startsWith('https:'),
  maxAge: idleMs,
});

/** Loads the session named by the cookie; nobody gets one before signing in. */
export function sessions(services: Services): RequestHandler {
  const { config, dataSource, write, clock } = services;
  const cookie = cookieOptions(config.publicUrl);
  return session({
    name: cookieName,
    secret: services.sessionSecret,
    store: new SessionStore(dataSource, write, clock, cookie),
    cookie,
    rolling: true,
    resave: false,
    saveUninitialized: false,
    unset: 'destroy',
  });
}

/** Signs a person in under a new session id, so that an id from before is worth nothing. */
export async function startSession(request: Request, personId: string, now: Date): Promise<void> {
  await promisify(request.session.regenerate.bind(request.session))();
  request.session.openSessionId = randomUUID();
  request.session.personId = personId;
  request.session.device = describeDevice(request.get('user-agent'));
  request.session.startedAt = now.toISOString();
  request.session.seenAt = now.toISOString();
  await promisify(request.session.save.bind(request.session))();
}

/** Ends the session of a request, in the table and in the browser. */
export async function endSession(request: Request, response: Response, publicUrl: string): Promise<void> {
  await promisify(request.session.destroy.bind(request.session))();
  const { path, httpOnly, sameSite, secure } = cookieOptions(publicUrl);
  response.clearCookie(cookieName, { path, httpOnly, sameSite, secure });
}
