import type { ProblemDocument } from '@shared/api/common';
import { journalPage, note, type JournalEntry, type Note } from '@shared/api/journal';
import { expect, it } from 'vitest';
import { startTestApp, type TestApp } from './support/test-app';

type Page = { items: JournalEntry[]; next: string | null };

async function withSensor(app: TestApp) {
  await app.database.models.towers.create({ id: 'north', name: 'North tower' });
  await app.database.models.sensors.create({
    id: 'north-c4',
    towerId: 'north',
    name: 'C4+ in propane',
    symbol: 'C4+',
    point: 'overhead',
  });
}

/** Lines of the record, one a minute. */
async function withLines(app: TestApp, names: readonly string[]) {
  const operator = await app.database.models.users.findOne({ where: { username: 'operator' } });
  for (const [i, name] of names.entries()) {
    await app.database.write((transaction) =>
      app.journal.record(transaction, {
        t: app.clock.now(),
        userId: i % 2 === 0 ? operator!.id : null,
        action: 'setting-changed',
        subject: { kind: i % 2 === 0 ? 'setting' : 'source', id: String(i), name },
        changes: [{ field: 'value', from: null, to: 0.1 + 0.2, unit: 'K' }],
        reason: `because of ${name}`,
      }),
    );
    app.clock.advance(60_000);
  }
}

const idsOf = (page: Page) => page.items.map((entry) => Number(entry.subject.id));

it('writes a note with its author, puts it into the journal and tells every screen', async () => {
  const app = await startTestApp();
  await withSensor(app);
  const told: unknown[] = [];
  app.events.subscribe((event) => told.push(event));
  const operator = await app.signedIn('operator');
  const t = app.clock.now() - 60_000;
  const answer = await operator.json<Note>('POST', '/api/notes', {
    sensorId: 'north-c4',
    t,
    text: '  Rain on the condenser  ',
  });
  expect(answer.status).toBe(201);
  expect(note.parse(answer.body)).toMatchObject({
    sensorId: 'north-c4',
    t,
    text: 'Rain on the condenser',
    author: 'The operator',
    writtenAt: app.clock.now(),
  });
  const listed = await operator.json<Note[]>('GET', '/api/notes?sensorId=north-c4');
  expect(listed.body).toEqual([answer.body]);
  const { items } = journalPage.parse((await operator.json('GET', '/api/journal')).body);
  expect(items).toMatchObject([
    {
      t: app.clock.now(),
      action: 'note-written',
      user: { name: 'The operator', role: 'operator' },
      subject: { kind: 'note', id: String(answer.body.id), name: 'C4+ in propane' },
      reason: 'Rain on the condenser',
    },
  ]);
  expect(told).toEqual([
    { type: 'note', now: app.clock.now(), noteId: answer.body.id, sensorId: 'north-c4' },
  ]);
});

it('takes a note from a screen whose clock runs a little ahead as one of now', async () => {
  const app = await startTestApp();
  await withSensor(app);
  const operator = await app.signedIn('operator');
  const ahead = { sensorId: 'north-c4', t: app.clock.now() + 59_000, text: 'Rain' };
  const answer = await operator.json<Note>('POST', '/api/notes', ahead);
  expect([answer.status, answer.body.t]).toEqual([201, app.clock.now()]);
});

it('refuses a note on a sensor there is not, and one on a moment to come, and then writes nothing', async () => {
  const app = await startTestApp();
  await withSensor(app);
  const operator = await app.signedIn('operator');
  const write = (draft: object) =>
    operator.json<ProblemDocument>('POST', '/api/notes', { sensorId: 'north-c4', t: 0, text: 'x', ...draft });
  expect((await write({ sensorId: 'south' })).status).toBe(404);
  expect((await operator.send('GET', '/api/notes?sensorId=south')).status).toBe(404);
  const future = await write({ t: app.clock.now() + 60_001 });
  expect([future.status, future.body.errors]).toEqual([422, { t: 'lies in the future' }]);
  expect((await write({ text: '   ' })).body.errors).toEqual({ text: 'Write the note first.' });
  expect(await app.database.models.notes.count()).toBe(0);
  expect(await app.database.models.journalEntries.count()).toBe(0);
});

it('lists the record newest first, page by page, each line once, while new lines come in', async () => {
  const app = await startTestApp();
  await withLines(app, ['a', 'b', 'c', 'd', 'e']);
  const reader = await app.signedIn('operator');
  const page = async (query: string) => (await reader.json<Page>('GET', `/api/journal?limit=2${query}`)).body;
  const first = await page('');
  expect(idsOf(first)).toEqual([4, 3]);
  await withLines(app, ['newer']);
  const second = await page(`&cursor=${first.next}`);
  expect(idsOf(second)).toEqual([2, 1]);
  const third = await page(`&cursor=${second.next}`);
  expect([idsOf(third), third.next]).toEqual([[0], null]);
});

