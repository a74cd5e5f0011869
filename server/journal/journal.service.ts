import { createHash } from 'node:crypto';
import type { JournalEntry, journalPage, journalQuery } from '@shared/api/journal';
import { col, fn, Op, where, type Transaction, type WhereOptions } from 'sequelize';
import type * as z from 'zod';
import type { Database } from '../db/database';
import type { JournalEntryRow } from '../db/models/journal-entry-row';
import { Problem } from '../http/problem';
import type { JournalAction, SubjectKind } from './actions';

export interface NewJournalEntry {
  /** UTC milliseconds. */
  readonly t: number;
  /** Null when the system itself acted. */
  readonly userId: number | null;
  readonly action: JournalAction;
  readonly subject: { readonly kind: SubjectKind; readonly id: string; readonly name: string };
  readonly changes: JournalEntry['changes'];
  readonly reason: string;
}

type Chained = Pick<
  JournalEntryRow,
  | 't'
  | 'userId'
  | 'userName'
  | 'userRole'
  | 'action'
  | 'subjectKind'
  | 'subjectId'
  | 'subjectName'
  | 'changes'
  | 'reason'
  | 'previousHash'
>;

const beforeTheFirst = '0'.repeat(64);

/**
 * The record of who changed what. Each entry carries the SHA-256 of itself and the one before, so that a line changed or
 * taken out behind the application's back shows; the database itself refuses UPDATE and DELETE.
 */
export class JournalService {
  constructor(private readonly database: Database) {}

  /** Adds a line in the transaction of the change it tells of: both land or neither. Each call adds one. */
  async record(transaction: Transaction, entry: NewJournalEntry): Promise<void> {
    const { journalEntries, users } = this.database.models;
    const last = await journalEntries.findOne({ order: [['id', 'DESC']], transaction });
    const user = entry.userId === null ? null : await users.findByPk(entry.userId, { transaction });
    if (entry.userId !== null && !user) throw new Error(`There is no user ${entry.userId} to write down.`);
    const line: Chained = {
      t: entry.t,
      userId: entry.userId,
      userName: user?.name ?? null,
      userRole: user?.role ?? null,
      action: entry.action,
      subjectKind: entry.subject.kind,
      subjectId: entry.subject.id,
      subjectName: entry.subject.name,
      changes: entry.changes,
      reason: entry.reason,
      previousHash: last?.hash ?? beforeTheFirst,
    };
    await journalEntries.create({ ...line, hash: hashOf(line) }, { transaction });
  }

  /** Newest first. */
  async list(query: z.infer<typeof journalQuery>): Promise<z.infer<typeof journalPage>> {
    const rows = await this.database.models.journalEntries.findAll({
      where: { [Op.and]: conditions(query) },
      order: [['id', 'DESC']],
      limit: query.limit + 1,
    });
    const page = rows.slice(0, query.limit);
    return {
      items: page.map(toApi),
      next: rows.length > query.limit ? String(page.at(-1)!.id) : null,
    };
  }

  /** @returns the id of the first line that does not fit the one before it, null when the whole record is intact */
  async firstBrokenLine(): Promise<number | null> {
    let previousHash = beforeTheFirst;
    let lastId = 0;
    for (;;) {
      const rows = await this.database.models.journalEntries.findAll({
        where: { id: { [Op.gt]: lastId } },
        order: [['id', 'ASC']],
        limit: 500,
      });
      for (const row of rows) {
        if (row.previousHash !== previousHash || row.hash !== hashOf(row)) return row.id;
        previousHash = row.hash;
        lastId = row.id;
      }
      if (rows.length === 0) return null;
    }
  }
}

function hashOf(line: Chained): string {
  const fields = [
    line.previousHash,
    line.t,
    line.userId,
    line.userName,
    line.userRole,
    line.action,
    line.subjectKind,
    line.subjectId,
    line.subjectName,
    line.changes,
    line.reason,
  ];
  return createHash('sha256').update(JSON.stringify(fields)).digest('hex');
}

function conditions(query: z.infer<typeof journalQuery>): WhereOptions<JournalEntryRow>[] {
  const found: WhereOptions<JournalEntryRow>[] = [];
  if (query.cursor !== undefined) {
    if (!/^\d{1,15}$/.test(query.cursor))
      throw new Problem(400, 'bad-request', 'The cursor must be the `next` of an earlier page.', {
        errors: { cursor: 'not one of ours' },
      });
    found.push({ id: { [Op.lt]: Number(query.cursor) } });
  }
  if (query.from !== undefined) found.push({ t: { [Op.gte]: query.from } });
  if (query.to !== undefined) found.push({ t: { [Op.lte]: query.to } });
  if (query.kind !== undefined) found.push({ subjectKind: query.kind });
  if (query.subjectId !== undefined) found.push({ subjectId: query.subjectId });
  if (query.search) {
    // Not LIKE, to which `%` and `_` mean anything.
    const holds = (column: string) =>
      where(fn('instr', fn('lower', col(column)), fn('lower', query.search)), Op.gt, 0);
    found.push({ [Op.or]: ['subject_name', 'reason', 'action', 'user_name'].map(holds) });
  }
  return found;
}

function toApi(row: JournalEntryRow): JournalEntry {
  return {
    id: row.id,
    t: row.t,
    user: row.userName !== null && row.userRole !== null ? { name: row.userName, role: row.userRole } : null,
    action: row.action,
    subject: { kind: row.subjectKind, id: row.subjectId, name: row.subjectName },
    changes: row.changes,
    reason: row.reason,
  };
}
