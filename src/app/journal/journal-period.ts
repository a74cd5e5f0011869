/** Stretches of time a reader may choose from. */
export const periods = [
  { period: 'day', label: 'Last 24 hours' },
  { period: 'week', label: 'Last 7 days' },
  { period: 'month', label: 'Last 30 days' },
  { period: 'all', label: 'All time' },
  { period: 'days', label: 'Chosen days' },
] as const;
export type Period = (typeof periods)[number]['period'];

const dayMs = 24 * 3_600_000;
const lengths: Readonly<Record<'day' | 'week' | 'month', number>> = {
  day: dayMs,
  week: 7 * dayMs,
  month: 30 * dayMs,
};

export interface ChosenPeriod {
  readonly period: Period;
  /** First and last day, `2026-12-02`, where the period is `days`; either may be left open. */
  readonly firstDay: string;
  readonly lastDay: string;
}

/**
 * The period in UTC milliseconds, both ends included; an open end is left out.
 *
 * @param dayStart when the plant's day of that date begins, null for what is no date
 */
export function periodBounds(
  chosen: ChosenPeriod,
  now: number,
  dayStart: (date: string) => number | null,
): { from?: number; to?: number } {
  if (chosen.period === 'all') return {};
  if (chosen.period !== 'days') return { from: now - lengths[chosen.period] };
  const from = dayStart(chosen.firstDay);
  const to = dayStart(dayAfter(chosen.lastDay));
  return { ...(from === null ? {} : { from }), ...(to === null ? {} : { to: to - 1 }) };
}

/** The date after; empty for what is no date. Dates are counted as such: no zone, no change of clocks. */
function dayAfter(date: string): string {
  const t = Date.parse(`${date}T00:00:00Z`);
  return Number.isNaN(t) ? '' : new Date(t + dayMs).toISOString().slice(0, 10);
}