it('finds lines by time, kind, subject and words', async () => {
  const app = await startTestApp();
  const start = app.clock.now();
  await withLines(app, ['Alpha', 'Beta_1', 'Beta21', '100% sure']);
  const reader = await app.signedIn('operator');
  const ids = async (query: string) => idsOf((await reader.json<Page>('GET', `/api/journal?${query}`)).body);
  expect(await ids(`from=${start + 60_000}&to=${start + 120_000}`)).toEqual([2, 1]);
  expect(await ids('kind=source')).toEqual([3, 1]);
  expect(await ids('kind=setting&subjectId=2')).toEqual([2]);
  expect(await ids('search=alpha')).toEqual([0]);
  expect(await ids('search=because of beta')).toEqual([2, 1]);
  // What stands for "anything" in SQL is only a letter here.
  expect(await ids('search=_')).toEqual([1]);
  expect(await ids('search=%25')).toEqual([3]);
  expect(await ids(`search=${encodeURIComponent("'; DROP TABLE user; --")}`)).toEqual([]);
  expect((await reader.send('GET', '/api/journal?cursor=abc')).status).toBe(400);
});

it('names who acted and in which role as it was then, whatever becomes of them', async () => {
  const app = await startTestApp();
  await withLines(app, ['a']);
  await app.database.models.users.update(
    { name: 'New Name', role: 'engineer' },
    { where: { username: 'operator' } },
  );
  const reader = await app.signedIn('administrator');
  const { body } = await reader.json<Page>('GET', '/api/journal');
  expect(body.items[0]!.user).toEqual({ name: 'The operator', role: 'operator' });
  expect(body.items[0]!.changes).toEqual([{ field: 'value', from: null, to: 0.1 + 0.2, unit: 'K' }]);
});

it('cannot be changed, shortened or overwritten through the database', async () => {
  const app = await startTestApp();
  await withLines(app, ['a', 'b']);
  const attempt = async (sql: string) => {
    const failure: unknown = await app.database.sequelize.query(sql).catch((error: unknown) => error);
    return (failure as { original?: Error }).original?.message ?? 'went through';
  };
  expect(await attempt("UPDATE journal_entry SET reason = 'other'")).toMatch(/never changed/);
  expect(await attempt('DELETE FROM journal_entry WHERE id = 2')).toMatch(/never shortened/);
  expect(
    await attempt('INSERT OR REPLACE INTO journal_entry SELECT * FROM journal_entry WHERE id = 1'),
  ).toMatch(/never shortened/);
  expect(await attempt('DELETE FROM user')).toMatch(/FOREIGN KEY/);
  expect(await app.journal.firstBrokenLine()).toBeNull();
});

it.each([
  ['a changed line', "UPDATE journal_entry SET reason = 'other' WHERE id = 2", 2],
  ['a line taken out', 'DELETE FROM journal_entry WHERE id = 2', 3],
  ['a changed figure', "UPDATE journal_entry SET changes = '[]' WHERE id = 3", 3],
])('notices %s, made behind the triggers’ back', async (_what, tampering, brokenLine) => {
  const app = await startTestApp();
  await withLines(app, ['a', 'b', 'c', 'd']);
  expect(await app.journal.firstBrokenLine()).toBeNull();
  await app.database.sequelize.query('DROP TRIGGER journal_entry_keep');
  await app.database.sequelize.query('DROP TRIGGER journal_entry_stay');
  await app.database.sequelize.query(tampering);
  expect(await app.journal.firstBrokenLine()).toBe(brokenLine);
});

it('chains lines written at once in one order without a gap', async () => {
  const app = await startTestApp();
  await Promise.all(Array.from({ length: 20 }, (_, i) => withLines(app, [`line ${i}`])));
  expect(await app.database.models.journalEntries.count()).toBe(20);
  expect(await app.journal.firstBrokenLine()).toBeNull();
});

it('writes nothing when the change it tells of fails', async () => {
  const app = await startTestApp();
  const failing = app.database.write(async (transaction) => {
    await app.journal.record(transaction, {
      t: 0,
      userId: null,
      action: 'tower-created',
      subject: { kind: 'tower', id: 'x', name: 'X' },
      changes: [],
      reason: '',
    });
    throw new Error('the change itself failed');
  });
  await expect(failing).rejects.toThrow('the change itself failed');
  expect(await app.database.models.journalEntries.count()).toBe(0);
});
