import { resolve } from 'node:path';
import * as z from 'zod';

/** A setting that is missing or wrong, in one sentence for whoever starts the program. */
export class ConfigError extends Error {}

const port = z.coerce.number().int().min(0).max(65_535);

const yesOrNo = z
  .enum(['0', '1', 'false', 'true', ''])
  .default('0')
  .transform((word) => word === '1' || word === 'true');

const dataDir = z.string().min(1).default('.data');

const environment = z
  .object({
    PORT: port.default(4600),
    HOST: z.string().min(1).default('127.0.0.1'),
    DATA_DIR: dataDir,
    CLIENT_DIR: z.string().min(1).default('dist/client'),
    SESSION_SECRET: z.string().min(32, 'must have at least 32 characters').optional(),
    BEHIND_TLS_PROXY: yesOrNo,
    LOG_LEVEL: z.enum(['fatal', 'error', 'warn', 'info', 'debug', 'trace', 'silent']).default('info'),
    DEMO: yesOrNo,
  })
  .refine((settings) => settings.DEMO || settings.SESSION_SECRET !== undefined, {
    path: ['SESSION_SECRET'],
    message:
      'is needed: a secret of at least 32 characters that signs sessions (openssl rand -base64 32 makes one)',
  });

export interface Config {
  readonly port: number;
  readonly host: string;
  /** Absolute folder of database and files. */
  readonly dataDir: string;
  /** Absolute folder of the built screens. */
  readonly clientDir: string;
  /** Undefined only in the demonstration, which makes one of its own and keeps it in `dataDir`. */
  readonly sessionSecret: string | undefined;
  /** Whether a proxy in front speaks TLS: cookies become Secure, and its X-Forwarded-For is believed. */
  readonly behindTls: boolean;
  readonly logLevel: string;
  readonly demo: boolean;
}

/**
 * The settings of the environment, checked once.
 *
 * @throws ConfigError naming the first setting at fault
 */
export function readConfig(env: Readonly<Record<string, string | undefined>>): Config {
  const parsed = environment.safeParse(env);
  if (!parsed.success) {
    const [issue] = parsed.error.issues;
    const name = String(issue!.path[0]);
    const given = env[name];
    // A secret must not end up in a log.
    const shown = given === undefined || name === 'SESSION_SECRET' ? '' : ` (it is "${given}")`;
    throw new ConfigError(`The setting ${name}${shown}: ${issue!.message}.`);
  }
  const settings = parsed.data;
  return {
    port: settings.PORT,
    host: settings.HOST,
    dataDir: resolve(settings.DATA_DIR),
    clientDir: resolve(settings.CLIENT_DIR),
    sessionSecret: settings.SESSION_SECRET,
    behindTls: settings.BEHIND_TLS_PROXY,
    logLevel: settings.LOG_LEVEL,
    demo: settings.DEMO,
  };
}

/** The data folder alone, for programs that need no other setting. */
export function readDataDir(env: Readonly<Record<string, string | undefined>>): string {
  return resolve(dataDir.parse(env['DATA_DIR']));
}

/** Files under the data folder. */
export const dataFiles = {
  plant: 'dewmark.sqlite',
  sessions: 'sessions.sqlite',
  sessionSecret: 'session-secret',
} as const;
