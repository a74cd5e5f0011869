import { HttpTestingController } from '@angular/common/http/testing';
import { TestBed, type ComponentFixture } from '@angular/core/testing';
import { sensorsPath, type Sensor } from '@shared/api/sensors';
import { FakeEventStreams, loadTestSession, provideTestCore, testNow } from '../core/testing';
import { Board } from './board';
import { aSensor, aTrend, anEstimate } from '../ui/sensor-fixtures';
import { BoardHistory } from './board-history';

describe('the Board', () => {
  let fixture: ComponentFixture<Board>;
  let http: HttpTestingController;
  let streams: FakeEventStreams;
  let deviceTime: number;

  beforeEach(async () => {
    localStorage.clear();
    deviceTime = testNow;
    streams = new FakeEventStreams();
    TestBed.configureTestingModule({ providers: [provideTestCore({ now: () => deviceTime, streams })] });
    http = TestBed.inject(HttpTestingController);
    await loadTestSession();
    fixture = TestBed.createComponent(Board);
    TestBed.tick();
  });

  const page = () => fixture.nativeElement as HTMLElement;
  const rows = () => [...page().querySelectorAll<HTMLElement>('app-board-row')];
  const words = (element: Element | null | undefined) =>
    (element?.textContent ?? '').replace(/\s+/g, ' ').trim();
  const names = () => rows().map((row) => words(row.querySelector('h2 a')));

  async function show(...sensors: Sensor[]): Promise<void> {
    http.expectOne(sensorsPath).flush(sensors);
    await fixture.whenStable();
  }

  it('shows shapes while it reads, then one row per product', async () => {
    expect(page().querySelector('app-loading-state')).not.toBeNull();
    await show(aSensor());
    expect(page().querySelector('app-loading-state')).toBeNull();
    expect(rows().length).toBe(1);
  });

  it('says of a product how much, which way, against what, how far to trust it, and how old the sample is', async () => {
    await show(aSensor());
    const row = words(rows()[0]);
    expect(row).toContain('1.12');
    expect(row).toContain('mol %');
    expect(row).toContain('rising+0.09 per h');
    expect(row).toContain('Good');
    expect(row).toContain('under 1 % likely above limit');
    expect(row).toContain('sample 2 h old');
    expect(rows()[0]?.querySelector('svg[role=img]')?.getAttribute('aria-label')).toContain('limit 1.50');
  });

  it('leads from a row to the tower, at this product', async () => {
    await show(aSensor());
    expect(rows()[0]?.querySelector('a')?.getAttribute('href')).toBe(
      '/towers/test-tower?sensor=test-tower-c4',
    );
  });

  it('puts whoever needs a look first at the top, and says why', async () => {
    await show(
      aSensor({ id: 'a', towerName: 'Calm tower' }),
      aSensor({ id: 'b', towerName: 'Hot tower', latest: anEstimate({ value: 0.0162, high: 0.0183 }) }),
      aSensor({
        id: 'c',
        towerName: 'Blind tower',
        latest: anEstimate({
          value: null,
          low: null,
          high: null,
          quality: 'Bad',
          reasons: ['pressure-missing'],
        }),
      }),
    );
    expect(names()).toEqual(['Hot tower', 'Blind tower', 'Calm tower']);
    expect(words(rows()[0])).toContain('above limit');
    expect(words(rows()[1])).toContain('do not use this value');
    expect(words(rows()[1])).toContain('no recent pressure');
    expect(words(rows()[1])).toContain('no value');
    expect(words(page().querySelector('.head'))).toContain(
      '3 products: 1 off limit, 1 without a usable value',
    );
  });

  it('follows the stream without reading again, moves the row up, and says so aloud', async () => {
    await show(
      aSensor({ id: 'a', towerName: 'Alpha tower', offLimitProbability: 0.4 }),
      aSensor({ id: 'b', towerName: 'Beta tower' }),
    );
    expect(names()[0]).toContain('Alpha');
    streams.latest.accept();
    streams.latest.send({
      type: 'sensor',
      now: testNow + 60_000,
      sensor: aSensor({
        id: 'b',
        towerName: 'Beta tower',
        latest: anEstimate({ t: testNow + 60_000, value: 0.0171 }),
      }),
    });
    await fixture.whenStable();
    expect(names()[0]).toContain('Beta');
    expect(words(rows()[0])).toContain('1.71');
    expect(words(page().querySelector('[role=status]'))).toBe(
      'Beta tower, C4+ in propane, overhead: above limit.',
    );
    http.expectNone(sensorsPath);
  });

  it('keeps rows in their places while one of them has the keyboard’s focus', async () => {
    await show(aSensor({ id: 'a', towerName: 'Alpha tower' }), aSensor({ id: 'b', towerName: 'Beta tower' }));
    page().querySelector('ul')?.dispatchEvent(new FocusEvent('focusin'));
    streams.latest.accept();
    const risen = aSensor({ id: 'b', towerName: 'Beta tower', latest: anEstimate({ value: 0.0171 }) });
    streams.latest.send({ type: 'sensor', now: testNow, sensor: risen });
    await fixture.whenStable();
    expect(names()[0]).toContain('Alpha');
    expect(words(rows()[1])).toContain('1.71');

    page().querySelector('ul')?.dispatchEvent(new FocusEvent('focusout'));
    await fixture.whenStable();
    expect(names()[0]).toContain('Beta');
  });

  it('marks a product whose minutes have stopped, and no longer calls it Good', async () => {
    await show(aSensor());
    streams.latest.accept();
    deviceTime += 7 * 60_000;
    streams.latest.send({ type: 'beat', now: deviceTime });
    await fixture.whenStable();
    expect(words(rows()[0])).toContain('no new value for 7 min');
    expect(words(rows()[0])).not.toContain('Good');
    expect(rows()[0]?.classList.contains('stale')).toBe(true);
  });

  it('says since when it has lost the plant, keeps its rows, and reads again once back', async () => {
    await show(aSensor());
    streams.latest.accept();
    vi.useFakeTimers();
    streams.latest.fail();
    vi.advanceTimersByTime(1000);
    vi.useRealTimers();
    TestBed.tick();
    expect(words(page().querySelector('.lost'))).toContain('has not followed the plant since 14:07 AST');
    expect(rows().length).toBe(1);

    streams.latest.accept();
    TestBed.tick();
    await show(aSensor({ latest: anEstimate({ value: 0.0131 }) }));
    expect(page().querySelector('.lost')).toBeNull();
    expect(words(rows()[0])).toContain('1.31');
  });

  it('says what failed and tries again when asked', async () => {
    http.expectOne(sensorsPath).error(new ProgressEvent('error'));
    await fixture.whenStable();
    expect(words(page().querySelector('[role=alert]'))).toContain('The products could not be read');
    page().querySelector<HTMLButtonElement>('app-error-state button')?.click();
    TestBed.tick();
    await show(aSensor());
    expect(rows().length).toBe(1);
  });

  it('says what would fill it when no product is watched yet', async () => {
    await show();
    expect(words(page())).toContain('No product is watched yet');
  });
});

