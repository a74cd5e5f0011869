import type { ProblemDocument } from '@shared/api/common';
import { expect, it } from 'vitest';
import type { Client } from './support/client';
import { startTestApp, testPassword } from './support/test-app';

const operator = { username: 'operator', password: testPassword };

/** What a browser adds to a request of a page of ours, over TLS or on localhost. */
const ownPage = (url: string) => ({ origin: url, 'sec-fetch-site': 'same-origin' });

/** A write whose own answer (404: there is no such sensor) shows that it was let through. */
const write = (client: Client, headers: Record<string, string> = {}) =>
  client.json<ProblemDocument>('POST', '/api/notes', { sensorId: 'none', t: 0, text: 'x' }, headers);
const letThrough = 404;

it('hands a page the token’s cookie on its first read, readable by scripts', async () => {
  const { url } = await startTestApp();
  const response = await fetch(`${url}/api/session`);
  const cookie = response.headers.getSetCookie().find((one) => one.startsWith('XSRF-TOKEN='));
  expect(cookie).toMatch(/SameSite=Lax/);
  expect(cookie).not.toMatch(/HttpOnly/);
});

it('lets a page of ours write with the token, and not without it or with another', async () => {
  const { url, client } = await startTestApp();
  const page = client(ownPage(url));
  await page.send('GET', '/api/session');
  expect((await page.send('POST', '/api/session', operator, page.tokenHeader())).status).toBe(200);
  expect((await write(page, page.tokenHeader())).status).toBe(letThrough);
  expect((await write(page)).status).toBe(403);
  expect((await write(page, { 'x-xsrf-token': 'a.b' })).status).toBe(403);
});

it('renews the token with the session, so that one from before the sign-in does not pass', async () => {
  const { url, client } = await startTestApp();
  const page = client(ownPage(url));
  await page.send('GET', '/api/session');
  const before = page.tokenHeader()['x-xsrf-token']!;
  await page.send('POST', '/api/session', operator);
  expect(page.tokenHeader()['x-xsrf-token']).not.toBe(before);
  page.cookies.set('XSRF-TOKEN', before);
  expect((await write(page, page.tokenHeader())).status).toBe(403);
  // A read puts it right again.
  await page.send('GET', '/api/session');
  expect((await write(page, page.tokenHeader())).status).toBe(letThrough);
});

it('refuses a cookie and header that agree but were made up elsewhere', async () => {
  const { url, signedIn } = await startTestApp();
  const page = await signedIn('operator', ownPage(url));
  page.cookies.set('XSRF-TOKEN', 'planted.planted');
  expect((await write(page, { 'x-xsrf-token': 'planted.planted' })).status).toBe(403);
});

it.each([
  ['another site by its Sec-Fetch-Site', { 'sec-fetch-site': 'cross-site', origin: 'https://evil.example' }],
  ['a neighbouring site', { 'sec-fetch-site': 'same-site' }],
  ['another site by its Origin', { origin: 'https://evil.example' }],
  ['a page without an origin of its own', { origin: 'null' }],
])('refuses a write and a sign-in from %s, even with the token', async (_what, headers) => {
  const { client, signedIn } = await startTestApp();
  const page = await signedIn('operator');
  await page.send('GET', '/api/session');
  expect((await write(page, { ...page.tokenHeader(), ...headers })).status).toBe(403);
  expect((await client().send('POST', '/api/session', operator, headers)).status).toBe(403);
});

it('lets a page of ours sign in before it has a token', async () => {
  const { url, client } = await startTestApp();
  expect((await client(ownPage(url)).send('POST', '/api/session', operator)).status).toBe(200);
  expect((await client({ origin: url }).send('POST', '/api/session', operator)).status).toBe(200);
});

it('lets a script that holds the session’s cookie write without a token', async () => {
  const { signedIn } = await startTestApp();
  expect((await write(await signedIn('operator'))).status).toBe(letThrough);
});

it('asks for the token as soon as anything speaks of a browser', async () => {
  const { url, signedIn } = await startTestApp();
  const script = await signedIn('operator');
  const tells: Record<string, string>[] = [
    { origin: url },
    { 'sec-fetch-site': 'same-origin' },
    { referer: `${url}/board` },
  ];
  for (const headers of tells) expect((await write(script, headers)).status).toBe(403);
});

it('tells a page whose session has ended to sign in, not that its token is wrong', async () => {
  const { url, signedIn, clock } = await startTestApp();
  const page = await signedIn('operator', ownPage(url));
  clock.advance(13 * 3600_000);
  expect((await write(page, page.tokenHeader())).status).toBe(401);
});
