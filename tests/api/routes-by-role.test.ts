import { may, type Permission } from '@shared/api/permissions';
import { roles } from '@shared/api/session';
import { Router } from 'express';
import { expect, it } from 'vitest';
import { requirePermission, requireSignedIn, type Requirement } from '../../server/access/require';
import { routesOf } from '../../server/http/routes-of';
import { startTestApp } from './support/test-app';

/**
 * Every route and the least it asks of its caller, written down by hand: a new route without a line here fails, and so
 * does one that asks for something else.
 */
const table: Record<string, Requirement> = {
  'GET /api/health': 'nothing',
  'GET /api/openapi.json': 'nothing',
  'GET /api/session': 'nothing',
  'POST /api/session': 'nothing',
  'DELETE /api/session': 'nothing',
  'GET /api/stream': 'look',
  'GET /api/journal': 'look',
  'GET /api/notes': 'look',
  'POST /api/notes': 'writeNotes',
  'GET /api/towers': 'look',
  'GET /api/sensors': 'look',
  'GET /api/sensors/:id': 'look',
  'GET /api/sensors/:id/trend': 'look',
  'GET /api/samples': 'look',
  'GET /api/samples/:id': 'look',
  'POST /api/samples': 'enterSamples',
  'POST /api/equilibrium/bubble-point': 'look',
  'POST /api/equilibrium/dew-point': 'look',
  'POST /api/equilibrium/flash': 'look',
  'POST /api/equilibrium/vapour-pressure': 'look',
  'POST /api/equilibrium/inference': 'look',
  'GET /api/equilibrium/components': 'look',
};

/** Permissions that no route asks for yet. */
const permissionsMet: Permission[] = [
  'decideHeldSamples',
  'setUpSensors',
  'approve',
  'administer',
  'acknowledge',
];

it('has a line for each route of the application, and each route states what the line says', async () => {
  const { express } = await startTestApp();
  const found = Object.fromEntries(
    routesOf(express).map(({ method, path, requirement }) => [`${method} ${path}`, requirement]),
  );
  expect(found).toEqual(table);
});

it.each([null, ...roles])('lets %s through exactly where the table says so', async (role) => {
  const app = await startTestApp();
  const wrong: string[] = [];
  for (const [route, requirement] of Object.entries(table)) {
    // Signing out would end the session the walk needs; it has tests of its own.
    if (route === 'DELETE /api/session') continue;
    const client = role === null ? app.client() : await app.signedIn(role);
    const [method, path] = route.replace(':id', '1').split(' ');
    const response = await client.send(method!, path!, method === 'POST' ? {} : undefined);
    await response.body?.cancel();
    const isAllowed = requirement === 'nothing' || (role !== null && isMet(requirement, role));
    const isRefused = response.status === 401 || response.status === 403;
    const expected = role === null ? 401 : 403;
    if (isAllowed ? isRefused : response.status !== expected)
      wrong.push(`${route} answered ${response.status}`);
  }
  expect(wrong).toEqual([]);
});

it.each([null, ...roles])('checks the permissions no route has yet for %s', async (role) => {
  const router = Router();
  for (const permission of permissionsMet)
    router.get(`/api/probe/${permission}`, requirePermission(permission), (_req, res) => {
      res.json(permission);
    });
  router.get('/api/probe', requireSignedIn, (_req, res) => {
    res.json('somebody');
  });
  const app = await startTestApp({ routers: [router] });
  const client = role === null ? app.client() : await app.signedIn(role);
  for (const permission of permissionsMet) {
    const { status } = await client.send('GET', `/api/probe/${permission}`);
    expect([permission, status]).toEqual([
      permission,
      role === null ? 401 : may(role, permission) ? 200 : 403,
    ]);
  }
  expect((await client.send('GET', '/api/probe')).status).toBe(role === null ? 401 : 200);
});

function isMet(requirement: Exclude<Requirement, 'nothing'>, role: (typeof roles)[number]): boolean {
  return requirement === 'signed-in' || may(role, requirement);
}
