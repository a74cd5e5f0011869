import type { Health } from '@shared/api/health';
import compression from 'compression';
import express, { type Express, type RequestHandler, type Router } from 'express';
import session from 'express-session';
import type { Logger } from 'pino';
import { CrossSiteProtection } from './access/cross-site';
import type { PasswordHasher } from './access/password-hasher';
import type { SessionsDatabase } from './access/session-file';
import { SessionStore } from './access/session-store';
import { sessionCookieName, sessionRouter } from './access/session.routes';
import { SignIn } from './access/sign-in';
import { SignInGuard } from './access/sign-in-guard';
import { UsersService } from './access/users.service';
import type { Clock } from './clock';
import type { Database } from './db/database';
import type { EventBus } from './events';
import { healthRouter } from './health/health.routes';
import { clientFiles } from './http/client-files';
import { answerErrors } from './http/error-handler';
import { Problem } from './http/problem';
import { limitRequests, limitSignInFailures } from './http/rate-limits';
import { logRequests } from './http/request-id';
import { securityHeaders } from './http/security-headers';
import { journalRouter } from './journal/journal.routes';
import type { JournalService } from './journal/journal.service';
import { notesRouter } from './journal/notes.routes';
import { NotesService } from './journal/notes.service';
import { openApiRouter } from './openapi/openapi.routes';
import { Settings, type AccessSettings } from './site/settings';
import { LiveStreams } from './stream/stream.routes';

export interface AppDependencies {
  readonly database: Database;
  readonly sessionsDatabase: SessionsDatabase;
  readonly clock: Clock;
  readonly events: EventBus;
  readonly journal: JournalService;
  readonly passwords: PasswordHasher;
  readonly logger: Logger;
  /** How long sessions last; read once, at start. */
  readonly access: AccessSettings;
  readonly config: {
    readonly sessionSecret: string;
    readonly behindTls: boolean;
    readonly clientDir: string;
  };
  /** The areas' routers, each stating full paths under /api and the least role of every route. */
  readonly routers: readonly Router[];
  readonly lastCycle: () => Health['lastCycle'];
}

export interface App {
  readonly express: Express;
  readonly streams: LiveStreams;
  readonly sessions: SessionStore;
  /** Deletes expired sessions and forgotten failures; to be called now and then. */
  tidyUp(): Promise<void>;
}

/** Wires services to routes. It never listens: whoever calls it owns the port. */
export function createApp(deps: AppDependencies): App {
  const { database, sessionsDatabase, clock, events, journal, logger, config } = deps;
  const settings = new Settings(database);
  const sessions = new SessionStore(sessionsDatabase, clock, deps.access);
  const guard = new SignInGuard(sessionsDatabase.sequelize, clock);
  const users = new UsersService(database, journal, deps.passwords);
  const signIn = new SignIn({ database, clock, journal, users, guard, logger });
  const crossSite = new CrossSiteProtection(config.sessionSecret, config.behindTls);
  const streams = new LiveStreams({ clock, events, logger, keepAlive: (id) => sessions.keepAlive(id) });
  const notes = new NotesService({ database, clock, events, journal });

  const app = express();
  app.disable('x-powered-by');
  app.set('trust proxy', config.behindTls ? 1 : false);
  app.use(logRequests(logger), ...securityHeaders(config), compression());

  const open = [healthRouter({ database, clock, lastCycle: deps.lastCycle }), openApiRouter()];
  app.use('/api', neverKeep);
  app.use(...open);

  // From here on a request has a session, and perhaps a user.
  app.use(
    '/api',
    express.json({ limit: '1mb' }),
    session({
      name: sessionCookieName,
      secret: config.sessionSecret,
      store: sessions,
      resave: false,
      saveUninitialized: false,
      // Ends with the browser; the server decides how long it holds at most.
      cookie: { httpOnly: true, sameSite: 'lax', secure: config.behindTls, path: '/' },
    }),
    ...signIn.recogniseUser(),
    noteSeen(sessions, clock),
    limitRequests(),
  );
  app.use(onlyUnderApi(crossSite.check));
  app.use(
    sessionRouter({ clock, settings, signIn, crossSite, limitFailures: limitSignInFailures() }),
    journalRouter(journal),
    notesRouter(notes),
    streams.router(),
    ...deps.routers,
  );
  app.use('/api', noSuchRoute);
  app.use(clientFiles(config.clientDir));
  app.use(answerErrors(logger));

  return {
    express: app,
    streams,
    sessions,
    async tidyUp() {
      await sessions.clearExpired();
      await guard.forgetOld();
    },
  };
}

/** Answers hold a plant's figures and depend on who asks: no cache may keep them. */
const neverKeep: RequestHandler = (_req, res, next) => {
  res.setHeader('Cache-Control', 'no-store');
  next();
};

function noteSeen(sessions: SessionStore, clock: Clock): RequestHandler {
  return (req, _res, next) => {
    if (req.user && sessions.shouldNoteSeen(req.session)) req.session.seenAt = clock.now();
    next();
  };
}

/** The token's check needs the whole path, which `use('/api', …)` cuts off. */
function onlyUnderApi(handler: RequestHandler): RequestHandler {
  return (req, res, next) => (req.path.startsWith('/api/') ? handler(req, res, next) : next());
}

const noSuchRoute: RequestHandler = (req) => {
  throw new Problem(
    404,
    'not-found',
    `There is no ${req.method} ${req.baseUrl}${req.path === '/' ? '' : req.path}.`,
  );
};
