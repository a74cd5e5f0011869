import { may, permissions, type Permission } from '@shared/api/permissions';
import type { RequestHandler } from 'express';
import { Problem } from '../http/problem';
import { currentUser } from './current-user';

/** What a route asks of its caller, readable from outside: the tests hold every route against one table. */
export type Requirement = Permission | 'signed-in' | 'nothing';

export interface StatesRequirement extends RequestHandler {
  readonly requirement: Requirement;
}

/** Lets pass who is signed in and may do this; 401 when nobody is signed in, 403 otherwise. */
export function requirePermission(permission: Permission): StatesRequirement {
  return stating(permission, (req, _res, next) => {
    const user = currentUser(req);
    if (!may(user.role, permission))
      throw new Problem(
        403,
        'not-permitted',
        `This is for: ${permissions[permission].join(', ')}. You are signed in as ${user.name} (${user.role}).`,
      );
    next();
  });
}

/** Lets pass whoever is signed in. */
export const requireSignedIn: StatesRequirement = stating('signed-in', (req, _res, next) => {
  currentUser(req);
  next();
});

/** Says that a route is open to everybody on purpose. */
export const openToAll: StatesRequirement = stating('nothing', (_req, _res, next) => next());

function stating(requirement: Requirement, handler: RequestHandler): StatesRequirement {
  return Object.assign(handler, { requirement });
}
