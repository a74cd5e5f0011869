import type { ProblemDocument } from '@shared/api/common';
import { session, type Session } from '@shared/api/session';
import { expect, it } from 'vitest';
import { InlinePasswordHasher } from '../../server/access/password-hasher';
import { startTestApp, testPassword } from './support/test-app';

const minute = 60_000;
const hour = 60 * minute;
const operator = { username: 'operator', password: testPassword };
const wrong = { username: 'operator', password: 'not the password' };

it('answers nobody with a null user, the site and the server’s clock', async () => {
  const app = await startTestApp();
  await app.database.models.settings.create({
    key: 'site',
    value: { name: 'Skarn Inlet', timeZone: 'America/Halifax', demonstration: true },
  });
  const { status, body } = await app.client().json('GET', '/api/session');
  expect(status).toBe(200);
  expect(session.parse(body)).toEqual({
    user: null,
    now: app.clock.now(),
    site: {
      name: 'Skarn Inlet',
      timeZone: 'America/Halifax',
      barometricPressure: 101_325,
      demonstration: true,
    },
  });
});

it('signs in a script that sends name and password and keeps its cookie, and nothing else', async () => {
  const { client } = await startTestApp();
  const script = client();
  const answer = await script.json<Session>('POST', '/api/session', operator);
  expect(answer.status).toBe(200);
  expect(answer.body.user).toMatchObject({ username: 'operator', name: 'The operator', role: 'operator' });
  expect((await script.json<Session>('GET', '/api/session')).body.user?.username).toBe('operator');
  expect((await client().json<Session>('GET', '/api/session')).body.user).toBeNull();
});

it('takes a name in other letters and with spaces around it for the same person', async () => {
  const { client } = await startTestApp();
  const answer = await client().json<Session>('POST', '/api/session', {
    ...operator,
    username: ' OPERATOR ',
  });
  expect(answer.body.user?.username).toBe('operator');
});

it('answers a wrong password, an unknown name and a disabled user in the same words', async () => {
  const { client, database } = await startTestApp();
  await database.models.users.update({ disabled: true }, { where: { username: 'engineer' } });
  const refusals = [
    wrong,
    { username: 'nobody', password: testPassword },
    { username: 'engineer', password: testPassword },
  ];
  for (const credentials of refusals) {
    const { status, body } = await client().json<ProblemDocument>('POST', '/api/session', credentials);
    expect([status, body.detail]).toEqual([401, 'User name or password is wrong.']);
  }
});

it.each([
  ['no body', undefined, {}],
  ['no name', { password: 'x' }, { username: 'This is missing.' }],
  ['an empty password', { username: 'x', password: '' }, { password: 'Type your password.' }],
])('answers 400 and names the field for %s', async (_what, body, errors) => {
  const { client } = await startTestApp();
  const answer = await client().json<ProblemDocument>('POST', '/api/session', body);
  expect(answer.status).toBe(400);
  expect(answer.body.errors ?? {}).toMatchObject(errors);
});

it('refuses a password of more than 72 bytes, of which bcrypt would only read the first', async () => {
  const app = await startTestApp();
  const long = 'ü'.repeat(36);
  const passwordHash = await new InlinePasswordHasher(4).hash(long);
  await app.database.models.users.update({ passwordHash }, { where: { username: 'operator' } });
  const signIn = (password: string) => app.client().send('POST', '/api/session', { ...operator, password });
  expect((await signIn(long)).status).toBe(200);
  expect((await signIn(`${long}!`)).status).toBe(401);
});

it('gives a new session at sign-in, so that an id planted before is worth nothing', async () => {
  const { client, signedIn } = await startTestApp();
  const victim = client();
  victim.cookies.set('dewmark.sid', 's%3Aplanted.signature');
  await victim.json('POST', '/api/session', operator);
  expect(victim.cookies.get('dewmark.sid')).not.toContain('planted');

  const again = await signedIn('operator');
  const earlier = client();
  for (const [name, value] of again.cookies) earlier.cookies.set(name, value);
  await again.json('POST', '/api/session', { username: 'engineer', password: testPassword });
  expect(again.cookies.get('dewmark.sid')).not.toBe(earlier.cookies.get('dewmark.sid'));
  expect((await earlier.json<Session>('GET', '/api/session')).body.user).toBeNull();
});

