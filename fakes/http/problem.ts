import { STATUS_CODES } from 'node:http';
import type { ErrorRequestHandler, RequestHandler, Response } from 'express';
import type * as z from 'zod';

/** An expected failure of a fake; answered as an RFC 9457 problem document. */
export class FakeProblem extends Error {
  constructor(
    readonly status: number,
    readonly code: string,
    /** What to do about it. */
    readonly detail: string,
  ) {
    super(detail);
  }
}

/** @throws FakeProblem 400 naming the fields at fault */
export function parseInput<T extends z.ZodType>(schema: T, value: unknown): z.infer<T> {
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  if (value === undefined)
    throw new FakeProblem(400, 'bad-request', 'Send a body as JSON, with content-type application/json.');
  const sentences = parsed.error.issues.map(({ path, message }) => `${path.join('.') || 'body'}: ${message}`);
  throw new FakeProblem(400, 'bad-request', `Please correct ${sentences.slice(0, 5).join('; ')}.`);
}

export const nothingHere: RequestHandler = (req) => {
  throw new FakeProblem(
    404,
    'not-found',
    `There is no ${req.method} ${req.path} here; see the README of this fake.`,
  );
};

/** Last in every fake's chain. */
export const answerProblems: ErrorRequestHandler = (error: unknown, _req, res, next) => {
  if (res.headersSent) {
    next(error);
    return;
  }
  if (error instanceof FakeProblem) {
    if (error.status === 401) res.setHeader('www-authenticate', 'Bearer');
    answer(res, error);
    return;
  }
  const refused = bodyParserRefusal(error);
  if (refused) {
    answer(res, refused);
    return;
  }
  console.error(error);
  answer(res, new FakeProblem(500, 'bug', 'The fake itself failed; its output has the stack.'));
};

function answer(res: Response, { status, code, detail }: FakeProblem): void {
  res
    .status(status)
    .type('application/problem+json')
    .send(
      JSON.stringify({ type: `/problems/${code}`, title: STATUS_CODES[status] ?? 'Problem', status, detail }),
    );
}

/** Express' body parsers throw errors that carry their own 4xx. */
function bodyParserRefusal(error: unknown): FakeProblem | undefined {
  if (!(error instanceof Error) || !('status' in error) || typeof error.status !== 'number') return undefined;
  if (error.status < 400 || error.status > 499) return undefined;
  const detail =
    error.status === 413
      ? 'The body is too large; send fewer values at a time.'
      : `The body cannot be read: ${error.message}`;
  return new FakeProblem(error.status, 'bad-request', detail);
}
