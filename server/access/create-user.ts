import { mkdirSync } from 'node:fs';
import { join, resolve } from 'node:path';
import { text } from 'node:stream/consumers';
import { parseArgs } from 'node:util';
import { role } from '@shared/api/session';
import * as z from 'zod';
import { systemClock } from '../clock';
import { dataFiles, readDataDir } from '../config';
import { openDatabase } from '../db/database';
import { Problem } from '../http/problem';
import { JournalService } from '../journal/journal.service';
import { InlinePasswordHasher } from './password-hasher';
import { newPassword, newUsername, UsersService } from './users.service';

/**
 * Adds a user from the command line, the first administrator above all:
 *
 *     node dist/server/create-user.js --username NAME --role administrator [--name "Full Name"] < password.txt
 *
 * The password comes from standard input, never from the arguments, which every user of the machine can read.
 */
async function createUser(): Promise<string> {
  const { values } = parseArgs({
    options: {
      username: { type: 'string' },
      name: { type: 'string' },
      role: { type: 'string' },
      'data-dir': { type: 'string', default: readDataDir(process.env) },
    },
  });
  const username = check('--username', newUsername, values.username ?? '');
  const asked = check('--role', role, values.role);
  const name = check('--name', z.string().trim().min(1).max(80), values.name ?? username);
  if (process.stdin.isTTY) console.error('Type the password, then Enter and Ctrl-D:');
  const password = check('The password', newPassword, (await text(process.stdin)).replace(/\r?\n$/, ''));

  const folder = resolve(values['data-dir']);
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  const database = await openDatabase(join(folder, dataFiles.plant));
  try {
    const passwords = new InlinePasswordHasher();
    const users = new UsersService(database, new JournalService(database), passwords);
    const passwordHash = await passwords.hash(password);
    await database.write((transaction) =>
      users.create(
        transaction,
        { username, name, role: asked, passwordHash },
        { t: systemClock.now(), byUserId: null, reason: 'Added at the command line.' },
      ),
    );
  } finally {
    await database.close();
  }
  return `Added ${username} as ${asked}.`;
}

class WrongArgument extends Error {}

function check<T extends z.ZodType>(what: string, schema: T, value: unknown): z.infer<T> {
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  throw new WrongArgument(`${what}: ${parsed.error.issues[0]!.message}`);
}

try {
  console.log(await createUser());
} catch (error) {
  const isExpected =
    error instanceof WrongArgument ||
    error instanceof Problem ||
    (error instanceof TypeError && 'code' in error && String(error.code).startsWith('ERR_PARSE_ARGS'));
  console.error(isExpected ? error.message : error);
  process.exitCode = 1;
}
