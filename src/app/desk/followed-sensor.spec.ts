import { HttpTestingController } from '@angular/common/http/testing';
import { TestBed } from '@angular/core/testing';
import { FakeEventStreams, loadTestSession, provideTestCore, testNow } from '../core/testing';
import { Live } from '../core/live';
import { FollowedSensor } from './followed-sensor';
import { slateOf, stateOf } from './followed-case';
import { aSensor, aSensorDetail, anEstimate } from './testing';

const sampled = [
  { id: 'ethane', fraction: 0.008 },
  { id: 'propane', fraction: 0.968 },
  { id: 'n-butane', fraction: 0.024 },
];
const aSample = {
  id: 41,
  towerId: 'depropaniser',
  towerName: 'Depropaniser',
  point: 'overhead',
  drawnAt: testNow - 3_600_000,
  receivedAt: testNow,
  enteredAt: testNow,
  enteredBy: 'Test Person',
  fractions: sampled,
  reportedSum: 1,
  remark: '',
  state: 'used',
  stateReason: '',
  corrections: [],
};

describe('the followed sensor', () => {
  let http: HttpTestingController;
  let streams: FakeEventStreams;
  let followed: FollowedSensor;

  beforeEach(async () => {
    streams = new FakeEventStreams();
    TestBed.configureTestingModule({ providers: [provideTestCore({ streams }), FollowedSensor] });
    await loadTestSession();
    http = TestBed.inject(HttpTestingController);
    TestBed.inject(Live);
    followed = TestBed.inject(FollowedSensor);
    TestBed.tick();
    streams.latest.accept();
  });

  function follow() {
    followed.follows('depropaniser-c4');
    TestBed.tick();
    http.expectOne('/api/sensors/depropaniser-c4').flush(aSensorDetail());
    http.expectOne((request) => request.url === '/api/samples').flush({ items: [aSample], next: null });
  }
  const following = () => {
    const state = followed.state();
    if (state.kind !== 'following') throw new Error(`it is ${state.kind}`);
    return state;
  };

  it('is read with the sample it rests on', () => {
    follow();
    expect(following().sampled).toEqual(sampled);
    expect(following().latest?.temperature).toBe(322.9);
  });

  it('moves with the live stream, without asking again', () => {
    follow();
    const latest = anEstimate({ temperature: 323.4 });
    streams.latest.send({ type: 'sensor', now: testNow, sensor: aSensor({ id: 'another', latest }) });
    expect(following().latest?.temperature).toBe(322.9);
    streams.latest.send({ type: 'sensor', now: testNow, sensor: aSensor({ latest }) });
    expect(following().latest?.temperature).toBe(323.4);
    http.verify();
  });

  it('is read anew when a sample has changed its slate', () => {
    follow();
    const latest = anEstimate({ baseSampleId: 42 });
    streams.latest.send({ type: 'sensor', now: testNow, sensor: aSensor({ latest }) });
    http.expectOne('/api/sensors/depropaniser-c4').flush(aSensorDetail({ latest }));
    http
      .expectOne((request) => request.url === '/api/samples')
      .flush({ items: [{ ...aSample, id: 42 }], next: null });
    expect(following().latest?.baseSampleId).toBe(42);
  });

  it('says what failed, and tries again when asked', () => {
    followed.follows('depropaniser-c4');
    TestBed.tick();
    http.expectOne('/api/sensors/depropaniser-c4').flush('', { status: 502, statusText: 'Bad gateway' });
    expect(followed.state().kind).toBe('failed');
    followed.retry();
    http.expectOne('/api/sensors/depropaniser-c4').flush(aSensorDetail({ latest: null }));
    expect(following().latest).toBeNull();
  });

  it('is let go', () => {
    follow();
    followed.follows(null);
    TestBed.tick();
    streams.latest.send({ type: 'sensor', now: testNow, sensor: aSensor() });
    expect(followed.state()).toEqual({ kind: 'none' });
  });
});

describe('the case of a followed sensor', () => {
  it('has the slate of its set-up until a sample was used, then that of the sample', () => {
    const amounts = (fractions: typeof sampled | null) =>
      slateOf(aSensorDetail(), fractions)?.rows.map(({ id, amount, group }) => `${id} ${amount} ${group}`);
    expect(amounts(null)).toEqual(['ethane 1 light', 'propane 97 light', 'n-butane 2 heavy']);
    expect(amounts(sampled)).toEqual(['ethane 0.8 light', 'propane 96.8 light', 'n-butane 2.4 heavy']);
    expect(slateOf(aSensorDetail(), null)).toMatchObject({ relation: 'dew', target: 0.02, basis: 'mole' });
  });

  it('stands at the readings the sensor calculates with: the temperature has the laboratory’s offset in it', () => {
    expect(stateOf(anEstimate(), aSensorDetail())).toEqual({
      temperature: 323.15,
      pressure: 1_720_000,
      offset: 0.25,
    });
  });

  it('is none while the sensor has no version or no reading', () => {
    expect(slateOf(aSensorDetail({ version: null }), null)).toBeUndefined();
    expect(stateOf(null, aSensorDetail())).toBeUndefined();
    expect(stateOf(anEstimate({ temperature: null }), aSensorDetail())).toBeUndefined();
  });
});
