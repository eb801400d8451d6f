import { compare, hash } from 'bcryptjs';

export interface Passwords {
  hash(password: string): Promise<string>;
  /** takes as long without a hash as with one, so that the time tells nobody whether there is an account */
  matches(password: string, passwordHash: string | undefined): Promise<boolean>;
}

/** bcrypt at a work factor of `cost`. */
export function createPasswords(cost: number): Passwords {
  let nobodys: Promise<string> | undefined;
  return {
    hash: (password) => hash(password, cost),
    async matches(password, passwordHash) {
      nobodys ??= hash('the password of nobody', cost);
      const matched = await compare(password, passwordHash ?? (await nobodys));
      return matched && passwordHash !== undefined;
    },
  };
}
