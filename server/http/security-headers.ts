import { randomBytes } from 'node:crypto';
import type { IncomingMessage, ServerResponse } from 'node:http';
import type { RequestHandler, Response } from 'express';
import helmet from 'helmet';

/** The nonce this answer's page may mark its styles with. */
export function styleNonceOf(res: Response): string {
  return (res.locals as { styleNonce: string }).styleNonce;
}

/**
 * Headers that keep a page to itself: scripts from here only and none inline, no frames, no plug-ins. Angular marks the
 * styles it adds with the nonce. Where the plant serves plain HTTP, asking browsers for HTTPS would lock everybody out.
 */
export function securityHeaders(options: { readonly behindTls: boolean }): RequestHandler[] {
  return [
    (_req, res, next) => {
      (res.locals as { styleNonce: string }).styleNonce = randomBytes(16).toString('base64');
      next();
    },
    helmet({
      contentSecurityPolicy: {
        useDefaults: false,
        directives: {
          defaultSrc: ["'self'"],
          scriptSrc: ["'self'"],
          scriptSrcAttr: ["'none'"],
          styleSrc: [
            "'self'",
            (_req: IncomingMessage, res: ServerResponse) => `'nonce-${styleNonceOf(res as Response)}'`,
          ],
          imgSrc: ["'self'", 'data:'],
          fontSrc: ["'self'"],
          connectSrc: ["'self'"],
          objectSrc: ["'none'"],
          baseUri: ["'self'"],
          formAction: ["'self'"],
          frameAncestors: ["'none'"],
          ...(options.behindTls ? { upgradeInsecureRequests: [] } : {}),
        },
      },
      strictTransportSecurity: options.behindTls ? { maxAge: 365 * 24 * 3600 } : false,
      // Over plain HTTP browsers ignore both and complain about it on the console.
      crossOriginOpenerPolicy: options.behindTls,
      originAgentCluster: options.behindTls,
      xFrameOptions: { action: 'deny' },
      referrerPolicy: { policy: 'same-origin' },
    }),
  ];
}
