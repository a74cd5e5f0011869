import { request } from 'node:http';
import type { ProblemDocument } from '@shared/api/common';
import { problem } from '@shared/api/common';
import { Router } from 'express';
import { expect, it } from 'vitest';
import { openToAll } from '../../server/access/require';
import { Problem } from '../../server/http/problem';
import { startTestApp } from './support/test-app';

it('answers an unknown address under /api with a problem document, whatever the method', async () => {
  const { signedIn, client } = await startTestApp();
  for (const one of [client(), await signedIn('operator')])
    for (const method of ['GET', 'POST', 'DELETE']) {
      const response = await one.send(method, '/api/nothing-here');
      expect(response.status).toBe(404);
      expect(response.headers.get('content-type')).toContain('application/problem+json');
      const document = problem.parse(await response.json());
      expect(document).toMatchObject({ type: '/problems/not-found', title: 'Not Found', status: 404 });
      expect(document.detail).toContain(`${method} /api/nothing-here`);
    }
});

it('gives each request an id, in the header, in the problem and in the log', async () => {
  const { client, log } = await startTestApp();
  const response = await client().send('GET', '/api/journal');
  const id = response.headers.get('x-request-id');
  expect(id).toMatch(/^[0-9a-f-]{36}$/);
  expect(((await response.json()) as ProblemDocument).instance).toBe(id);
  await expect
    .poll(() => log.find((line) => line['requestId'] === id))
    .toMatchObject({ method: 'GET', path: '/api/journal', status: 401 });
});

it('answers a bug with 500 and no details, and logs it with the request’s id', async () => {
  const router = Router();
  router.get('/api/bug', openToAll, () => {
    throw new Error('secret words of a stack');
  });
  const { client, log } = await startTestApp({ routers: [router] });
  const { status, body } = await client().json<ProblemDocument>('GET', '/api/bug');
  expect(status).toBe(500);
  expect(JSON.stringify(body)).not.toContain('secret');
  const line = log.find((entry) => entry['requestId'] === body.instance && entry['err'] !== undefined);
  expect(JSON.stringify(line)).toContain('secret words of a stack');
});

it('answers a problem thrown late, in a promise, the same way, with Retry-After where it has one', async () => {
  const router = Router();
  router.get('/api/late', openToAll, async () => {
    await Promise.resolve();
    throw new Problem(503, 'busy', 'Later.', { retryAfterSeconds: 7 });
  });
  const { client } = await startTestApp({ routers: [router] });
  const response = await client().send('GET', '/api/late');
  expect([response.status, response.headers.get('retry-after')]).toEqual([503, '7']);
});

it.each([
  ['broken JSON', '{"username":', {}, 400, 'malformed'],
  ['a body over 1 MB', JSON.stringify({ username: 'x'.repeat(1_100_000) }), {}, 413, 'too-large'],
  [
    'another character set',
    '{}',
    { 'content-type': 'application/json; charset=latin1' },
    415,
    'unsupported-media',
  ],
  [
    'a form',
    'username=a&password=b',
    { 'content-type': 'application/x-www-form-urlencoded' },
    400,
    'bad-request',
  ],
])('answers %s with its own status', async (_what, body, headers, status, code) => {
  const { client } = await startTestApp();
  const answer = await client().json<ProblemDocument>('POST', '/api/session', body, headers);
  expect([answer.status, answer.body.type]).toEqual([status, `/problems/${code}`]);
});

it('says for every field what is wrong with it', async () => {
  const { signedIn } = await startTestApp();
  const person = await signedIn('operator');
  const { status, body } = await person.json<ProblemDocument>('POST', '/api/notes', {
    sensorId: 'Not A Slug',
    t: -1,
  });
  expect(status).toBe(400);
  expect(Object.keys(body.errors!).sort()).toEqual(['sensorId', 't', 'text']);
  expect(body.errors!['text']).toBe('This is missing.');
});

