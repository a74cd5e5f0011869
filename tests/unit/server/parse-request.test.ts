import * as z from 'zod';
import { expect, it } from 'vitest';
import { parseRequest } from '../../../server/http/parse-request';
import { Problem } from '../../../server/http/problem';

const schema = z.object({
  name: z.string('Type a name.'),
  parts: z.array(z.object({ amount: z.number() })),
  limit: z.coerce.number().int().max(10).default(5),
});

function problemOf(value: unknown): Problem {
  try {
    parseRequest(schema, value);
  } catch (error) {
    if (error instanceof Problem) return error;
    throw error;
  }
  throw new Error('was accepted');
}

it('gives back what the schema makes of it, defaults included and unknown fields left out', () => {
  expect(parseRequest(schema, { name: 'a', parts: [], other: 1 })).toEqual({
    name: 'a',
    parts: [],
    limit: 5,
  });
});

it('names each field by its path, the first fault of each, in the schema’s words where it has some', () => {
  const problem = problemOf({ parts: [{ amount: 1 }, { amount: 'x' }, {}], limit: 11 });
  expect([problem.status, problem.code]).toEqual([400, 'bad-request']);
  expect(problem.extra.errors).toEqual({
    name: 'Type a name.',
    'parts.1.amount': expect.stringContaining('expected number') as string,
    'parts.2.amount': 'This is missing.',
    limit: expect.stringContaining('10') as string,
  });
  expect(problem.detail).toContain('parts.2.amount: This is missing.');
});

it('says that there is no body where there is none', () => {
  expect(problemOf(undefined).detail).toContain('no body');
});

it('stops NaN and infinity at the door', () => {
  for (const limit of ['abc', 'NaN', 'Infinity'])
    expect(Object.keys(problemOf({ name: 'a', parts: [], limit }).extra.errors!)).toEqual(['limit']);
});
