import { HttpTestingController } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { samplesPath } from '@shared/api/samples';
import { sensorsPath, type SensorDetail } from '@shared/api/sensors';
import type { StreamEvent } from '@shared/api/stream';
import { FakeEventStreams, loadTestSession, provideTestCore, testNow } from '../core/testing';
import { aSample, aSensorDetail } from '../ui/sensor-detail-fixtures';
import { aTrend, anEstimate } from '../ui/sensor-fixtures';
import { TrendChart } from '../ui/trend-chart/trend-chart';
import { Tower } from './tower';

const minute = 60_000;
const broken = { status: 500, statusText: 'Internal Server Error' };

async function open(sensor: SensorDetail = aSensorDetail(), options: { now?: () => number } = {}) {
  const streams = new FakeEventStreams();
  TestBed.configureTestingModule({ providers: provideTestCore({ streams, ...options }) });
  // What is drawn is tested by its option and in a browser; there is no canvas here.
  TestBed.overrideComponent(TrendChart, { set: { template: '', imports: [], providers: [] } });
  await loadTestSession();
  const http = TestBed.inject(HttpTestingController);
  const fixture = TestBed.createComponent(Tower);
  fixture.componentRef.setInput('towerId', 'test-tower');
  const page = fixture.nativeElement as HTMLElement;
  const trendReads = () => http.match((request) => request.url.endsWith('/trend'));
  /** Answers everything that was asked but trends, until nothing more is. */
  const settle = async () => {
    for (let round = 0; round < 4; round++) {
      TestBed.tick();
      for (const read of http.match(sensorsPath)) read.flush([sensor]);
      for (const read of http.match(`${sensorsPath}/${sensor.id}`)) read.flush(sensor);
      for (const read of http.match(`${samplesPath}/5`)) read.flush(aSample());
      await new Promise((resolve) => setTimeout(resolve));
    }
    TestBed.tick();
  };
  const words = () => page.textContent.replace(/\s+/g, ' ');
  await settle();
  return { fixture, http, page, streams, settle, words, trendReads };
}

async function openWithTrend(sensor?: SensorDetail, options?: { now?: () => number }) {
  const screen = await open(sensor, options);
  for (const read of screen.trendReads()) read.flush(aTrend(sensor ?? aSensorDetail()));
  await screen.settle();
  screen.streams.latest.accept();
  return screen;
}

describe('Tower', () => {
  it('says the value with its unit, band, limit, direction, rundown and quality', async () => {
    const { words } = await openWithTrend();
    for (const said of [
      '1.12 mol %',
      '0.98 to 1.26',
      'within 1.50',
      'under 1 % likely above limit',
      '+0.09 per h',
      '1.11follows in about 25 min',
      'Good',
      'drawn 2 h ago',
      'Advice for a qualified operator.',
    ])
      expect(words()).toContain(said);
  });

  it('says why a value is not Good, and that one is above its limit', async () => {
    const { words } = await openWithTrend(
      aSensorDetail({
        latest: anEstimate({ value: 0.0162, quality: 'Uncertain', reasons: ['entrainment-suspected'] }),
        offLimitProbability: 0.81,
      }),
    );
    expect(words()).toContain('above 1.5081 % likely above limit');
    expect(words()).toMatch(/Uncertain ?high differential pressure: liquid may be carried over/);
  });

  it('grows by the minute that comes, without reading the trend again', async () => {
    const { words, page, settle, streams, trendReads } = await openWithTrend();
    const sensor = aSensorDetail({ latest: anEstimate({ t: testNow + minute, value: 0.0131 }) });
    streams.latest.send({ type: 'sensor', now: testNow + minute, sensor });
    TestBed.tick();
    expect(words()).toContain('1.31 mol %');
    expect(trendReads()).toHaveLength(0);
    page.querySelector('details')!.dispatchEvent(new Event('toggle'));
    await settle();
    expect(page.querySelectorAll('app-trend-table tbody tr')).toHaveLength(4);
    expect(page.querySelector('app-trend-table tbody tr')?.textContent).toContain('1.31');
  });

  it('reads the trend again where minutes are missing before the one that comes', async () => {
    const { streams, trendReads } = await openWithTrend();
    const sensor = aSensorDetail({ latest: anEstimate({ t: testNow + 20 * minute }) });
    streams.latest.send({ type: 'sensor', now: testNow + 20 * minute, sensor });
    TestBed.tick();
    expect(trendReads()).toHaveLength(1);
  });

  it('reads again after a sample of its own, not of another sensor', async () => {
    const { streams, trendReads } = await openWithTrend();
    const sampled = (sensorId: string): StreamEvent => ({
      type: 'sample',
      now: testNow,
      sampleId: 9,
      sensorIds: [sensorId],
    });
    streams.latest.send(sampled('elsewhere'));
    TestBed.tick();
    expect(trendReads()).toHaveLength(0);
    streams.latest.send(sampled('test-tower-c4'));
    TestBed.tick();
    expect(trendReads()).toHaveLength(1);
  });

  it('keeps the head and the cards when the trend cannot be read, and tries again', async () => {
    const { words, page, settle, trendReads } = await open();
    trendReads()[0]!.flush(null, broken);
    await settle();
    expect(words()).toContain('The trend could not be read');
    expect(words()).toContain('1.12 mol %');
    expect(words()).toContain('It moved the offset from +0.08 K to +0.14 K.');
    [...page.querySelectorAll('button')].find((button) => button.textContent === 'Try again')!.click();
    TestBed.tick();
    expect(trendReads()).toHaveLength(1);
  });

  it('keeps the picture it has when another stretch cannot be read, and says so', async () => {
    const { words, page, settle, trendReads } = await openWithTrend();
    [...page.querySelectorAll('button')].find((button) => button.textContent.trim() === '7 d')!.click();
    TestBed.tick();
    const [read] = trendReads();
    expect(Number(read!.request.params.get('to')) - Number(read!.request.params.get('from'))).toBeGreaterThan(
      7 * 24 * 60 * minute,
    );
    read!.flush(null, broken);
    await settle();
    expect(words()).toContain('This stretch could not be read.');
    expect(page.querySelector('app-trend-chart')).not.toBeNull();
  });

  it('calls a value that no longer comes stale, and no longer Good', async () => {
    const { words, page } = await openWithTrend(
      aSensorDetail({ latest: anEstimate({ t: testNow - 25 * minute }) }),
    );
    expect(words()).toContain('no new value for 25 min');
    expect(page.querySelector('app-quality-chip')).toBeNull();
  });

  it('says that nothing was inferred yet', async () => {
    const { words } = await openWithTrend(
      aSensorDetail({ latest: null, slopePerHour: null, offLimitProbability: null, lastSample: null }),
    );
    expect(words()).toContain('no value Nothing has been inferred yet');
    expect(words()).toContain('No sample has been entered for this product.');
  });

  it('says so where there is no such tower', async () => {
    const { fixture, words, settle } = await open();
    fixture.componentRef.setInput('towerId', 'elsewhere');
    await settle();
    expect(words()).toContain('There is no such tower');
  });

  it('says since when it has not followed the plant', async () => {
    const { words, streams } = await openWithTrend();
    streams.latest.fail();
    TestBed.tick();
    expect(words()).toContain('The trend has not followed the plant since 14:07 AST');
  });
});
