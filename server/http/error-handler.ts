import type { ErrorRequestHandler } from 'express';
import type { Logger } from 'pino';
import { Problem } from './problem';
import { requestIdOf } from './request-id';

/** The one way errors of routes are answered: a `Problem` as it says, anything else as 500 without details, and logged. */
export function answerErrors(logger: Logger): ErrorRequestHandler {
  return (error: unknown, req, res, next) => {
    const requestId = requestIdOf(req);
    if (res.headersSent) {
      logger.error({ requestId, err: error }, 'failed after the answer had begun');
      next(error); // Express cuts the connection, the only way left to tell the client
      return;
    }
    const problem = toProblem(error);
    if (problem.status >= 500 && !(error instanceof Problem))
      logger.error({ requestId, method: req.method, path: req.path, err: error }, 'a bug: unexpected error');
    if (problem.extra.retryAfterSeconds !== undefined)
      res.setHeader('Retry-After', String(problem.extra.retryAfterSeconds));
    res
      .status(problem.status)
      .set('Cache-Control', 'no-store')
      .type('application/problem+json')
      .send(JSON.stringify(problem.toDocument(requestId)));
  };
}

function toProblem(error: unknown): Problem {
  if (error instanceof Problem) return error;
  const status = statusOf(error);
  if (status === 413)
    return new Problem(413, 'too-large', 'The request is larger than 1 MB; send less at a time.');
  if (status === 415)
    return new Problem(415, 'unsupported-media', 'Send the body as JSON in UTF-8 (application/json).');
  if (status === 400)
    return new Problem(400, 'malformed', 'The request cannot be read: is its body valid JSON?');
  if (status >= 400 && status < 500) return new Problem(status, 'refused', 'The request cannot be answered.');
  return new Problem(
    500,
    'unexpected',
    'Something went wrong in the server. Tell your administrator the time and the request id.',
  );
}

/** Body parsers and the file server bring their own 4xx. */
function statusOf(error: unknown): number {
  if (typeof error !== 'object' || error === null || !('status' in error)) return 500;
  return typeof error.status === 'number' ? error.status : 500;
}
