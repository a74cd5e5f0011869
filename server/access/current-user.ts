import type { User } from '@shared/api/session';
import type { Request } from 'express';
import { Problem } from '../http/problem';

/** Who sent the request, or undefined when nobody is signed in. */
export function userOf(req: Request): User | undefined {
  return req.user as User | undefined;
}

/**
 * Who sent the request.
 *
 * @throws Problem 401 `not-signed-in`
 */
export function currentUser(req: Request): User {
  const user = userOf(req);
  if (!user) throw new Problem(401, 'not-signed-in', 'Sign in first: your session may have ended.');
  return user;
}
