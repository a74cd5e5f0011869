import { endsOf, lookedAt, moved, zoomed } from './trend-window';

const hour = 3_600_000;
const now = 100 * hour;

describe('the window of the trend', () => {
  it('ends a little after now while it is live', () => {
    const { from, to } = endsOf({ kind: 'live', span: 8 * hour }, now);
    expect([from, to > now]).toEqual([now - 8 * hour, true]);
  });

  it('goes back by half its length, and forward past now it is live again', () => {
    const back = moved({ kind: 'live', span: 8 * hour }, -0.5, now);
    expect(back).toEqual({ kind: 'past', from: now - 12 * hour, to: now - 4 * hour });
    expect(moved(back, 0.5, now)).toEqual({ kind: 'live', span: 8 * hour });
  });

  it('zooms a past window about its middle, and never closer than ten minutes', () => {
    expect(zoomed({ kind: 'past', from: 10 * hour, to: 14 * hour }, 0.5, now)).toEqual({
      kind: 'past',
      from: 11 * hour,
      to: 13 * hour,
    });
    expect(zoomed({ kind: 'live', span: 12 * 60_000 }, 0.5, now)).toEqual({
      kind: 'live',
      span: 10 * 60_000,
    });
  });

  it('stays live where a wheel or drag comes to rest on now, and stands still where it does not', () => {
    const live = endsOf({ kind: 'live', span: 8 * hour }, now);
    expect(lookedAt({ from: now - 6 * hour, to: live.to }, now)).toEqual({ kind: 'live', span: 6 * hour });
    expect(lookedAt({ from: now - 9 * hour, to: now - hour }, now)).toEqual({
      kind: 'past',
      from: now - 9 * hour,
      to: now - hour,
    });
  });
});
