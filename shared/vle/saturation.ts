import type { Component } from './components';
import { SaturationLine, type LinePoint } from './saturation-line';

export type LineOutcome =
  | { readonly kind: 'solved'; readonly point: LinePoint }
  | { readonly kind: 'beyond-line'; readonly highest: number }
  | { readonly kind: 'not-converged' };

/**
 * The ordinary (low-pressure) saturation point of a Peng-Robinson mixture at one temperature or pressure.
 *
 * Newton from Wilson's K-values first; when that fails or lands near the trivial solution, the line is followed up from
 * low pressure until it meets the wanted value, so that the answer does not depend on the guess.
 * @param held 'temperature' [K] or 'pressure' [Pa], and its value
 */
export function saturate(line: SaturationLine, held: 'temperature' | 'pressure', value: number): LineOutcome {
  const { n } = line;
  const index = held === 'temperature' ? n : n + 1;
  const target = Math.log(value);
  const guess = wilsonPoint(line.components, line, held, value);
  if (guess) {
    const point = guess.slice();
    if (line.solve(point, index, target) > 0 && isOrdinary(point, n) && line.isVapourOverLiquid(point))
      return { kind: 'solved', point };
  }
  return follow(line, index, target);
}

/** Well away from the critical point, where the first branch is the only one Newton finds from Wilson's guess. */
function isOrdinary(u: LinePoint, n: number): boolean {
  let spread = 0;
  for (let i = 0; i < n; i++) spread = Math.max(spread, Math.abs(u[i]!));
  return spread > 0.5;
}

/** No line is followed from below this [Pa]: less than a molecule in a drum. */
const lowestPressure = 1e-30;

/** ln K of Wilson's correlation. @source wilson1969 */
function wilson(component: Component, T: number, lnP: number): number {
  return (
    Math.log(component.criticalPressure) -
    lnP +
    5.373 * (1 + component.acentricFactor) * (1 - component.criticalTemperature / T)
  );
}

/** A point that satisfies Σy = Σx with Wilson's K-values, at the held temperature or pressure. */
function wilsonPoint(
  components: readonly Component[],
  line: SaturationLine,
  held: 'temperature' | 'pressure',
  value: number,
): LinePoint | undefined {
  const { n } = line;
  const sign = line.feedPhase === 'vapour' ? -1 : 1;
  const u = new Float64Array(n + 2);
  let lnT = held === 'temperature' ? Math.log(value) : Math.log(meanBoilingPoint(components, line.feed));
  let lnP = held === 'pressure' ? Math.log(value) : 0;
  for (let step = 0; step < 60; step++) {
    const T = Math.exp(lnT);
    let sum = 0,
      slopeT = 0;
    for (let i = 0; i < n; i++) {
      const c = components[i]!;
      u[i] = wilson(c, T, lnP);
      const w = line.feed[i]! * Math.exp(sign * u[i]!);
      sum += w;
      slopeT += w * sign * 5.373 * (1 + c.acentricFactor) * (c.criticalTemperature / T);
    }
    const r = Math.log(sum);
    if (!Number.isFinite(r)) return undefined;
    if (held === 'temperature') {
      lnP += sign * r; // K falls as 1/P exactly
      if (Math.abs(r) < 1e-9) break;
    } else {
      const move = Math.max(-0.3, Math.min(0.3, (r * sum) / slopeT));
      lnT -= move;
      if (Math.abs(move) < 1e-9) break;
    }
  }
  u[n] = lnT;
  u[n + 1] = lnP;
  return Number.isFinite(lnT) && Number.isFinite(lnP) ? u : undefined;
}

function meanBoilingPoint(components: readonly Component[], z: ArrayLike<number>): number {
  return components.reduce((sum, c, i) => sum + z[i]! * c.normalBoilingPoint, 0);
}

