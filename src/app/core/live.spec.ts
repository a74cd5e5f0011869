import { HttpTestingController } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { sessionPath } from '@shared/api/session';
import type { StreamEvent } from '@shared/api/stream';
import { Clock } from './clock';
import { Live } from './live';
import { FakeEventStreams, aSession, loadTestSession, provideTestCore, testNow } from './testing';

describe('the live stream', () => {
  let streams: FakeEventStreams;
  let deviceTime: number;
  let live: Live;

  beforeEach(async () => {
    streams = new FakeEventStreams();
    deviceTime = testNow;
    TestBed.configureTestingModule({ providers: [provideTestCore({ now: () => deviceTime, streams })] });
    vi.useFakeTimers();
    await loadTestSession();
    live = TestBed.inject(Live);
    TestBed.tick();
  });
  afterEach(() => {
    setVisibility('visible');
    vi.useRealTimers();
  });

  function setVisibility(state: DocumentVisibilityState): void {
    vi.spyOn(document, 'visibilityState', 'get').mockReturnValue(state);
    document.dispatchEvent(new Event('visibilitychange'));
    TestBed.tick();
  }

  function pass(ms: number): void {
    deviceTime += ms;
    vi.advanceTimersByTime(ms);
  }

  it('opens for whoever is signed in and tells when it stands', () => {
    expect(streams.opened.length).toBe(1);
    expect(live.state().kind).toBe('connecting');
    streams.latest.accept();
    expect(live.connected()).toBe(true);
  });

  it('hands on events, and its clock follows them', () => {
    const heard: StreamEvent[] = [];
    live.events.subscribe((event) => heard.push(event));
    streams.latest.accept();
    streams.latest.send({ type: 'note', now: testNow + 90_000, noteId: 4, sensorId: 'depropaniser-c4' });
    expect(heard).toEqual([{ type: 'note', now: testNow + 90_000, noteId: 4, sensorId: 'depropaniser-c4' }]);
    expect(TestBed.inject(Clock).now()).toBe(testNow + 90_000);
    expect(live.lastBeat()).toBe(testNow + 90_000);
  });

  it('leaves out an event that does not fit the contract, and says so to developers', () => {
    const complaint = vi.spyOn(console, 'error').mockImplementation(() => undefined);
    const heard: StreamEvent[] = [];
    live.events.subscribe((event) => heard.push(event));
    streams.latest.accept();
    streams.latest.send({ type: 'note', now: testNow } as StreamEvent);
    expect(heard).toEqual([]);
    expect(complaint).toHaveBeenCalledOnce();
    complaint.mockRestore();
  });

  it('tries again ever more slowly, and tells screens to read again once it is back', () => {
    let timesBack = 0;
    live.reconnected.subscribe(() => timesBack++);
    streams.latest.accept();
    streams.latest.fail();
    expect(live.state()).toEqual({ kind: 'lost', since: testNow });

    pass(999);
    expect(streams.opened.length).toBe(1);
    pass(1);
    expect(streams.opened.length).toBe(2);
    streams.latest.fail();
    pass(1999);
    expect(streams.opened.length).toBe(2);
    pass(1);
    expect(streams.opened.length).toBe(3);
    expect(live.state().kind).toBe('lost');

    streams.latest.accept();
    expect(live.connected()).toBe(true);
    expect(timesBack).toBe(1);
    expect(live.gaps()).toBe(1);
  });

  it('takes a connection that has gone silent for lost', () => {
    streams.latest.accept();
    pass(39_000);
    expect(live.connected()).toBe(true);
    pass(6000);
    expect(live.state().kind).toBe('lost');
    expect(streams.opened[0]?.isClosed).toBe(true);
  });

  it('closes while the tab is hidden and opens again when it is seen', () => {
    let timesBack = 0;
    live.reconnected.subscribe(() => timesBack++);
    streams.latest.accept();
    setVisibility('hidden');
    expect(streams.opened[0]?.isClosed).toBe(true);
    expect(live.state().kind).toBe('off');
    setVisibility('visible');
    streams.latest.accept();
    expect(streams.opened.length).toBe(2);
    expect(timesBack).toBe(1);
  });

  it('looks whether the session has ended when the connection is refused', async () => {
    streams.latest.fail();
    TestBed.inject(HttpTestingController)
      .expectOne(sessionPath)
      .flush(aSession({ signedOut: true }));
    vi.useRealTimers();
    await vi.waitFor(() => {
      TestBed.tick();
      expect(live.state().kind).toBe('off');
    });
  });
});
