import type * as z from 'zod';
import { Problem } from './problem';

/**
 * What a body, a query or path parameters say, checked by a schema of `shared/api`.
 *
 * @throws Problem 400 `bad-request` with a sentence for each field at fault, its path joined by dots
 */
export function parseRequest<T extends z.ZodType>(schema: T, value: unknown): z.infer<T> {
  const parsed = schema.safeParse(value, { error: wordsForMissing });
  if (parsed.success) return parsed.data;
  if (value === undefined)
    throw new Problem(400, 'bad-request', 'The request has no body; send one as JSON (application/json).');
  const errors: Record<string, string> = {};
  for (const issue of parsed.error.issues) errors[issue.path.join('.')] ??= issue.message;
  const sentences = Object.entries(errors).map(([path, message]) => (path ? `${path}: ${message}` : message));
  throw new Problem(400, 'bad-request', `Please correct: ${sentences.slice(0, 5).join(' · ')}`, { errors });
}

/** Fields whose schema has no words of its own for being left out get these. */
function wordsForMissing(issue: { code?: string; input?: unknown }): string | undefined {
  return issue.code === 'invalid_type' && issue.input === undefined ? 'This is missing.' : undefined;
}
