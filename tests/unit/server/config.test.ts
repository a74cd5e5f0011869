import { resolve } from 'node:path';
import { expect, it } from 'vitest';
import { ConfigError, readConfig } from '../../../server/config';

const secret = 'x'.repeat(32);

it('has a default for everything but the secret', () => {
  expect(readConfig({ SESSION_SECRET: secret })).toEqual({
    port: 4600,
    host: '127.0.0.1',
    dataDir: resolve('.data'),
    clientDir: resolve('dist/client'),
    sessionSecret: secret,
    behindTls: false,
    logLevel: 'info',
    demo: false,
  });
});

it('needs no secret in the demonstration', () => {
  expect(readConfig({ DEMO: '1' })).toMatchObject({ demo: true, sessionSecret: undefined });
});

it.each([
  [{}, /^The setting SESSION_SECRET: is needed/],
  [{ DEMO: '0' }, /^The setting SESSION_SECRET: is needed/],
  [{ SESSION_SECRET: 'short' }, /^The setting SESSION_SECRET: must have at least 32 characters\.$/],
  [{ SESSION_SECRET: secret, PORT: '70000' }, /^The setting PORT \(it is "70000"\)/],
  [{ SESSION_SECRET: secret, PORT: '4600.5' }, /^The setting PORT/],
  [{ SESSION_SECRET: secret, LOG_LEVEL: 'loud' }, /^The setting LOG_LEVEL \(it is "loud"\)/],
  [{ SESSION_SECRET: secret, DEMO: 'maybe' }, /^The setting DEMO \(it is "maybe"\)/],
  [{ SESSION_SECRET: secret, DATA_DIR: '' }, /^The setting DATA_DIR \(it is ""\)/],
])('refuses %j in one sentence that names the setting', (env, words) => {
  expect(() => readConfig(env)).toThrow(ConfigError);
  expect(() => readConfig(env)).toThrow(words);
});

it('never repeats a secret that is too short', () => {
  expect(() => readConfig({ SESSION_SECRET: 'hunter2' })).not.toThrow(/hunter2/);
});
