import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';
import { readdirSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Session } from '@shared/api/session';
import { afterAll, beforeAll, expect, it, onTestFinished } from 'vitest';
import { buildPrograms, removePrograms, run } from './support/built-server';
import { Client } from './support/client';
import { temporaryFolder } from './support/temporary-folder';

let programs: string;
beforeAll(async () => {
  programs = await buildPrograms({
    main: 'server/main.ts',
    'password.worker': 'server/access/password.worker.ts',
    'create-user': 'server/access/create-user.ts',
  });
});
afterAll(() => removePrograms(programs));

const secret = 'a secret of more than thirty-two characters';
const password = 'a password long enough';

const startMain = (env: Record<string, string>) =>
  run(join(programs, 'main.js'), { env: { PORT: '0', SESSION_SECRET: secret, ...env } });

const createUser = (dataDir: string, args: readonly string[], input = `${password}\n`) =>
  run(join(programs, 'create-user.js'), { env: { DATA_DIR: dataDir }, args, input });

/** Waits until it listens. @returns its address */
async function addressOf(server: ReturnType<typeof startMain>): Promise<string> {
  const portIn = () => /"port":(\d+),"msg":"listening"/.exec(server.output())?.[1];
  const port = await Promise.race([
    expect.poll(portIn, { timeout: 20_000, interval: 50 }).toBeDefined().then(portIn),
    server.ended.then((code) => {
      throw new Error(`ended with ${code}: ${server.output()}`);
    }),
  ]);
  return `http://127.0.0.1:${port}`;
}

it('makes the first administrator from the command line, who can then sign in', async () => {
  const dataDir = temporaryFolder();
  const made = createUser(dataDir, ['--username', 'ada', '--role', 'administrator', '--name', 'Ada Berg']);
  expect([await made.ended, made.output()]).toEqual([0, 'Added ada as administrator.\n']);

  const client = new Client(await addressOf(startMain({ DATA_DIR: dataDir })));
  expect(
    (await client.send('POST', '/api/session', { username: 'ada', password: `${password}!` })).status,
  ).toBe(401);
  const { status, body } = await client.json<Session>('POST', '/api/session', { username: 'ada', password });
  expect([status, body.user]).toEqual([
    200,
    { id: 1, username: 'ada', name: 'Ada Berg', role: 'administrator' },
  ]);
  const journal = await client.json<{ items: unknown[] }>('GET', '/api/journal');
  expect(journal.body.items).toMatchObject([
    { action: 'user-created', user: null, subject: { kind: 'user', name: 'Ada Berg' } },
  ]);
});

it.each([
  ['a short password', ['--username', 'ada', '--role', 'operator'], 'short', /at least 12 characters/],
  [
    'a password over 72 bytes',
    ['--username', 'ada', '--role', 'operator'],
    'x'.repeat(73),
    /at most 72 bytes/,
  ],
  ['an unknown role', ['--username', 'ada', '--role', 'king'], password, /--role/],
  ['no name', ['--role', 'operator'], password, /--username: A user name is needed/],
  ['an unknown option', ['--user', 'ada'], password, /--user/],
])('makes no user of %s, and says why in one line', async (_what, args, input, words) => {
  const program = createUser(temporaryFolder(), args, input);
  expect(await program.ended).toBe(1);
  expect(program.output()).toMatch(words);
  expect(program.output().trim().split('\n')).toHaveLength(1);
});

it('makes no second user of the same name', async () => {
  const dataDir = temporaryFolder();
  await createUser(dataDir, ['--username', 'ada', '--role', 'operator']).ended;
  const again = createUser(dataDir, ['--username', 'ADA', '--role', 'administrator']);
  expect([await again.ended, again.output()]).toEqual([1, 'There is a user named ADA already.\n']);
});

it('stops cleanly on SIGTERM with a live stream open, leaving no write-ahead log behind', async () => {
  const dataDir = temporaryFolder();
  await createUser(dataDir, ['--username', 'ada', '--role', 'operator']).ended;
  const server = startMain({ DATA_DIR: dataDir });
  const client = new Client(await addressOf(server));
  await client.send('POST', '/api/session', { username: 'ada', password });
  const stream = await client.send('GET', '/api/stream');
  server.child.kill('SIGTERM');
  // It ends itself with 1 when stopping takes too long.
  expect(await server.ended).toBe(0);
  expect(await stream.text()).toContain('event: beat');
  expect(readdirSync(dataDir).sort()).toEqual(['dewmark.sqlite', 'sessions.sqlite']);
});

it('keeps people signed in over a restart', async () => {
  const dataDir = temporaryFolder();
  await createUser(dataDir, ['--username', 'ada', '--role', 'operator']).ended;
  const first = startMain({ DATA_DIR: dataDir });
  const client = new Client(await addressOf(first));
  await client.send('POST', '/api/session', { username: 'ada', password });
  first.child.kill('SIGTERM');
  await first.ended;
  const again = new Client(await addressOf(startMain({ DATA_DIR: dataDir })));
  for (const [name, value] of client.cookies) again.cookies.set(name, value);
  expect((await again.json<Session>('GET', '/api/session')).body.user?.username).toBe('ada');
});

it('makes the demonstration’s secret once, for its owner’s eyes only', async () => {
  const dataDir = temporaryFolder();
  await addressOf(run(join(programs, 'main.js'), { env: { PORT: '0', DEMO: '1', DATA_DIR: dataDir } }));
  expect(statSync(join(dataDir, 'session-secret')).mode & 0o777).toBe(0o600);
});

it('says in one sentence that its port is in use', async () => {
  const other = createServer();
  await new Promise<void>((resolve) => other.listen(0, '127.0.0.1', resolve));
  onTestFinished(() => void other.close());
  const port = String((other.address() as AddressInfo).port);
  const server = startMain({ PORT: port, DATA_DIR: temporaryFolder() });
  expect([await server.ended, server.output()]).toEqual([
    1,
    `Port ${port} is in use: stop what uses it, or set PORT to another.\n`,
  ]);
});

it('says in one sentence which setting is wrong', async () => {
  const server = startMain({ PORT: 'many', DATA_DIR: temporaryFolder() });
  expect(await server.ended).toBe(1);
  expect(server.output()).toMatch(/^The setting PORT \(it is "many"\): .*\n$/);
});

it('does not start on a database it cannot open, and says why', async () => {
  const dataDir = temporaryFolder();
  writeFileSync(join(dataDir, 'dewmark.sqlite'), 'this is no database, whatever its name says'.repeat(100));
  const server = startMain({ DATA_DIR: dataDir });
  expect(await server.ended).toBe(1);
  expect(server.output()).toContain('file is not a database');
});
