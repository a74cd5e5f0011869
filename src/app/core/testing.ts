import { provideHttpClient, withInterceptors } from '@angular/common/http';
import { HttpTestingController, provideHttpClientTesting } from '@angular/common/http/testing';
import type { EnvironmentProviders, Provider } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { provideRouter, type Routes } from '@angular/router';
import type { Role, Session } from '@shared/api/session';
import { sessionPath } from '@shared/api/session';
import type { StreamEvent } from '@shared/api/stream';
import { openEventStream, type EventStream } from './live';
import { SessionStore } from './session';
import { sessionInterceptor } from './session-interceptor';
import { wallTime } from './wall-time';

/** 2 December 2026, 14:07 in Halifax (18:07 UTC). */
export const testNow = Date.UTC(2026, 11, 2, 18, 7);

/** A session as the server would answer it: an operator at an invented site. */
export function aSession(change: { role?: Role; signedOut?: boolean } = {}): Session {
  const role = change.role ?? 'operator';
  return {
    user: change.signedOut ? null : { id: 1, username: role, name: 'Test Person', role },
    site: {
      name: 'Test Site',
      timeZone: 'America/Halifax',
      barometricPressure: 101_325,
      demonstration: true,
    },
    now: testNow,
  };
}

/** Stands in for the browser's EventSource: remembers the streams opened and lets a test speak for the server. */
export class FakeEventStreams {
  readonly opened: FakeEventStream[] = [];
  readonly open = (): EventStream => {
    const stream = new FakeEventStream();
    this.opened.push(stream);
    return stream;
  };
  get latest(): FakeEventStream {
    const stream = this.opened.at(-1);
    if (!stream) throw new Error('no stream was opened');
    return stream;
  }
}

export class FakeEventStream implements EventStream {
  private readonly listeners = new Map<string, ((event: MessageEvent<string>) => void)[]>();
  isClosed = false;

  addEventListener(type: string, listener: (event: MessageEvent<string>) => void): void {
    this.listeners.set(type, [...(this.listeners.get(type) ?? []), listener]);
  }
  close(): void {
    this.isClosed = true;
  }
  /** The connection stands. */
  accept(): void {
    this.dispatch('open', '');
  }
  fail(): void {
    this.dispatch('error', '');
  }
  send(event: StreamEvent): void {
    this.dispatch(event.type, JSON.stringify(event));
  }
  private dispatch(type: string, data: string): void {
    for (const listener of this.listeners.get(type) ?? []) listener(new MessageEvent(type, { data }));
  }
}

/** What a component spec needs around it: HTTP under control, a still clock, no real stream. */
export function provideTestCore(
  options: { now?: () => number; streams?: FakeEventStreams; routes?: Routes } = {},
): (Provider | EnvironmentProviders)[] {
  const streams = options.streams ?? new FakeEventStreams();
  return [
    provideHttpClient(withInterceptors([sessionInterceptor])),
    provideHttpClientTesting(),
    provideRouter(options.routes ?? [{ path: '**', children: [] }]),
    { provide: wallTime, useValue: options.now ?? (() => testNow) },
    { provide: openEventStream, useValue: streams.open },
  ];
}

/** Signs the test's person in, as the application does at its start. */
export async function loadTestSession(session = aSession()): Promise<void> {
  const loaded = TestBed.inject(SessionStore).load();
  TestBed.inject(HttpTestingController).expectOne(sessionPath).flush(session);
  await loaded;
}
