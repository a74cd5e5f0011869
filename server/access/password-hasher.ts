import bcrypt from 'bcryptjs';

/** Makes and checks password hashes. */
export interface PasswordHasher {
  hash(password: string): Promise<string>;
  verify(password: string, hash: string): Promise<boolean>;
  close(): Promise<void>;
}

/** bcrypt reads 72 bytes and silently ignores the rest. */
export function isTooLongToHash(password: string): boolean {
  return bcrypt.truncates(password);
}

export const passwordCost = 12;

/** Hashes in the calling thread: for command-line programs, the worker itself, and tests that want a low cost. */
export class InlinePasswordHasher implements PasswordHasher {
  constructor(private readonly cost = passwordCost) {}

  hash(password: string): Promise<string> {
    return bcrypt.hash(password, this.cost);
  }

  verify(password: string, hash: string): Promise<boolean> {
    return bcrypt.compare(password, hash);
  }

  close(): Promise<void> {
    return Promise.resolve();
  }
}
