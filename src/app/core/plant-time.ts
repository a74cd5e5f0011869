import { Injectable, inject } from '@angular/core';
import { SessionStore } from './session';

const hourMs = 3_600_000;
const dayMs = 24 * hourMs;

/** What a date and a time read off the plant's wall clock stand for. */
export type ParsedPlantTime =
  | { readonly kind: 'ok'; readonly t: number }
  /** The clock never showed it: it went forward over it. */
  | { readonly kind: 'gap' }
  /** The clock showed it twice, because it went back [UTC ms each]. */
  | { readonly kind: 'twice'; readonly earlier: number; readonly later: number };

/**
 * Turns a date and time of the plant's wall clock into UTC milliseconds.
 *
 * @param date as a date field gives it, `2026-11-01`
 * @param time as a time field gives it, `01:30` or `01:30:15`
 * @param zone IANA zone, `America/Halifax`
 * @throws RangeError when date or time are not of that form or do not exist in any zone (30 February)
 */
export function parsePlantTime(date: string, time: string, zone: string): ParsedPlantTime {
  const wall = wallAsUtc(date, time);
  // The offsets a day before and after are the only ones that can hold at the time sought; each is right if the time it
  // gives really has it.
  const found = [...new Set([wall - dayMs, wall + dayMs].map((near) => zoneOffset(near, zone)))]
    .map((offset) => ({ t: wall - offset, offset }))
    .filter(({ t, offset }) => zoneOffset(t, zone) === offset)
    .map(({ t }) => t)
    .sort((a, b) => a - b);
  const [earlier, later] = found;
  if (earlier === undefined) return { kind: 'gap' };
  return later === undefined ? { kind: 'ok', t: earlier } : { kind: 'twice', earlier, later };
}

/** Date and time as date and time fields want them, read off the plant's wall clock. */
export function plantWallClock(t: number, zone: string): { date: string; time: string } {
  const parts = wallParts(t, zone);
  return {
    date: `${parts['year']}-${parts['month']}-${parts['day']}`,
    time: `${parts['hour']}:${parts['minute']}`,
  };
}

/** `14:07`. */
export function plantClockTime(t: number, zone: string): string {
  return plantWallClock(t, zone).time;
}

/** `14:07 AST`: a time that may be read away from the page says its zone. */
export function plantTimeWithZone(t: number, zone: string): string {
  return `${plantClockTime(t, zone)} ${zoneName(t, zone)}`;
}

/** `2 Dec, 14:07 AST`, with the year where it is not that of `now`. */
export function plantDateTime(t: number, zone: string, now: number): string {
  const sameYear = wallParts(t, zone)['year'] === wallParts(now, zone)['year'];
  const day = formatter(zone, { day: 'numeric', month: 'short', ...(sameYear ? {} : { year: 'numeric' }) });
  return `${day.format(t)}, ${plantTimeWithZone(t, zone)}`;
}

/** `Wednesday, 2 December 2026`. */
export function plantDay(t: number, zone: string): string {
  return formatter(zone, { weekday: 'long', day: 'numeric', month: 'long', year: 'numeric' }).format(t);
}

/** `Wednesday, 2 December 2026, AST`: heads a list of times of that day. */
export function plantDayWithZone(t: number, zone: string): string {
  return `${plantDay(t, zone)}, ${zoneName(t, zone)}`;
}

/** UTC milliseconds at which the plant's day that holds `t` began. */
export function plantDayStart(t: number, zone: string): number {
  const { date } = plantWallClock(t, zone);
  // Some zones change their clocks at midnight: the day then begins with the first minute there is.
  for (let minute = 0; ; minute += 30) {
    const time = `${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;
    const start = parsePlantTime(date, time, zone);
    if (start.kind === 'ok') return start.t;
    if (start.kind === 'twice') return start.earlier;
  }
}

/** Short name of the zone as it is in force at `t`: `AST`, `ADT`, `CET`, else `GMT+5:30`. */
export function zoneName(t: number, zone: string): string {
  const names = nameLocales.map(
    (locale) =>
      formatter(zone, { timeZoneName: 'short' }, locale)
        .formatToParts(t)
        .find((part) => part.type === 'timeZoneName')?.value ?? zone,
  );
  return names.find((name) => !/^GMT[+-]/.test(name)) ?? names[0] ?? zone;
}

/** No one locale knows the short names of all zones: each knows those of its own part of the world. */
const nameLocales = ['en-CA', 'en-GB', 'en-AU', 'en-IN', 'en-ZA'];

/** Wall clock minus UTC at `t` [ms]. */
export function zoneOffset(t: number, zone: string): number {
  const parts = wallParts(t, zone);
  const wall = Date.UTC(
    Number(parts['year']),
    Number(parts['month']) - 1,
    Number(parts['day']),
    Number(parts['hour']),
    Number(parts['minute']),
    Number(parts['second']),
  );
  return wall - Math.floor(t / 1000) * 1000;
}

function wallAsUtc(date: string, time: string): number {
  const wall = Date.parse(`${date}T${time}Z`);
  // Date.parse takes 30 February for 2 March, or refuses it, by browser: looking back finds both.
  if (Number.isNaN(wall) || !new Date(wall).toISOString().startsWith(`${date}T${time}`))
    throw new RangeError(`not a date and time: ${date} ${time}`);
  return wall;
}

function wallParts(t: number, zone: string): Partial<Record<string, string>> {
  const format = formatter(zone, {
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    second: '2-digit',
    hourCycle: 'h23',
  });
  return Object.fromEntries(format.formatToParts(t).map(({ type, value }) => [type, value]));
}

/** Making a formatter costs a hundred times what using it does, and the clock uses one each second. */
const formatters = new Map<string, Intl.DateTimeFormat>();

function formatter(zone: string, options: Intl.DateTimeFormatOptions, locale = 'en-GB'): Intl.DateTimeFormat {
  const key = `${locale} ${zone} ${JSON.stringify(options)}`;
  let known = formatters.get(key);
  if (!known) formatters.set(key, (known = new Intl.DateTimeFormat(locale, { ...options, timeZone: zone })));
  return known;
}

/** The functions of this file in the site's zone. */
@Injectable({ providedIn: 'root' })
export class PlantTime {
  private readonly session = inject(SessionStore);

  /** IANA zone of the site. */
  get zone(): string {
    return this.session.site().timeZone;
  }

  clockTime(t: number): string {
    return plantClockTime(t, this.zone);
  }

  timeWithZone(t: number): string {
    return plantTimeWithZone(t, this.zone);
  }

  dateTime(t: number, now: number): string {
    return plantDateTime(t, this.zone, now);
  }

  day(t: number): string {
    return plantDay(t, this.zone);
  }

  dayWithZone(t: number): string {
    return plantDayWithZone(t, this.zone);
  }

  dayStart(t: number): number {
    return plantDayStart(t, this.zone);
  }

  wallClock(t: number): { date: string; time: string } {
    return plantWallClock(t, this.zone);
  }

  /** Wall clock minus UTC at `t` [ms]. */
  offset(t: number): number {
    return zoneOffset(t, this.zone);
  }

  parse(date: string, time: string): ParsedPlantTime {
    return parsePlantTime(date, time, this.zone);
  }
}
