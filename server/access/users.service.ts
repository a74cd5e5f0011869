import { randomBytes } from 'node:crypto';
import type { Role, User } from '@shared/api/session';
import { QueryTypes, type Transaction } from 'sequelize';
import * as z from 'zod';
import type { Database } from '../db/database';
import type { UserRow } from '../db/models/user-row';
import { Problem } from '../http/problem';
import type { JournalService } from '../journal/journal.service';
import { isTooLongToHash, type PasswordHasher } from './password-hasher';

/** Short enough to be typed at a console, long enough not to be guessed (NIST SP 800-63B asks for 8 at least). */
export const newPassword = z
  .string()
  .min(12, 'A password needs at least 12 characters.')
  .refine((password) => !isTooLongToHash(password), 'A password may have at most 72 bytes.');

export const newUsername = z
  .string()
  .trim()
  .min(1, 'A user name is needed.')
  .max(80, 'A user name may have at most 80 characters.')
  .regex(/^\S+$/, 'A user name has no spaces.');

export interface NewUser {
  readonly username: string;
  readonly name: string;
  readonly role: Role;
  readonly passwordHash: string;
}

/** Who may sign in. */
export class UsersService {
  /** Made at the first sign-in, at the same cost as the stored ones. */
  #nobodysHash: Promise<string> | undefined;

  constructor(
    private readonly database: Database,
    private readonly journal: JournalService,
    private readonly passwords: PasswordHasher,
  ) {}

  /** The user as everybody may see it; null when there is none of that id or it is disabled. */
  async byId(id: number): Promise<User | null> {
    // Asked at every request: a plain statement takes half of what a model does, which asks for the table's types first.
    const [row] = await this.database.sequelize.query<User>(
      'SELECT id, username, name, role FROM user WHERE id = $1 AND disabled = 0',
      { bind: [id], type: QueryTypes.SELECT },
    );
    return row ?? null;
  }

  /**
   * The user of that name if the password is right. A name that does not exist takes as long as one that does: a check
   * against a hash nobody knows the password of.
   */
  async authenticate(username: string, password: string): Promise<User | null> {
    const row = await this.database.models.users.findOne({ where: { username } });
    this.#nobodysHash ??= this.passwords.hash(randomBytes(32).toString('base64url'));
    const nobodys = await this.#nobodysHash;
    const hash = row && !row.disabled ? row.passwordHash : nobodys;
    const isRight = !isTooLongToHash(password) && (await this.passwords.verify(password, hash));
    return isRight && row && !row.disabled ? toApi(row) : null;
  }

  /** The user of that name, disabled or not. */
  async byUsername(username: string): Promise<User | null> {
    const row = await this.database.models.users.findOne({ where: { username } });
    return row && toApi(row);
  }

  /**
   * Adds a user and the journal's line of it. A second user of the same name is refused.
   *
   * @param byUserId who adds it; null for the system
   * @throws Problem 409 `user-exists`
   */
  async create(
    transaction: Transaction,
    draft: NewUser,
    how: { readonly t: number; readonly byUserId: number | null; readonly reason: string },
  ): Promise<User> {
    const { users } = this.database.models;
    if ((await users.count({ where: { username: draft.username }, transaction })) > 0)
      throw new Problem(409, 'user-exists', `There is a user named ${draft.username} already.`);
    const row = await users.create({ ...draft, createdAt: how.t }, { transaction });
    await this.journal.record(transaction, {
      t: how.t,
      userId: how.byUserId,
      action: 'user-created',
      subject: { kind: 'user', id: String(row.id), name: row.name },
      changes: [
        { field: 'username', from: null, to: row.username },
        { field: 'role', from: null, to: row.role },
      ],
      reason: how.reason,
    });
    return toApi(row);
  }
}

function toApi(row: UserRow): User {
  return { id: row.id, username: row.username, name: row.name, role: row.role };
}
