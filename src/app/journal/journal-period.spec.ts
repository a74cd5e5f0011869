import { plantDayStart, parsePlantTime } from '../core/plant-time';
import { periodBounds } from './journal-period';

const zone = 'America/Halifax';
const now = Date.UTC(2026, 11, 2, 18, 7);

function dayStart(date: string): number | null {
  if (!date) return null;
  const noon = parsePlantTime(date, '12:00', zone);
  return noon.kind === 'ok' ? plantDayStart(noon.t, zone) : null;
}

describe('the period of the journal', () => {
  it('counts back from now', () => {
    expect(periodBounds({ period: 'day', firstDay: '', lastDay: '' }, now, dayStart)).toEqual({
      from: now - 86_400_000,
    });
  });

  it('has no bounds for all time', () => {
    expect(periodBounds({ period: 'all', firstDay: '', lastDay: '' }, now, dayStart)).toEqual({});
  });

  it('takes days as the plant has them, the last one to its end', () => {
    expect(
      periodBounds({ period: 'days', firstDay: '2026-11-30', lastDay: '2026-12-01' }, now, dayStart),
    ).toEqual({ from: Date.UTC(2026, 10, 30, 4), to: Date.UTC(2026, 11, 2, 4) - 1 });
  });

  it('gives the day on which clocks go back its 25 hours', () => {
    const { from, to } = periodBounds(
      { period: 'days', firstDay: '2026-11-01', lastDay: '2026-11-01' },
      now,
      dayStart,
    );
    expect((to! + 1 - from!) / 3_600_000).toBe(25);
  });

  it('leaves an end open that was not given', () => {
    expect(periodBounds({ period: 'days', firstDay: '', lastDay: '2026-12-01' }, now, dayStart)).toEqual({
      to: Date.UTC(2026, 11, 2, 4) - 1,
    });
  });
});