it('ends the session on the server at sign-out, and signing out again changes nothing', async () => {
  const { client, signedIn, sessionsDatabase } = await startTestApp();
  const person = await signedIn('operator');
  const copy = client();
  for (const [name, value] of person.cookies) copy.cookies.set(name, value);
  expect((await person.send('DELETE', '/api/session')).status).toBe(204);
  expect((await copy.json<Session>('GET', '/api/session')).body.user).toBeNull();
  expect(await sessionsDatabase.sessions.count()).toBe(0);
  expect((await person.send('DELETE', '/api/session')).status).toBe(204);
});

it('keeps the session’s cookie from scripts and other sites, and Secure behind TLS', async () => {
  const plain = await startTestApp();
  const cookieOf = async (url: string, headers: Record<string, string>) => {
    const response = await fetch(`${url}/api/session`, {
      method: 'POST',
      headers: { 'content-type': 'application/json', ...headers },
      body: JSON.stringify(operator),
    });
    return response.headers.getSetCookie().find((cookie) => cookie.startsWith('dewmark.sid='));
  };
  const overHttp = await cookieOf(plain.url, {});
  expect(overHttp).toMatch(/HttpOnly/);
  expect(overHttp).toMatch(/SameSite=Lax/);
  expect(overHttp).not.toMatch(/Secure/);
  const proxied = await startTestApp({ behindTls: true });
  expect(await cookieOf(proxied.url, { 'x-forwarded-proto': 'https' })).toMatch(/Secure/);
});

it('ends a session after twelve idle hours and keeps one that is used', async () => {
  const { signedIn, clock } = await startTestApp();
  const idle = await signedIn('operator');
  const used = await signedIn('engineer');
  for (let hours = 0; hours < 12; hours++) {
    clock.advance(hour);
    expect((await used.json<Session>('GET', '/api/session')).body.user?.role).toBe('engineer');
  }
  expect((await idle.json<Session>('GET', '/api/session')).body.user).toBeNull();
  expect((await idle.send('GET', '/api/journal')).status).toBe(401);
});

it('ends every session after seven days, used or not', async () => {
  const { signedIn, clock } = await startTestApp();
  const used = await signedIn('operator');
  const userNow = async () => (await used.json<Session>('GET', '/api/session')).body.user;
  for (let hours = 0; hours < 7 * 24 - 1; hours += 6) {
    clock.advance(6 * hour - (hours === 0 ? minute : 0));
    expect(await userNow()).not.toBeNull();
  }
  clock.advance(minute);
  expect(await userNow()).toBeNull();
});

it('writes the use of a session down at most each five minutes', async () => {
  const { signedIn, clock, sessionsDatabase } = await startTestApp();
  const person = await signedIn('operator');
  const stored = async () =>
    (await sessionsDatabase.sessions.findAll({ raw: true })).map(
      (row) => (row as unknown as { expires: number }).expires,
    );
  const [atStart] = await stored();
  clock.advance(4 * minute);
  await person.send('GET', '/api/session');
  expect(await stored()).toEqual([atStart]);
  clock.advance(minute);
  await person.send('GET', '/api/session');
  // Written as the answer goes out, so it may land a moment after it.
  await expect.poll(stored).toEqual([atStart! + 5 * minute]);
});

it('deletes expired sessions and old failures when it tidies up, and no others', async () => {
  const { signedIn, client, clock, sessionsDatabase, tidyUp } = await startTestApp();
  await signedIn('operator');
  await client().send('POST', '/api/session', wrong);
  clock.advance(11 * hour);
  await signedIn('engineer');
  await tidyUp();
  expect(await sessionsDatabase.sessions.count()).toBe(2);
  clock.advance(hour);
  await tidyUp();
  expect(await sessionsDatabase.sessions.count()).toBe(1);
  const failures = async () =>
    (await sessionsDatabase.sequelize.query('SELECT * FROM sign_in_failure'))[0].length;
  expect(await failures()).toBe(1);
  clock.advance(13 * hour);
  await tidyUp();
  expect(await failures()).toBe(0);
});

