import { expect, it } from 'vitest';
import { routesOf } from '../../server/http/routes-of';
import { operations } from '../../server/openapi/operations';
import { startTestApp } from './support/test-app';

interface Document {
  openapi: string;
  paths: Record<string, Record<string, { responses: Record<string, unknown>; requestBody?: unknown }>>;
}

it('describes every route of the application with the permission it asks for, and no other', async () => {
  const { express } = await startTestApp();
  const running = routesOf(express).map(
    ({ method, path, requirement }) => `${method} ${path.replace(/:(\w+)/g, '{$1}')} ${requirement}`,
  );
  const described = operations.map(
    ({ method, path, requirement }) => `${method.toUpperCase()} ${path} ${requirement}`,
  );
  expect(described.sort()).toEqual(running.sort());
});

it('is OpenAPI 3.1 that anybody may read, made from the schemas that check requests', async () => {
  const { client } = await startTestApp();
  const { status, body } = await client().json<Document>('GET', '/api/openapi.json');
  expect(status).toBe(200);
  expect(body.openapi).toBe('3.1.0');
  expect(Object.keys(body.paths)).toHaveLength(new Set(operations.map(({ path }) => path)).size);
  const signIn = body.paths['/api/session']!['post']!;
  expect(signIn.requestBody).toMatchObject({
    content: {
      'application/json': {
        schema: {
          type: 'object',
          properties: { username: { type: 'string', minLength: 1, maxLength: 80 } },
          required: ['username', 'password'],
        },
      },
    },
  });
  expect(Object.keys(signIn.responses).sort()).toEqual(['200', '400', '401', '429']);
  // Every reference within the document leads somewhere.
  for (const [, pointer] of JSON.stringify(body).matchAll(/"\$ref":"#\/([^"]+)"/g))
    expect(
      pointer!.split('/').reduce<unknown>((node, key) => (node as Record<string, unknown>)[key], body),
    ).toBeDefined();
});
