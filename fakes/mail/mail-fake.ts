import express from 'express';
import { SMTPServer, type SMTPServerError } from 'smtp-server';
import * as z from 'zod';
import { answerProblems, FakeProblem, nothingHere, parseInput } from '../http/problem';
import { readMessage } from './mime';
import { listPage, messagePage, style } from './page';

/** What happens to a mail: kept, answered 550 at once, or left without any answer until the mode changes. */
export const mailModes = ['accept', 'refuse', 'stall'] as const;
export type MailMode = (typeof mailModes)[number];

export interface KeptMessage {
  readonly id: number;
  /** UTC ms. */
  readonly receivedAt: number;
  readonly from: string;
  /** Everybody it was sent to, whatever its headers say. */
  readonly to: readonly string[];
  readonly subject: string;
  readonly text: string;
  readonly attachments: readonly { readonly name: string; readonly bytes: number }[];
}

export interface MailFakeOptions {
  readonly now: () => number;
  /** Messages kept; the oldest goes when one more comes. */
  readonly keep?: number;
  /** Largest message taken [bytes]. */
  readonly largest?: number;
}

export interface MailFake {
  readonly app: express.Express;
  readonly smtp: SMTPServer;
  /** Oldest first. */
  readonly messages: readonly KeptMessage[];
  setMode(mode: MailMode): void;
}

const modeSetting = z.object({ mode: z.enum(mailModes) });

/** A mail server that keeps what it is sent and shows it on a page; neither of its two servers listens by itself. */
export function createMailFake({ now, keep = 200, largest = 10_000_000 }: MailFakeOptions): MailFake {
  const messages: KeptMessage[] = [];
  let nextId = 1;
  let mode: MailMode = 'accept';
  /** Answers owed to those who wait while the mode is "stall". */
  let waiting: (() => void)[] = [];

  const setMode = (wanted: MailMode) => {
    mode = wanted;
    if (mode === 'stall') return;
    const released = waiting;
    waiting = [];
    for (const release of released) release();
  };

  const smtp = new SMTPServer({
    disabledCommands: ['AUTH', 'STARTTLS'],
    authOptional: true,
    size: largest,
    logger: false,
    // Tests and Ctrl-C do not wait for those who are being stalled.
    closeTimeout: 100,
    onMailFrom(_address, _session, callback) {
      const answer = () => callback(mode === 'refuse' ? refusal('This server refuses mail for now') : null);
      if (mode === 'stall') waiting.push(answer);
      else answer();
    },
    onData(stream, session, callback) {
      const chunks: Buffer[] = [];
      stream.on('data', (chunk: Buffer) => {
        // What is beyond the limit is read and dropped: the client must be heard out before it can be answered.
        if (!stream.sizeExceeded) chunks.push(chunk);
      });
      stream.once('error', callback);
      stream.once('end', () => {
        if (stream.sizeExceeded) {
          callback(refusal(`This message is larger than ${largest} bytes`, 552));
          return;
        }
        const { from, subject, text, attachments } = readMessage(Buffer.concat(chunks));
        const { mailFrom, rcptTo } = session.envelope;
        messages.push({
          id: nextId,
          receivedAt: now(),
          from: from || (mailFrom ? mailFrom.address : ''),
          to: rcptTo.map(({ address }) => address),
          subject,
          text,
          attachments,
        });
        nextId += 1;
        if (messages.length > keep) messages.shift();
        callback(null, 'kept');
      });
    },
  });
  // A client that breaks off is not this server's failure; without a listener it would end the process.
  smtp.on('error', (error) => console.error(`mail fake: ${error.message}`));

  return { app: createPages(messages, () => mode, setMode), smtp, messages, setMode };
}

function createPages(
  messages: readonly KeptMessage[],
  mode: () => MailMode,
  setMode: (mode: MailMode) => void,
): express.Express {
  const app = express();
  app.disable('x-powered-by');
  app.use((_req, res, next) => {
    res.setHeader('content-security-policy', "default-src 'none'; style-src 'self'");
    res.setHeader('cache-control', 'no-store');
    next();
  });
  const find = (id: string | undefined) => {
    const found = messages.find((message) => String(message.id) === id);
    if (!found)
      throw new FakeProblem(404, 'no-such-message', 'There is no such message; only the newest are kept.');
    return found;
  };
  app.get('/', (_req, res) => {
    res.type('html').send(listPage(messages.toReversed(), mode()));
  });
  app.get('/message/:id', (req, res) => {
    res.type('html').send(messagePage(find(req.params.id)));
  });
  app.get('/style.css', (_req, res) => {
    res.type('css').send(style);
  });
  app.get('/messages', (_req, res) => {
    res.json({ messages: messages.toReversed() });
  });
  app.get('/messages/:id', (req, res) => {
    res.json(find(req.params.id));
  });
  // JSON only: a page of another site cannot send that without asking first.
  app.post('/control/mode', express.json(), (req, res) => {
    setMode(parseInput(modeSetting, req.body).mode);
    res.json({ mode: mode() });
  });
  app.use(nothingHere);
  app.use(answerProblems);
  return app;
}

function refusal(message: string, responseCode = 550): SMTPServerError {
  return Object.assign(new Error(message), { responseCode });
}
