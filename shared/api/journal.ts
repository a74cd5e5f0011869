import * as z from 'zod';
import { instant, pageOf, slug } from './common';
import { role } from './session';

export const journalPath = '/api/journal';
export const notesPath = '/api/notes';

/** One line of the record: who, when, what, from what to what, why. Never changed afterwards. */
export const journalEntry = z.object({
  id: z.int(),
  t: instant,
  /** Null when the system itself acted. */
  user: z.object({ name: z.string(), role }).nullable(),
  /** What happened, one word of a fixed list: see `server/journal`. */
  action: z.string(),
  subject: z.object({ kind: z.string(), id: z.string(), name: z.string() }),
  changes: z.array(
    z.object({
      field: z.string(),
      from: z.union([z.string(), z.number(), z.null()]),
      to: z.union([z.string(), z.number(), z.null()]),
      unit: z.string().optional(),
    }),
  ),
  reason: z.string(),
});
export type JournalEntry = z.infer<typeof journalEntry>;
export const journalPage = pageOf(journalEntry);

export const journalQuery = z.object({
  from: z.coerce.number().pipe(instant).optional(),
  to: z.coerce.number().pipe(instant).optional(),
  /** Kind of subject: sample, sensor, user, note … */
  kind: z.string().max(40).optional(),
  subjectId: z.string().max(80).optional(),
  search: z.string().trim().max(100).optional(),
  cursor: z.string().max(100).optional(),
  limit: z.coerce.number().int().min(1).max(200).default(100),
});

export const newNote = z.object({
  sensorId: slug,
  /** The moment on the trend the note speaks of. */
  t: instant,
  text: z.string().trim().min(1, 'Write the note first.').max(1000),
});
export type NewNote = z.infer<typeof newNote>;
export const note = newNote.extend({ id: z.int(), author: z.string(), writtenAt: instant });
export type Note = z.infer<typeof note>;
