import { createHash, timingSafeEqual } from 'node:crypto';
import type { RequestHandler } from 'express';
import { FakeProblem } from './problem';

/** Lets through only requests that carry the token; anything else is answered 401. */
export function requireToken(token: string): RequestHandler {
  const expected = digest(`Bearer ${token}`);
  return (req, _res, next) => {
    const given = req.get('authorization');
    if (given === undefined)
      throw new FakeProblem(
        401,
        'token-missing',
        'Send the token in the header Authorization: Bearer <token>.',
      );
    // Digests have one length and are compared in constant time, so that the answer's delay says nothing.
    if (!timingSafeEqual(digest(given), expected))
      throw new FakeProblem(401, 'token-wrong', 'This token is not the one the historian was started with.');
    next();
  };
}

function digest(text: string): Buffer {
  return createHash('sha256').update(text).digest();
}
