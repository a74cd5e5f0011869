import { createHash } from 'node:crypto';
import * as z from 'zod';
import { instant } from '@shared/api/common';
import { FakeProblem } from '../http/problem';

const content = z.object({
  /** Digest of the question it belongs to. */
  question: z.string(),
  /** Where each tag of that question reads on; null where it is done. */
  next: z.array(instant.nullable()),
});

interface Question {
  readonly tags: readonly string[];
  readonly from: number;
  readonly to: number;
}

/** A token that holds all there is to know for the next page, so that the historian remembers nothing between pages. */
export function writeContinuation(question: Question, next: readonly (number | null)[]): string {
  return Buffer.from(JSON.stringify({ question: digest(question), next })).toString('base64url');
}

/** @throws FakeProblem 400 when it is damaged or belongs to another question */
export function readContinuation(question: Question, token: string): readonly (number | null)[] {
  const parsed = content.safeParse(parseJson(Buffer.from(token, 'base64url').toString()));
  if (!parsed.success)
    throw new FakeProblem(400, 'bad-continuation', 'This continuation was not given by this historian.');
  const { question: asked, next } = parsed.data;
  if (asked !== digest(question) || next.length !== question.tags.length)
    throw new FakeProblem(
      400,
      'bad-continuation',
      'This continuation belongs to another question: repeat tags, from and to as they were.',
    );
  return next;
}

function digest({ tags, from, to }: Question): string {
  return createHash('sha256')
    .update(JSON.stringify([tags, from, to]))
    .digest('base64url')
    .slice(0, 16);
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined; // not ours; the caller says so
  }
}
