import { promisify } from 'node:util';
import connectSessionSequelize from 'connect-session-sequelize';
import session, { type SessionData } from 'express-session';
import { Op } from 'sequelize';
import type { Clock } from '../clock';
import type { AccessSettings } from '../site/settings';
import { sessionModelName, type SessionsDatabase } from './session-file';

declare module 'express-session' {
  interface SessionData {
    /** UTC milliseconds: when the person signed in, and when they were last noted as being there. */
    startedAt?: number;
    seenAt?: number;
  }
}

/** A session in use is noted as seen at most this often: a write for each request would halve what the server can do. */
const noteSeenEvery = 5 * 60_000;

/** How long a session read from the file is believed. Writes by this process show at once. */
const believeFor = 5000;

const hour = 3600_000;

/** Longer than any request takes. */
const rememberEndFor = hour;

const SequelizeStore = connectSessionSequelize(session.Store);

interface Known {
  readonly data: string | null;
  readonly readAt: number;
}

/**
 * Sessions in a database, with what the packaged store leaves open: it accepts expired sessions until its clean-up has
 * run and even prolongs them, asks the wall clock, and writes at each request.
 */
export class SessionStore extends SequelizeStore {
  readonly #known = new Map<string, Known>();

  /**
   * Sessions ended lately: a request of one that is still on its way must not write it back. Ids are never given twice.
   */
  readonly #ended = new Map<string, number>();

  constructor(
    private readonly file: SessionsDatabase,
    private readonly clock: Clock,
    private readonly limits: AccessSettings,
  ) {
    super({ db: file.sequelize, table: sessionModelName, checkExpirationInterval: -1 });
  }

  override get(sid: string, callback: (error: unknown, found?: SessionData | null) => void): void {
    this.#read(sid).then(
      (data) => callback(null, data),
      (error: unknown) => callback(error),
    );
  }

  override set(sid: string, data: SessionData, callback?: (error?: unknown) => void): void {
    if (this.#ended.has(sid)) {
      callback?.();
      return;
    }
    // At once, because the next request may come before the write has ended.
    this.#known.set(sid, { data: JSON.stringify(data), readAt: this.clock.now() });
    super.set(sid, data, (error?: unknown) => {
      if (error) this.#known.delete(sid);
      if (this.#ended.has(sid)) super.destroy(sid, callback);
      else callback?.(error);
    });
  }

  override destroy(sid: string, callback?: (error?: unknown) => void): void {
    this.#ended.set(sid, this.clock.now());
    this.#known.delete(sid);
    super.destroy(sid, callback);
  }

  /** Being asked something is not written down here: see `noteSeen`. */
  override touch = (_sid: string, _data: unknown, callback?: (error: unknown) => void): void =>
    callback?.(null);

  /** Called by the packaged store for the time a session ends. */
  expiration(data: SessionData): Date {
    const { idleHours, absoluteDays } = this.limits;
    const now = this.clock.now();
    const idleEnd = (data.seenAt ?? now) + idleHours * hour;
    const absoluteEnd = (data.startedAt ?? now) + absoluteDays * 24 * hour;
    return new Date(Math.min(idleEnd, absoluteEnd));
  }

  /** Whether the session's last use should be written down now. */
  shouldNoteSeen(data: SessionData): boolean {
    return this.clock.now() - (data.seenAt ?? 0) >= noteSeenEvery;
  }

  /**
   * Whether a session still stands. An open live stream counts as use (a Board is there to be looked at for a whole
   * shift), so it is noted as seen as well.
   */
  async keepAlive(sid: string): Promise<boolean> {
    const data = await this.#read(sid);
    if (!data) return false;
    if (this.shouldNoteSeen(data)) {
      data.seenAt = this.clock.now();
      await promisify((done: (error?: unknown) => void) => this.set(sid, data, done))();
    }
    return true;
  }

  /** Deletes what has expired; to be called now and then. */
  async clearExpired(): Promise<number> {
    const now = this.clock.now();
    for (const [sid, known] of this.#known) if (now - known.readAt > believeFor) this.#known.delete(sid);
    for (const [sid, endedAt] of this.#ended) if (now - endedAt > rememberEndFor) this.#ended.delete(sid);
    return this.file.sessions.destroy({ where: { expires: { [Op.lte]: now } } });
  }

  async #read(sid: string): Promise<SessionData | null> {
    const now = this.clock.now();
    let known = this.#known.get(sid);
    if (!known || Math.abs(now - known.readAt) > believeFor) {
      const row = await this.file.sessions.findByPk(sid, { raw: true });
      const { data } = (row ?? { data: null }) as unknown as { data: string | null };
      known = { data, readAt: now };
      this.#known.set(sid, known);
    }
    if (known.data === null || this.#ended.has(sid)) return null;
    const data = JSON.parse(known.data) as SessionData;
    return this.expiration(data).getTime() > now ? data : null;
  }
}
