import { promisify } from 'node:util';
import { credentials, sessionPath, type Session, type User } from '@shared/api/session';
import { Router, type RequestHandler } from 'express';
import type { Clock } from '../clock';
import { parseRequest } from '../http/parse-request';
import type { Settings } from '../site/settings';
import type { CrossSiteProtection } from './cross-site';
import { userOf } from './current-user';
import { openToAll } from './require';
import type { SignIn } from './sign-in';

export interface SessionRoutesDependencies {
  readonly clock: Clock;
  readonly settings: Settings;
  readonly signIn: SignIn;
  readonly crossSite: CrossSiteProtection;
  /** Refuses an address with too many failed sign-ins. */
  readonly limitFailures: RequestHandler;
}

/**
 * Signing in and out. A script posts name and password, keeps the cookie it gets and sends it with every request; it needs
 * no cross-site token. A page reads GET first, which hands it the token's cookie.
 */
export function sessionRouter(deps: SessionRoutesDependencies): Router {
  const { clock, settings, signIn, crossSite } = deps;
  const answer = async (user: User | undefined): Promise<Session> => ({
    user: user ?? null,
    site: await settings.site(),
    now: clock.now(),
  });
  const router = Router();
  router.get(sessionPath, openToAll, async (req, res) => {
    res.json(await answer(userOf(req)));
  });
  router.post(sessionPath, openToAll, deps.limitFailures, async (req, res) => {
    req.body = parseRequest(credentials, req.body);
    const user = await signIn.signIn(req);
    crossSite.hand(req, res);
    res.json(await answer(user));
  });
  // Repeating it changes nothing: signed out is signed out.
  router.delete(sessionPath, openToAll, async (req, res) => {
    await promisify((done: (error: unknown) => void) => req.session.destroy(done))();
    req.user = undefined;
    crossSite.hand(req, res);
    res.clearCookie(sessionCookieName, { path: '/' });
    res.status(204).end();
  });
  return router;
}

export const sessionCookieName = 'dewmark.sid';