it('lets a disabled user do nothing more, in the session they have', async () => {
  const { signedIn, database } = await startTestApp();
  const person = await signedIn('operator');
  await database.models.users.update({ disabled: true }, { where: { username: 'operator' } });
  expect((await person.send('GET', '/api/journal')).status).toBe(401);
});

it('locks a name after five failures for a minute, doubling up to fifteen, and says for how long', async () => {
  const { client, clock } = await startTestApp();
  const attempt = (credentials = wrong) =>
    client().json<ProblemDocument>('POST', '/api/session', credentials);
  for (let failure = 1; failure <= 5; failure++) expect((await attempt()).status).toBe(401);
  for (const minutes of [1, 2, 4, 8, 15, 15]) {
    const refused = await attempt(operator);
    expect(refused.status).toBe(429);
    expect(refused.body.detail).toContain(`${minutes * 60} s`);
    clock.advance(minutes * minute - 1);
    expect((await attempt(operator)).status).toBe(429);
    clock.advance(1);
    expect((await attempt()).status).toBe(401);
  }
});

it('forgets the failures of a name once it has signed in', async () => {
  const { client } = await startTestApp();
  const attempt = (credentials: object) => client().send('POST', '/api/session', credentials);
  for (let round = 0; round < 3; round++) {
    for (let failure = 1; failure <= 4; failure++) expect((await attempt(wrong)).status).toBe(401);
    expect((await attempt(operator)).status).toBe(200);
  }
});

it('gains a guesser nothing to send many attempts at once', async () => {
  const { client } = await startTestApp();
  const answers = await Promise.all(
    Array.from({ length: 20 }, () => client().send('POST', '/api/session', wrong)),
  );
  const statuses = answers.map((answer) => answer.status);
  expect(statuses.filter((status) => status === 401)).toHaveLength(5);
  expect(statuses.filter((status) => status === 429)).toHaveLength(15);
});

it('does not let a stranger at another address lock the operator out', async () => {
  const { client } = await startTestApp({ behindTls: true });
  const at = (address: string, credentials: object) =>
    client().send('POST', '/api/session', credentials, {
      'x-forwarded-for': address,
      'x-forwarded-proto': 'https',
    });
  for (let failure = 0; failure < 8; failure++) await at('192.0.2.66', wrong);
  expect((await at('192.0.2.66', operator)).status).toBe(429);
  expect((await at('192.0.2.10', operator)).status).toBe(200);
});

it('believes no forwarded address unless a proxy is in front', async () => {
  const { client } = await startTestApp();
  const statuses: number[] = [];
  for (let failure = 0; failure < 6; failure++) {
    const headers = { 'x-forwarded-for': `192.0.2.${failure}` };
    statuses.push((await client().send('POST', '/api/session', wrong, headers)).status);
  }
  expect(statuses).toEqual([401, 401, 401, 401, 401, 429]);
});

it('writes the lock of a name that exists into the journal, and of no other', async () => {
  const { client, signedIn } = await startTestApp();
  for (const username of ['operator', 'invented'])
    for (let failure = 0; failure < 5; failure++)
      await client().send('POST', '/api/session', { username, password: 'wrong password' });
  const reader = await signedIn('administrator');
  const { body } = await reader.json<{
    items: { action: string; subject: { name: string }; user: unknown }[];
  }>('GET', '/api/journal');
  expect(body.items).toMatchObject([
    { action: 'sign-in-locked', subject: { name: 'The operator' }, user: null },
  ]);
});

it('refuses an address after sixty failures a minute, whatever the names', async () => {
  const { client } = await startTestApp();
  const attempt = (i: number) =>
    client().send('POST', '/api/session', { username: `name${i}`, password: 'wrong password' });
  for (let i = 0; i < 60; i++) expect((await attempt(i)).status).toBe(401);
  expect((await attempt(60)).status).toBe(429);
});

it('logs neither password nor session', async () => {
  const { signedIn, client, log } = await startTestApp();
  const person = await signedIn('operator');
  await client().send('POST', '/api/session', wrong);
  const text = JSON.stringify(log);
  expect(text).toContain('signed in');
  expect(text).toContain('sign-in refused');
  expect(text).not.toContain(testPassword);
  expect(text).not.toContain(wrong.password);
  expect(text).not.toContain(person.cookies.get('dewmark.sid')!.slice(4, 30));
});
