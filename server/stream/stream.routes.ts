import { streamEvent, streamPath, type StreamEvent } from '@shared/api/stream';
import { Router, type Request, type Response } from 'express';
import type { Logger } from 'pino';
import { requirePermission } from '../access/require';
import type { Clock } from '../clock';
import type { EventBus } from '../events';
import { Problem } from '../http/problem';

export interface LiveStreamsDependencies {
  readonly clock: Clock;
  readonly events: EventBus;
  readonly logger: Logger;
  /** Whether a session still stands; notes that it is in use. */
  readonly keepAlive: (sessionId: string) => Promise<boolean>;
  readonly beatEveryMs?: number;
  readonly mostStreams?: number;
}

/** A reader this far behind [bytes] is cut off; it connects again and reads everything anew. */
const mostUnsent = 1_000_000;

/** The live streams: what happens reaches every open screen as server-sent events. */
export class LiveStreams {
  readonly #open = new Map<Response, { readonly sessionId: string }>();
  readonly #mostStreams: number;
  readonly #beating: NodeJS.Timeout;
  readonly #unsubscribe: () => void;

  constructor(private readonly deps: LiveStreamsDependencies) {
    this.#mostStreams = deps.mostStreams ?? 300;
    this.#beating = setInterval(() => void this.#beat(), deps.beatEveryMs ?? 15_000);
    this.#beating.unref();
    this.#unsubscribe = deps.events.subscribe((event) => this.#send(event));
  }

  get count(): number {
    return this.#open.size;
  }

  router(): Router {
    const router = Router();
    router.get(streamPath, requirePermission('look'), (req, res) => this.#accept(req, res));
    return router;
  }

  /** Ends every stream; screens connect again by themselves. */
  close(): void {
    clearInterval(this.#beating);
    this.#unsubscribe();
    for (const res of this.#open.keys()) res.end();
    this.#open.clear();
  }

  #accept(req: Request, res: Response): void {
    if (this.#open.size >= this.#mostStreams)
      throw new Problem(503, 'too-many-streams', 'Too many screens are open; values still come on reload.', {
        retryAfterSeconds: 30,
      });
    res.writeHead(200, {
      'Content-Type': 'text/event-stream',
      // no-transform: `compression` and proxies would hold events back to pack them.
      'Cache-Control': 'no-store, no-transform',
      'X-Accel-Buffering': 'no',
    });
    this.#open.set(res, { sessionId: req.sessionID });
    res.once('close', () => this.#open.delete(res));
    res.write(toText({ type: 'beat', now: this.deps.clock.now() }));
  }

  #send(event: StreamEvent): void {
    const checked = streamEvent.safeParse(event);
    if (!checked.success) {
      this.deps.logger.error({ type: event.type, err: checked.error }, 'a bug: an event breaks its contract');
      return;
    }
    const text = toText(checked.data);
    for (const res of this.#open.keys()) this.#write(res, text);
  }

  /** A beat tells screens that the line stands, and is when streams of ended sessions are closed. */
  async #beat(): Promise<void> {
    const text = toText({ type: 'beat', now: this.deps.clock.now() });
    for (const [res, { sessionId }] of [...this.#open]) {
      try {
        if (await this.deps.keepAlive(sessionId)) this.#write(res, text);
        else this.#end(res);
      } catch (error) {
        this.deps.logger.error({ err: error }, 'a stream was ended: its session cannot be read');
        this.#end(res);
      }
    }
  }

  #write(res: Response, text: string): void {
    if (res.writableLength > mostUnsent) this.#end(res);
    else res.write(text);
  }

  #end(res: Response): void {
    this.#open.delete(res);
    res.end();
    if (res.writableLength > mostUnsent) res.destroy(); // a reader that has stopped reading never takes the end either
  }
}

function toText(event: StreamEvent): string {
  return `event: ${event.type}\ndata: ${JSON.stringify(event)}\n\n`;
}
