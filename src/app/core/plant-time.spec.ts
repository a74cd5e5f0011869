import {
  parsePlantTime,
  plantDateTime,
  plantDayStart,
  plantTimeWithZone,
  plantWallClock,
  zoneName,
} from './plant-time';

// Rules of the IANA time zone database: Halifax goes forward from 02:00 to 03:00 on the second Sunday of March and back
// from 02:00 to 01:00 on the first Sunday of November; Lord Howe moves by half an hour; Havana goes forward at midnight.
const halifax = 'America/Halifax';

describe('reading a time off the plant’s wall clock', () => {
  it('takes winter time as four hours behind UTC in Halifax', () => {
    expect(parsePlantTime('2026-12-02', '14:07', halifax)).toEqual({
      kind: 'ok',
      t: Date.UTC(2026, 11, 2, 18, 7),
    });
  });

  it('takes summer time as three hours behind UTC in Halifax', () => {
    expect(parsePlantTime('2026-07-01', '06:00', halifax)).toEqual({
      kind: 'ok',
      t: Date.UTC(2026, 6, 1, 9),
    });
  });

  it('keeps seconds where they are given', () => {
    expect(parsePlantTime('2026-12-02', '14:07:31', halifax)).toEqual({
      kind: 'ok',
      t: Date.UTC(2026, 11, 2, 18, 7, 31),
    });
  });

  it('knows that the hour skipped in spring never was', () => {
    expect(parsePlantTime('2027-03-14', '02:30', halifax)).toEqual({ kind: 'gap' });
  });

  it('takes the last minute before the skipped hour and the first after it', () => {
    expect(parsePlantTime('2027-03-14', '01:59', halifax)).toEqual({
      kind: 'ok',
      t: Date.UTC(2027, 2, 14, 5, 59),
    });
    expect(parsePlantTime('2027-03-14', '03:00', halifax)).toEqual({
      kind: 'ok',
      t: Date.UTC(2027, 2, 14, 6),
    });
  });

  it('gives both times of the hour that comes twice in autumn', () => {
    expect(parsePlantTime('2026-11-01', '01:30', halifax)).toEqual({
      kind: 'twice',
      earlier: Date.UTC(2026, 10, 1, 4, 30),
      later: Date.UTC(2026, 10, 1, 5, 30),
    });
  });

  it('finds the repeated half hour of a zone that moves by half an hour', () => {
    expect(parsePlantTime('2026-04-05', '01:45', 'Australia/Lord_Howe')).toEqual({
      kind: 'twice',
      earlier: Date.UTC(2026, 3, 4, 14, 45),
      later: Date.UTC(2026, 3, 4, 15, 15),
    });
  });

  it('is undone by the wall clock, each half hour of a year with both changes', () => {
    for (let t = Date.UTC(2026, 0, 1); t < Date.UTC(2027, 0, 1); t += 30 * 60_000) {
      const { date, time } = plantWallClock(t, halifax);
      const parsed = parsePlantTime(date, time, halifax);
      const candidates =
        parsed.kind === 'twice' ? [parsed.earlier, parsed.later] : parsed.kind === 'ok' ? [parsed.t] : [];
      expect(candidates).toContain(t);
    }
  });

  it.each([
    ['2026-02-30', '10:00'],
    ['2026-12-02', '24:30'],
    ['', ''],
    ['yesterday', '10:00'],
  ])('refuses %s %s, which is no date and time', (date, time) => {
    expect(() => parsePlantTime(date, time, halifax)).toThrow(RangeError);
  });
});

describe('showing a time of the plant', () => {
  it('names the zone in force', () => {
    expect(plantTimeWithZone(Date.UTC(2026, 11, 2, 18, 7), halifax)).toBe('14:07 AST');
    expect(plantTimeWithZone(Date.UTC(2026, 6, 1, 9), halifax)).toBe('06:00 ADT');
  });

  it('names zones of other parts of the world by their own short name', () => {
    expect(zoneName(Date.UTC(2026, 0, 1), 'Europe/Berlin')).toBe('CET');
    expect(zoneName(Date.UTC(2026, 0, 1), 'UTC')).toBe('UTC');
  });

  it('shows midnight as 00:00', () => {
    expect(plantTimeWithZone(Date.UTC(2026, 11, 2, 4), halifax)).toBe('00:00 AST');
  });

  it('adds the year only where it is another one', () => {
    const now = Date.UTC(2026, 11, 2, 18);
    expect(plantDateTime(Date.UTC(2026, 10, 30, 12), halifax, now)).toBe('30 Nov, 08:00 AST');
    expect(plantDateTime(Date.UTC(2025, 10, 30, 12), halifax, now)).toBe('30 Nov 2025, 08:00 AST');
  });

  it('begins a day at its first minute, also where clocks skip midnight', () => {
    expect(plantDayStart(Date.UTC(2026, 11, 2, 18), halifax)).toBe(Date.UTC(2026, 11, 2, 4));
    expect(plantDayStart(Date.UTC(2026, 2, 8, 18), 'America/Havana')).toBe(Date.UTC(2026, 2, 8, 5));
  });
});