it('serves the page for every address inside the application, with a new nonce each time', async () => {
  const { client } = await startTestApp();
  const nonces = new Set<string>();
  for (const address of ['/', '/board', '/towers/depropaniser?range=8h', '/index.html']) {
    const response = await client().send('GET', address);
    const page = await response.text();
    const [, nonce] = /ngCspNonce="([^"]+)"/.exec(page)!;
    expect(response.headers.get('content-security-policy')).toContain(`style-src 'self' 'nonce-${nonce}'`);
    expect(response.headers.get('cache-control')).toBe('no-store');
    expect(page).not.toContain('CSP_NONCE');
    nonces.add(nonce!);
  }
  expect(nonces.size).toBe(4);
});

it('lets no inline script, frame or foreign source into the page, and asks for HTTPS only behind TLS', async () => {
  const plain = await startTestApp();
  const headers = (await plain.client().send('GET', '/')).headers;
  const policy = headers.get('content-security-policy')!;
  expect(policy).toContain("default-src 'self'");
  expect(policy).toContain("script-src 'self';");
  expect(policy).toContain("frame-ancestors 'none'");
  expect(policy).not.toContain('unsafe');
  expect(policy).not.toContain('upgrade-insecure-requests');
  expect(headers.get('strict-transport-security')).toBeNull();
  expect(headers.get('x-content-type-options')).toBe('nosniff');
  expect(headers.get('x-powered-by')).toBeNull();
  const proxied = await startTestApp({ behindTls: true });
  const secure = (await proxied.client().send('GET', '/')).headers;
  expect(secure.get('content-security-policy')).toContain('upgrade-insecure-requests');
  expect(secure.get('strict-transport-security')).toContain('max-age=31536000');
});

it('lets browsers keep files named by their content for ever, and packs them', async () => {
  const { client } = await startTestApp();
  const script = await client().send('GET', '/main-ABCD1234.js', undefined, { 'accept-encoding': 'gzip' });
  expect(script.headers.get('cache-control')).toBe('public, max-age=31536000, immutable');
  expect(script.headers.get('content-encoding')).toBe('gzip');
  const icon = await client().send('GET', '/favicon.svg');
  expect(icon.headers.get('cache-control')).toBe('public, max-age=300');
});

it('answers a file that is not there with 404, not with the page', async () => {
  const { client } = await startTestApp();
  expect((await client().send('GET', '/chunk-GONE1234.js')).status).toBe(404);
});

it('never serves a file outside the screens’ folder', async () => {
  const { url } = await startTestApp();
  // fetch would tidy the path up before sending it.
  const answer = await new Promise<string>((resolve, reject) => {
    const asked = request(`${url}/`, { path: '/..%2fplant.sqlite' }, (response) => {
      let text = `${response.statusCode} `;
      response.setEncoding('latin1').on('data', (part: string) => (text += part));
      response.on('end', () => resolve(text));
    });
    asked.on('error', reject).end();
  });
  expect(answer).not.toContain('SQLite format');
  expect(answer.startsWith('200')).toBe(false);
});

it('lets no cache keep an answer of the API', async () => {
  const { client } = await startTestApp();
  for (const path of ['/api/session', '/api/health', '/api/journal'])
    expect((await client().send('GET', path)).headers.get('cache-control')).toBe('no-store');
});

it('lets a signed-in user send 50 requests a second, and stops a thousand in ten seconds', async () => {
  const { signedIn } = await startTestApp();
  const person = await signedIn('operator');
  const other = await signedIn('engineer');
  const statuses: number[] = [];
  for (let batch = 0; batch < 11; batch++)
    statuses.push(
      ...(await Promise.all(
        Array.from({ length: 100 }, async () => (await person.send('GET', '/api/session')).status),
      )),
    );
  expect(statuses.slice(0, 500).every((status) => status === 200)).toBe(true);
  expect(statuses.at(-1)).toBe(429);
  expect((await other.send('GET', '/api/session')).status).toBe(200);
});