/** Walks the line upward from low pressure; calls `visit` at each solved point until it answers true or the walk ends. */
export function walkLine(
  line: SaturationLine,
  visit: (u: LinePoint, before: LinePoint | undefined) => boolean,
  startPressure = 1e4,
  longestStep = 0.5,
): 'stopped' | 'ended' | 'no-start' {
  const { n } = line;
  let u: LinePoint | undefined;
  for (let P = startPressure; P > lowestPressure && !u; P /= 100) {
    const guess = wilsonPoint(line.components, line, 'pressure', P);
    if (guess && line.solve(guess, n + 1, Math.log(P)) > 0 && line.isVapourOverLiquid(guess)) u = guess;
  }
  if (!u) return 'no-start';
  if (visit(u, undefined)) return 'stopped';
  let held = n + 1;
  let direction = 1;
  let step = Math.min(0.4, longestStep);
  for (let count = 0; count < 500; count++) {
    const tangent = line.tangent(u, held);
    if (!tangent) return 'ended';
    // Hold whatever moves fastest along the line; that keeps every other unknown a smooth function of it.
    let next = held;
    for (let i = 0; i < n + 2; i++) if (Math.abs(tangent[i]!) > Math.abs(tangent[next]!) * 1.01) next = i;
    if (next !== held) {
      direction *= Math.sign(tangent[next]!);
      const scale = tangent[next]!;
      for (let i = 0; i < n + 2; i++) tangent[i]! /= scale;
      held = next;
    }
    let trial: LinePoint | undefined;
    let iterations = 0;
    while (!trial) {
      const candidate = u.slice();
      for (let i = 0; i < n + 2; i++) candidate[i]! += direction * step * tangent[i]!;
      iterations = line.solve(candidate, held, candidate[held]!, 12, 5);
      // A step onto the trivial solution, or a leap along the line, is taken again in halves.
      if (iterations > 0 && !isTrivial(candidate, n) && distance(candidate, u) < 4 * step + 0.05)
        trial = candidate;
      else if ((step /= 2) < 1e-7) return 'ended';
    }
    if (visit(trial, u)) return 'stopped';
    u = trial;
    if (iterations <= 4) step = Math.min(step * 1.6, longestStep);
    else if (iterations > 7) step /= 2;
    if (u[n + 1]! > Math.log(3e9) || u[n]! < Math.log(20) || u[n + 1]! < Math.log(lowestPressure))
      return 'ended';
  }
  return 'ended';
}

function isTrivial(u: LinePoint, n: number): boolean {
  if (n === 1) return false;
  for (let i = 0; i < n; i++) if (Math.abs(u[i]!) > 1e-7) return false;
  return true;
}

function distance(a: LinePoint, b: LinePoint): number {
  let most = 0;
  for (let i = 0; i < a.length; i++) most = Math.max(most, Math.abs(a[i]! - b[i]!));
  return most;
}

/** Whether the critical point lies between two points of the line: there every ln K changes sign. */
function crossesCritical(u: LinePoint, before: LinePoint, n: number): boolean {
  let widest = 0;
  for (let i = 1; i < n; i++) if (Math.abs(before[i]!) > Math.abs(before[widest]!)) widest = i;
  return n > 1 && Math.sign(u[widest]!) !== Math.sign(before[widest]!);
}

/** A pressure at which the line has not come as far as the target yet [Pa]. */
function startBelow(line: SaturationLine, index: number, target: number): number {
  if (index === line.n + 1) return Math.min(1e4, Math.exp(target) / 2);
  const colder = wilsonPoint(line.components, line, 'temperature', 0.9 * Math.exp(target));
  return colder ? Math.min(1e4, Math.max(Math.exp(colder[line.n + 1]!), 100 * lowestPressure)) : 1e4;
}

function follow(line: SaturationLine, index: number, target: number): LineOutcome {
  const { n } = line;
  let highest = -Infinity;
  let answer: LinePoint | undefined;
  let wentWrong = false;
  const ended = walkLine(
    line,
    (u, before) => {
      highest = Math.max(highest, u[index]!);
      if (!before) return u[index]! > target && (wentWrong = true);
      const meets = (before[index]! - target) * (u[index]! - target) <= 0;
      if (meets) {
        const share = (target - before[index]!) / (u[index]! - before[index]!);
        const point = before.map((value, i) => value + share * (u[i]! - value));
        if (
          line.solve(point, index, target) > 0 &&
          !isTrivial(point, n) &&
          distance(point, u) < distance(before, u) * 2 + 0.02 &&
          !crossesCritical(point, before, n)
        )
          answer = point;
        return true;
      }
      return crossesCritical(u, before, n);
    },
    startBelow(line, index, target),
  );
  if (answer) return { kind: 'solved', point: answer };
  if (wentWrong || ended === 'no-start') return { kind: 'not-converged' };
  return { kind: 'beyond-line', highest: Math.exp(highest) };
}
