import { plantClockTime, plantWallClock, zoneOffset } from '../../core/plant-time';
import { plantTicks } from './plant-ticks';

const zone = 'America/Halifax';
const offset = (t: number) => zoneOffset(t, zone);
const hour = 3_600_000;

describe('ticks of the time axis', () => {
  it('fall on full hours of the plant, also where its zone is half an hour off', () => {
    const from = Date.UTC(2026, 11, 2, 10, 7);
    const half = (t: number) => zoneOffset(t, 'Asia/Kolkata');
    const ticks = plantTicks(from, from + 8 * hour, 9, half);
    expect(ticks.length).toBe(8);
    expect(ticks.map((t) => plantClockTime(t, 'Asia/Kolkata').slice(3))).toEqual(Array(8).fill('00'));
  });

  it('fall on midnights before and after the clocks went back on 1 November 2026', () => {
    const from = Date.UTC(2026, 9, 29, 12);
    const ticks = plantTicks(from, from + 7 * 24 * hour, 9, offset);
    expect(ticks.map((t) => plantWallClock(t, zone))).toEqual(
      ['10-30', '10-31', '11-01', '11-02', '11-03', '11-04', '11-05'].map((date) => ({
        date: `2026-${date}`,
        time: '00:00',
      })),
    );
    // The day of the change has 25 hours.
    expect(ticks[3]! - ticks[2]!).toBe(25 * hour);
  });

  it('leave out an hour the clocks went forward over, on 8 March 2026', () => {
    const from = Date.UTC(2026, 2, 8, 4);
    const times = plantTicks(from, from + 5 * hour, 6, offset).map((t) => plantClockTime(t, zone));
    expect(times).toEqual(['00:00', '01:00', '03:00', '04:00', '05:00', '06:00']);
  });

  it('are about as many as asked for, for any stretch from ten minutes to a year', () => {
    const from = Date.UTC(2026, 5, 1, 3, 21);
    for (const hours of [1 / 6, 1, 8, 24, 168, 720, 8760]) {
      const count = plantTicks(from, from + hours * hour, 9, offset).length;
      expect(count, `${hours} h`).toBeGreaterThanOrEqual(4);
      expect(count, `${hours} h`).toBeLessThanOrEqual(10);
    }
  });
});
