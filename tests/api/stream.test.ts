import { EventEmitter } from 'node:events';
import express, { type Request, type Response } from 'express';
import { pino } from 'pino';
import { expect, it, onTestFinished } from 'vitest';
import { EventBus } from '../../server/events';
import { LiveStreams } from '../../server/stream/stream.routes';
import type { Client } from './support/client';
import { startTestApp } from './support/test-app';
import { TestClock } from './support/test-clock';

/** Reads a stream's events as they come. */
async function listen(client: Client, headers?: Record<string, string>) {
  const response = await client.send('GET', '/api/stream', undefined, headers);
  const reader = response.body!.pipeThrough(new TextDecoderStream()).getReader();
  onTestFinished(() => reader.cancel().catch(() => undefined));
  let text = '';
  const next = async (): Promise<{ event: string; data: unknown } | 'ended'> => {
    while (!text.includes('\n\n')) {
      const { value, done } = await reader.read();
      if (done) return 'ended';
      text += value;
    }
    const end = text.indexOf('\n\n');
    const [, event, data] = /^event: (.*)\ndata: (.*)$/.exec(text.slice(0, end))!;
    text = text.slice(end + 2);
    return { event: event!, data: JSON.parse(data!) as unknown };
  };
  return { response, next };
}

it('begins with a beat that carries the server’s clock, then tells what happens, unpacked and at once', async () => {
  const app = await startTestApp();
  const stream = await listen(await app.signedIn('operator'), { 'accept-encoding': 'gzip, br' });
  expect(stream.response.headers.get('content-type')).toBe('text/event-stream');
  expect(stream.response.headers.get('cache-control')).toBe('no-store, no-transform');
  expect(stream.response.headers.get('content-encoding')).toBeNull();
  expect(await stream.next()).toEqual({ event: 'beat', data: { type: 'beat', now: app.clock.now() } });
  app.events.publish({ type: 'note', now: 5, noteId: 1, sensorId: 'north' });
  expect(await stream.next()).toEqual({
    event: 'note',
    data: { type: 'note', now: 5, noteId: 1, sensorId: 'north' },
  });
});

it('sends nothing that breaks the contract, and logs it', async () => {
  const app = await startTestApp();
  const stream = await listen(await app.signedIn('operator'));
  await stream.next();
  app.events.publish({ type: 'note', now: 5, noteId: 1, sensorId: 'NOT A SLUG' });
  app.events.publish({ type: 'sample', now: 6, sampleId: 2, sensorIds: [] });
  expect(await stream.next()).toMatchObject({ event: 'sample' });
  expect(app.log.some((line) => String(line['msg']).includes('breaks its contract'))).toBe(true);
});

it('is refused to nobody in particular: whoever is not signed in gets 401', async () => {
  const app = await startTestApp();
  const response = await app.client().send('GET', '/api/stream');
  expect(response.status).toBe(401);
});

it('forgets a stream whose reader has gone', async () => {
  const app = await startTestApp();
  const client = await app.signedIn('operator');
  const response = await client.send('GET', '/api/stream');
  expect(app.streams.count).toBe(1);
  await response.body!.cancel();
  await expect.poll(() => app.streams.count).toBe(0);
});

it('ends when the server shuts down', async () => {
  const app = await startTestApp();
  const stream = await listen(await app.signedIn('operator'));
  await stream.next();
  app.streams.close();
  expect(await stream.next()).toBe('ended');
  expect(app.streams.count).toBe(0);
});

/** Streams of their own with a quick beat, over an app that lets everybody in. */
function startStreams(options: {
  keepAlive?: (id: string) => Promise<boolean>;
  mostStreams?: number;
  beatEveryMs?: number;
}) {
  const events = new EventBus();
  const streams = new LiveStreams({
    clock: new TestClock(),
    events,
    logger: pino({ level: 'silent' }),
    keepAlive: () => Promise.resolve(true),
    ...options,
  });
  onTestFinished(() => streams.close());
  return { streams, events };
}

/** As much of an answer as a stream uses, with a reader that takes what it likes. */
class FakeAnswer extends EventEmitter {
  writableLength = 0;
  readonly written: string[] = [];
  isEnded = false;
  isDestroyed = false;
  writeHead() {
    return this;
  }
  write(text: string) {
    this.written.push(text);
    return true;
  }
  end() {
    this.isEnded = true;
  }
  destroy() {
    this.isDestroyed = true;
  }
}

function connect(streams: LiveStreams, sessionID = 's') {
  const answer = new FakeAnswer();
  const router = express.Router().use(streams.router());
  const req = { method: 'GET', url: '/api/stream', sessionID, user: { id: 1, role: 'operator' } };
  let refusal: unknown;
  router(req as unknown as Request, answer as unknown as Response, (error: unknown) => (refusal = error));
  return { answer, refusal: () => refusal as { status?: number } | undefined };
}

it('beats again and again', async () => {
  const { streams } = startStreams({ beatEveryMs: 5 });
  const { answer } = connect(streams);
  await expect.poll(() => answer.written.length).toBeGreaterThan(3);
  expect(answer.written.every((text) => text.startsWith('event: beat\n'))).toBe(true);
});

it('ends at the next beat once its session has ended, and only then', async () => {
  let ended = '';
  const { streams } = startStreams({ beatEveryMs: 5, keepAlive: (id) => Promise.resolve(id !== ended) });
  const [kept, gone] = [connect(streams, 'kept').answer, connect(streams, 'gone').answer];
  await expect.poll(() => gone.written.length).toBeGreaterThan(2);
  ended = 'gone';
  await expect.poll(() => gone.isEnded).toBe(true);
  expect(kept.isEnded).toBe(false);
});

it('refuses one stream more than it can hold', async () => {
  const { streams } = startStreams({ mostStreams: 2 });
  const [first, second, third] = [connect(streams), connect(streams), connect(streams)];
  await expect.poll(() => third.refusal()?.status).toBe(503);
  expect([first.refusal(), second.refusal()]).toEqual([undefined, undefined]);
});

it('cuts off a reader that has stopped reading, so that it cannot fill the memory', () => {
  const { streams, events } = startStreams({});
  const { answer } = connect(streams);
  const { answer: other } = connect(streams);
  answer.writableLength = 2_000_000;
  events.publish({ type: 'sample', now: 1, sampleId: 1, sensorIds: [] });
  expect([answer.isEnded, answer.isDestroyed, streams.count]).toEqual([true, true, 1]);
  expect(other.written).toHaveLength(2);
});

it('holds 200 streams and reaches every one of them', async () => {
  const app = await startTestApp();
  const client = await app.signedIn('operator');
  const streams = await Promise.all(Array.from({ length: 200 }, () => listen(client)));
  app.events.publish({ type: 'sample', now: 6, sampleId: 2, sensorIds: [] });
  const seconds = await Promise.all(streams.map(async (stream) => (await stream.next(), stream.next())));
  expect(seconds.every((event) => event !== 'ended' && event.event === 'sample')).toBe(true);
});
