import { randomUUID } from 'node:crypto';
import type { Request, RequestHandler } from 'express';
import type { Logger } from 'pino';

const ids = new WeakMap<Request, string>();

/** The id a request goes by in the log and in a problem's `instance`. */
export function requestIdOf(req: Request): string {
  const known = ids.get(req);
  if (known) return known;
  const id = randomUUID();
  ids.set(req, id);
  return id;
}

/** Slower answers are worth a line in the log. */
const slowMs = 1000;

/** Gives each request its id, in the answer's X-Request-Id too, and logs how it went. */
export function logRequests(logger: Logger): RequestHandler {
  return (req, res, next) => {
    const requestId = requestIdOf(req);
    res.setHeader('X-Request-Id', requestId);
    const startedAt = performance.now();
    res.once('close', () => {
      const ms = Math.round(performance.now() - startedAt);
      // A live stream is open for hours and slow by nature.
      const isSlow = ms > slowMs && res.getHeader('content-type') !== 'text/event-stream';
      logger[isSlow ? 'warn' : 'debug'](
        { requestId, method: req.method, path: req.path, status: res.statusCode, ms },
        isSlow ? 'slow answer' : 'answered',
      );
    });
    next();
  };
}
