import type { Request, RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import { userOf } from '../access/current-user';
import { Problem } from './problem';

const windowMs = 10_000;

/**
 * Twice what is promised: a signed-in user may send 50 requests a second. Whoever is not signed in shares one allowance per
 * address; a whole control room may sit behind one.
 */
export function limitRequests(): RequestHandler {
  return rateLimit({
    windowMs,
    limit: 100 * (windowMs / 1000),
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    keyGenerator: (req) => {
      const user = userOf(req);
      return user ? `user ${user.id}` : addressOf(req);
    },
    handler: (_req, _res, next) =>
      next(
        new Problem(
          429,
          'too-many-requests',
          'Too many requests; 50 a second are allowed. Wait ten seconds.',
          {
            retryAfterSeconds: windowMs / 1000,
          },
        ),
      ),
  });
}

/** Failed sign-ins of one address, whatever the names: each costs half a second of arithmetic. */
export function limitSignInFailures(limit = 60): RequestHandler {
  return rateLimit({
    windowMs: 60_000,
    limit,
    skipSuccessfulRequests: true,
    standardHeaders: false,
    legacyHeaders: false,
    keyGenerator: addressOf,
    handler: (_req, _res, next) =>
      next(
        new Problem(429, 'locked', 'Too many failed sign-ins from this address. Try again in 60 s.', {
          retryAfterSeconds: 60,
        }),
      ),
  });
}

function addressOf(req: Request): string {
  return ipKeyGenerator(req.ip ?? 'unknown');
}
