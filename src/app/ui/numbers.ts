/** What stands where a number would, when there is none to show. */
export const noNumber = '–';

/**
 * A number for people: a true minus sign, and from 10,000 on the thousands set apart by a space that does not break.
 *
 * @param signed whether a plus is shown as well, for changes
 */
export function formatNumber(value: number, decimals: number, signed = false): string {
  const fixed = Math.abs(value).toFixed(decimals);
  const [whole = '', fraction] = fixed.split('.');
  const grouped = whole.length > 4 ? whole.replace(/\B(?=(\d{3})+$)/g, '\u00a0') : whole;
  // −0.00 would claim a direction that the digits shown do not have.
  const isZero = Number(fixed) === 0;
  const sign = isZero ? '' : value < 0 ? '\u2212' : signed ? '+' : '';
  return `${sign}${grouped}${fraction === undefined ? '' : `.${fraction}`}`;
}

/** `6 h 10 min`, `3 d 4 h`: how long something has lasted, as exact as anybody needs. */
export function durationWords(ms: number): string {
  const minutes = Math.floor(Math.max(0, ms) / 60_000);
  if (minutes < 1) return 'under 1 min';
  if (minutes < 60) return `${minutes} min`;
  const hours = Math.floor(minutes / 60);
  if (hours < 48)
    return minutes % 60 === 0 ? `${hours} h` : `${hours} h ${String(minutes % 60).padStart(2, '0')} min`;
  const days = Math.floor(hours / 24);
  return hours % 24 === 0 ? `${days} d` : `${days} d ${hours % 24} h`;
}
