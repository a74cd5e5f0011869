import { createHmac, randomBytes, timingSafeEqual } from 'node:crypto';
import type { Request, RequestHandler, Response } from 'express';
import { Problem } from '../http/problem';
import { userOf } from './current-user';

const cookieName = 'XSRF-TOKEN';
const headerName = 'x-xsrf-token';
const reading = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Keeps other sites' pages from writing in a signed-in person's name.
 *
 * A signed double-submit token, in the names Angular's HttpClient uses: the cookie is readable by our own pages only,
 * which send it back as a header; it is signed and tied to the session, so a cookie planted by a neighbouring site does
 * not pass. Beyond that:
 * - A write that says it comes from another site is refused, whatever it carries.
 * - Sign-in needs no token, as long as it does not come from another site: before it there is no session to tie one to.
 * - A write without a token is let through when nothing in it speaks of a browser (no Origin, Sec-Fetch-Site or Referer):
 *   the danger is a browser that adds the cookie by itself, and browsers put an Origin on every write. A script that
 *   holds the session's cookie has been given it on purpose.
 * - A write by nobody is left to the route, which answers 401 where it must: that tells the page that its session ended.
 */
export class CrossSiteProtection {
  constructor(
    private readonly secret: string,
    private readonly secureCookie: boolean,
  ) {}

  /** Checks writes, and hands out the cookie where it is missing or belongs to an earlier session. */
  readonly check: RequestHandler = (req, res, next) => {
    const token = readCookie(req, cookieName);
    const isWrite = !reading.has(req.method);
    if (isWrite && isFromAnotherSite(req)) throw refusal('The request comes from a page of another site.');
    if (isWrite && userOf(req) && isFromBrowser(req) && !this.#isSignIn(req) && !this.#isValid(req, token))
      throw refusal('The page is out of date: reload it and try again.');
    if (!token || !this.#isGenuine(req, token)) this.hand(req, res);
    next();
  };

  /** Sets the cookie for the session the request has now; to be called when that changes. */
  hand(req: Request, res: Response): void {
    const nonce = randomBytes(16).toString('base64url');
    res.cookie(cookieName, `${nonce}.${this.#sign(req, nonce)}`, {
      httpOnly: false,
      sameSite: 'lax',
      secure: this.secureCookie,
      path: '/',
    });
  }

  #isSignIn(req: Request): boolean {
    return req.method === 'POST' && req.path === '/api/session';
  }

  #isValid(req: Request, token: string | undefined): boolean {
    const header = req.get(headerName);
    return (
      token !== undefined && header !== undefined && isSame(header, token) && this.#isGenuine(req, token)
    );
  }

  #isGenuine(req: Request, token: string): boolean {
    const [nonce, signature] = token.split('.');
    return nonce !== undefined && signature !== undefined && isSame(signature, this.#sign(req, nonce));
  }

  #sign(req: Request, nonce: string): string {
    const session = userOf(req) ? req.sessionID : '';
    return createHmac('sha256', this.secret).update(`xsrf ${nonce} ${session}`).digest('base64url');
  }
}

function refusal(detail: string): Problem {
  return new Problem(403, 'cross-site', detail);
}

function isFromBrowser(req: Request): boolean {
  return ['origin', 'sec-fetch-site', 'referer'].some((name) => req.get(name) !== undefined);
}

function isFromAnotherSite(req: Request): boolean {
  // Browsers tell it only over TLS and to localhost; elsewhere the Origin must name the host that was asked.
  const site = req.get('sec-fetch-site');
  if (site !== undefined) return site !== 'same-origin' && site !== 'none';
  const origin = req.get('origin');
  if (origin === undefined) return false;
  return URL.parse(origin)?.host !== req.get('host');
}

function isSame(one: string, other: string): boolean {
  const [a, b] = [Buffer.from(one), Buffer.from(other)];
  return a.length === b.length && timingSafeEqual(a, b);
}

function readCookie(req: Request, name: string): string | undefined {
  for (const pair of (req.get('cookie') ?? '').split(';')) {
    const [key, value] = pair.trim().split('=');
    if (key === name && value) return value;
  }
  return undefined;
}
