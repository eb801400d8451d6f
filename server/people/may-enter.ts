import type { Config } from '../config.ts';
import { isDemoAddress } from '../demo/demo-accounts.ts';

/** The demo's accounts have a public password, so they open nothing once the demo is off. */
export const mayEnter = (email: string, { demo }: Config): boolean => demo !== 'off' || !isDemoAddress(email);
