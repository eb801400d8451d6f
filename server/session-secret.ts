import { randomBytes } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ConfigError } from './config.ts';

/** The secret that signs session cookies: made once, kept in the data folder, readable by its owner alone. */
export function keptSessionSecret(dataDir: string): string {
  const file = join(dataDir, 'session-secret');
  if (!existsSync(file))
    writeFileSync(file, randomBytes(48).toString('base64url'), { mode: 0o600, flag: 'wx' });
  const secret = readFileSync(file, 'utf8').trim();
  if (secret.length < 32)
    throw new ConfigError(
      `${file} is too short to be a secret. Delete it: a new one is made, and all sessions end.`,
    );
  return secret;
}