describe('the last shift of a product', () => {
  it('is read once, then grows by the minute', async () => {
    const streams = new FakeEventStreams();
    TestBed.configureTestingModule({ providers: [provideTestCore({ streams })] });
    const http = TestBed.inject(HttpTestingController);
    await loadTestSession();
    const fixture = TestBed.createComponent(BoardHistory);
    const sensor = aSensor();
    fixture.componentRef.setInput('sensor', sensor);
    TestBed.tick();
    const request = http.expectOne((asked) => asked.url === `${sensorsPath}/test-tower-c4/trend`);
    expect(request.request.params.get('from')).toBe(String(testNow - 8 * 3_600_000));
    expect(request.request.params.get('to')).toBe(String(testNow));
    request.flush(aTrend(sensor));
    await fixture.whenStable();
    const label = () =>
      (fixture.nativeElement as HTMLElement).querySelector('svg')?.getAttribute('aria-label');
    expect(label()).toBe('last 8 hours: from 1.08 to 1.12, highest 1.12 mol %');

    const latest = anEstimate({ t: testNow + 60_000, value: 0.0119 });
    fixture.componentRef.setInput('sensor', { ...sensor, latest });
    await fixture.whenStable();
    expect(label()).toBe('last 8 hours: from 1.08 to 1.19, highest 1.19 mol %');
    http.verify();
  });
});
