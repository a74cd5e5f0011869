import { expect, it } from 'vitest';
import { startTestApp } from './support/test-app';

const minute = 60_000;
const hour = 60 * minute;

/** The id inside the signed cookie. */
const idOf = (cookie: string) => decodeURIComponent(cookie).slice(2).split('.')[0]!;

it('keeps the session of a Board that is only looked at for longer than a shift, up to seven days', async () => {
  const { signedIn, clock, sessions } = await startTestApp();
  const board = await signedIn('operator');
  const id = idOf(board.cookies.get('dewmark.sid')!);
  for (let hours = 0; hours < 7 * 24; hours += 6) {
    expect(await sessions.keepAlive(id)).toBe(true);
    clock.advance(6 * hour);
  }
  expect(await sessions.keepAlive(id)).toBe(false);
});

it('says at once that a session has ended when the person signs out', async () => {
  const { signedIn, sessions } = await startTestApp();
  const board = await signedIn('operator');
  const id = idOf(board.cookies.get('dewmark.sid')!);
  expect(await sessions.keepAlive(id)).toBe(true);
  await board.send('DELETE', '/api/session');
  expect(await sessions.keepAlive(id)).toBe(false);
});

it('does not bring a session back that was ended while a request of it was on its way', async () => {
  const { signedIn, client, clock, sessions } = await startTestApp();
  const person = await signedIn('operator');
  const id = idOf(person.cookies.get('dewmark.sid')!);
  const late = client();
  for (const [name, value] of person.cookies) late.cookies.set(name, value);
  clock.advance(10 * minute);
  // Both read the session; one ends it, the other notes its use.
  await Promise.all([
    person.send('DELETE', '/api/session'),
    ...Array.from({ length: 10 }, () => late.send('GET', '/api/session')),
  ]);
  clock.advance(minute);
  expect(await sessions.keepAlive(id)).toBe(false);
});
