import * as z from 'zod';
import { instant, slug } from './common';
import { sensor } from './sensors';

export const streamPath = '/api/stream';

/** Server-sent events: the event's name is `type`, its data this object as JSON. A beat comes at least each 15 s. */
export const streamEvent = z.discriminatedUnion('type', [
  z.object({ type: z.literal('beat'), now: instant }),
  /** A sensor has a new minute, or a sample changed it. */
  z.object({ type: z.literal('sensor'), now: instant, sensor }),
  /** A sample was entered or decided; lists and trends read again. */
  z.object({ type: z.literal('sample'), now: instant, sampleId: z.int(), sensorIds: z.array(slug) }),
  z.object({ type: z.literal('note'), now: instant, noteId: z.int(), sensorId: slug }),
  /** A source was lost or came back; `words` says what is known. */
  z.object({
    type: z.literal('source'),
    now: instant,
    sourceId: z.int(),
    name: z.string(),
    connected: z.boolean(),
    words: z.string(),
  }),
]);
export type StreamEvent = z.infer<typeof streamEvent>;
