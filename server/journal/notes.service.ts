import type { NewNote, Note } from '@shared/api/journal';
import type { User } from '@shared/api/session';
import type { Clock } from '../clock';
import type { Database } from '../db/database';
import type { EventBus } from '../events';
import { Problem } from '../http/problem';
import type { JournalService } from './journal.service';

export interface NotesDependencies {
  readonly database: Database;
  readonly clock: Clock;
  readonly events: EventBus;
  readonly journal: JournalService;
}

/** A screen's clock may run ahead of ours by this much; its note is then one of now [ms]. */
const clockTolerance = 60_000;

/** People's remarks on moments of a trend. */
export class NotesService {
  constructor(private readonly deps: NotesDependencies) {}

  /**
   * Writes a note and the journal's line of it. A repeat writes a second note: two people may say the same.
   *
   * @throws Problem 404 `no-such-sensor`, 422 `note-in-future`
   */
  async write(draft: NewNote, author: User): Promise<Note> {
    const { database, clock, events, journal } = this.deps;
    const now = clock.now();
    const sensor = await this.#sensor(draft.sensorId);
    if (draft.t > now + clockTolerance)
      throw new Problem(
        422,
        'note-in-future',
        'A note belongs to a moment that has been; this one is yet to come.',
        {
          errors: { t: 'lies in the future' },
        },
      );
    const t = Math.min(draft.t, now);
    const row = await database.write(async (transaction) => {
      const written = await database.models.notes.create(
        {
          sensorId: draft.sensorId,
          t,
          text: draft.text,
          authorId: author.id,
          writtenAt: now,
        },
        { transaction },
      );
      await journal.record(transaction, {
        t: now,
        userId: author.id,
        action: 'note-written',
        subject: { kind: 'note', id: String(written.id), name: sensor.name },
        changes: [{ field: 'about', from: null, to: t, unit: 'ms' }],
        reason: draft.text,
      });
      return written;
    });
    events.publish({ type: 'note', now, noteId: row.id, sensorId: draft.sensorId });
    return { ...draft, t, id: row.id, author: author.name, writtenAt: now };
  }

  /** Notes of one sensor, the most recent moment first; at most 500. */
  async list(sensorId: string): Promise<Note[]> {
    await this.#sensor(sensorId);
    const { notes, users } = this.deps.database.models;
    const rows = await notes.findAll({
      where: { sensorId },
      order: [
        ['t', 'DESC'],
        ['id', 'DESC'],
      ],
      limit: 500,
    });
    const authors = await users.findAll({ where: { id: [...new Set(rows.map((row) => row.authorId))] } });
    const names = new Map(authors.map((author) => [author.id, author.name]));
    return rows.map((row) => ({
      id: row.id,
      sensorId: row.sensorId,
      t: row.t,
      text: row.text,
      author: names.get(row.authorId)!,
      writtenAt: row.writtenAt,
    }));
  }

  async #sensor(id: string) {
    const sensor = await this.deps.database.models.sensors.findByPk(id);
    if (!sensor) throw new Problem(404, 'no-such-sensor', `There is no sensor "${id}".`);
    return sensor;
  }
}
