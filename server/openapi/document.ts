import { OpenAPIRegistry, OpenApiGeneratorV31, type RouteConfig } from '@asteasolutions/zod-to-openapi';
import { problem } from '@shared/api/common';
import { permissions } from '@shared/api/permissions';
import { operations, type Operation } from './operations';

type Answers = RouteConfig['responses'];

const schemes = { session: [] };

/** The API as OpenAPI 3.1, made from the very schemas that check it. */
export function openApiDocument(): object {
  const registry = new OpenAPIRegistry();
  registry.registerComponent('securitySchemes', 'session', {
    type: 'apiKey',
    in: 'cookie',
    name: 'dewmark.sid',
    description: 'The cookie POST /api/session answers with.',
  });
  for (const operation of operations) registry.registerPath(toRoute(operation));
  return new OpenApiGeneratorV31(registry.definitions).generateDocument({
    openapi: '3.1.0',
    info: {
      title: 'Dewmark',
      version: '1',
      description:
        'Inferred composition of distillation products. Times are UTC milliseconds; quantities SI: K, Pa absolute, mol/mol.',
    },
    servers: [{ url: '/' }],
  });
}

function toRoute(operation: Operation): RouteConfig {
  const { method, path, summary, tag, requirement, params, query, body } = operation;
  const isOpen = requirement === 'nothing';
  return {
    method,
    path,
    summary,
    tags: [tag],
    description: isOpen ? 'Open to everybody.' : `For: ${permissions[requirement].join(', ')}.`,
    security: isOpen ? [] : [schemes],
    request: {
      ...(params && { params }),
      ...(query && { query }),
      ...(body && { body: { required: true, content: { 'application/json': { schema: body } } } }),
    },
    responses: { ...answersOf(operation), ...problemsOf(operation) },
  };
}

function answersOf({ answers, mediaType = 'application/json' }: Operation): Answers {
  return Object.fromEntries(
    Object.entries(answers).map(([status, { what, schema }]) => [
      status,
      { description: what, ...(schema && { content: { [mediaType]: { schema } } }) },
    ]),
  );
}

function problemsOf({ requirement, params, query, body, problems = {} }: Operation): Answers {
  const asksSomething = params !== undefined || query !== undefined || body !== undefined;
  const words: Record<number, string> = { 429: 'Too many requests.' };
  if (asksSomething) words[400] = 'A field is missing or wrong; `errors` names it.';
  if (requirement !== 'nothing') {
    words[401] = 'Nobody is signed in.';
    words[403] = 'The role does not allow it.';
  }
  Object.assign(words, problems);
  return Object.fromEntries(
    Object.entries(words).map(([status, description]) => [
      status,
      { description, content: { 'application/problem+json': { schema: problem } } },
    ]),
  );
}
