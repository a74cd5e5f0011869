import { promisify } from 'node:util';
import type { Request, RequestHandler } from 'express';
import passport from 'passport';
import { Strategy as LocalStrategy } from 'passport-local';
import type { User } from '@shared/api/session';
import type { Logger } from 'pino';
import type { Clock } from '../clock';
import type { Database } from '../db/database';
import { Problem } from '../http/problem';
import type { JournalService } from '../journal/journal.service';
import type { SignInGuard } from './sign-in-guard';
import type { UsersService } from './users.service';

export interface SignInDependencies {
  readonly database: Database;
  readonly clock: Clock;
  readonly journal: JournalService;
  readonly users: UsersService;
  readonly guard: SignInGuard;
  readonly logger: Logger;
}

/** Signing in by name and password, and who a session belongs to. */
export class SignIn {
  readonly #passport = new passport.Passport();

  constructor(private readonly deps: SignInDependencies) {
    this.#passport.use(
      new LocalStrategy({ passReqToCallback: true }, (req, username, password, done) => {
        this.#authenticate(req.ip ?? 'unknown', username, password).then(
          (user) => done(null, user),
          (error: unknown) => done(error),
        );
      }),
    );
    this.#passport.serializeUser<number>((user, done) => done(null, (user as User).id));
    // Read at each request, so that a disabled user or another role holds at once.
    this.#passport.deserializeUser<number>((id, done) => {
      deps.users.byId(id).then(
        (user) => done(null, user ?? false),
        (error: unknown) => done(error),
      );
    });
  }

  /** Finds the session's user; after express-session. */
  recogniseUser(): RequestHandler[] {
    return [this.#passport.initialize() as RequestHandler, this.#passport.session() as RequestHandler];
  }

  /**
   * Checks the body's credentials and gives the request a new session, so that an id known to somebody before the sign-in
   * is worth nothing after it.
   *
   * @throws Problem 401 `wrong-credentials`, 429 `locked`, 503 `busy`
   */
  async signIn(req: Request): Promise<User> {
    const authenticate = promisify((done: (error: unknown, user?: User) => void) => {
      const handler = this.#passport.authenticate('local', done) as RequestHandler;
      void handler(req, req.res!, done);
    });
    const user = await authenticate();
    // Passport's own refusals: it found no name or no password in the body.
    if (!user) throw new Problem(401, 'wrong-credentials', wrongCredentials);
    await promisify((done: (error: unknown) => void) => req.logIn(user, done))();
    req.session.startedAt = req.session.seenAt = this.deps.clock.now();
    return user;
  }

  async #authenticate(address: string, username: string, password: string): Promise<User> {
    const { guard, users, logger } = this.deps;
    const attempt = await guard.attempt(username, address);
    if (attempt.kind === 'locked') throw locked(attempt.remaining);
    const user = await users.authenticate(username, password);
    if (user) {
      await guard.succeeded(username, address);
      logger.info({ userId: user.id, address }, 'signed in');
      return user;
    }
    logger.warn({ username, address, locksFor: attempt.locksFor }, 'sign-in refused');
    if (attempt.locksFor > 0) await this.#noteLock(username, address, attempt.locksFor);
    throw new Problem(
      401,
      'wrong-credentials',
      attempt.locksFor > 0
        ? `${wrongCredentials} After so many failures this name is locked here for ${seconds(attempt.locksFor)} s.`
        : wrongCredentials,
    );
  }

  /** Only for names that exist: a stranger must not be able to fill the journal with invented ones. */
  async #noteLock(username: string, address: string, locksFor: number): Promise<void> {
    const { database, journal, users, clock } = this.deps;
    const user = await users.byUsername(username);
    if (!user) return;
    await database.write((transaction) =>
      journal.record(transaction, {
        t: clock.now(),
        userId: null,
        action: 'sign-in-locked',
        subject: { kind: 'user', id: String(user.id), name: user.name },
        changes: [{ field: 'locked for', from: null, to: seconds(locksFor), unit: 's' }],
        reason: `Repeated wrong passwords from ${address}.`,
      }),
    );
  }
}

const wrongCredentials = 'User name or password is wrong.';

const seconds = (milliseconds: number) => Math.ceil(milliseconds / 1000);

function locked(remaining: number): Problem {
  return new Problem(
    429,
    'locked',
    `Too many failed sign-ins for this name from here. Try again in ${seconds(remaining)} s.`,
    { retryAfterSeconds: seconds(remaining) },
  );
}
