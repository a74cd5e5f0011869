import { TestBed } from '@angular/core/testing';
import { Clock } from './clock';
import { provideTestCore } from './testing';

describe('the clock', () => {
  beforeEach(() => vi.useFakeTimers());
  afterEach(() => vi.useRealTimers());

  it('follows the server, however wrong this device is, and ticks each second', () => {
    let deviceTime = 1_000_000_000_000;
    TestBed.configureTestingModule({ providers: [provideTestCore({ now: () => deviceTime })] });
    const clock = TestBed.inject(Clock);

    clock.follow(1_800_000_000_000);
    expect(clock.now()).toBe(1_800_000_000_000);

    deviceTime += 5000;
    vi.advanceTimersByTime(1000);
    expect(clock.now()).toBe(1_800_000_005_000);
  });

  it('gives the full minute for what need not change each second', () => {
    const time = Date.UTC(2026, 11, 2, 18, 7, 42);
    TestBed.configureTestingModule({ providers: [provideTestCore({ now: () => time })] });
    expect(TestBed.inject(Clock).minute()).toBe(Date.UTC(2026, 11, 2, 18, 7));
  });

  it('stops ticking with the application', () => {
    TestBed.configureTestingModule({ providers: [provideTestCore()] });
    TestBed.inject(Clock);
    TestBed.resetTestingModule();
    expect(vi.getTimerCount()).toBe(0);
  });
});
