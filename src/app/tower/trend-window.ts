/** The stretches a trend can show, shortest first. */
export const trendSpans = [
  { label: '8 h', ms: 8 * 3_600_000 },
  { label: '24 h', ms: 24 * 3_600_000 },
  { label: '7 d', ms: 7 * 24 * 3_600_000 },
  { label: '30 d', ms: 30 * 24 * 3_600_000 },
] as const;

/** What is looked at: the newest stretch, which moves with the clock, or one that stands still. */
export type TrendWindow =
  | { readonly kind: 'live'; readonly span: number }
  | { readonly kind: 'past'; readonly from: number; readonly to: number };

const shortest = 10 * 60_000;
const longest = 370 * 24 * 3_600_000;

/** Ends of the window [UTC ms]; a live one ends a little after now, so that the newest point is not at the very edge. */
export function endsOf(window: TrendWindow, now: number): { from: number; to: number } {
  if (window.kind === 'past') return { from: window.from, to: window.to };
  return { from: now - window.span, to: now + window.span * 0.02 };
}

/** Makes the window shorter (factor below 1) or longer; a live window stays at now. */
export function zoomed(window: TrendWindow, factor: number, now: number): TrendWindow {
  if (window.kind === 'live') return { kind: 'live', span: clamp(window.span * factor) };
  const middle = (window.from + window.to) / 2;
  const half = clamp((window.to - window.from) * factor) / 2;
  return settled({ kind: 'past', from: Math.round(middle - half), to: Math.round(middle + half) }, now);
}

/** Moves by a share of its length, back (negative) or forward; forward past now it is live again. */
export function moved(window: TrendWindow, share: number, now: number): TrendWindow {
  const { from, to } = window.kind === 'past' ? window : { from: now - window.span, to: now };
  const by = Math.round((to - from) * share);
  return settled({ kind: 'past', from: from + by, to: to + by }, now);
}

/** What a wheel or a drag came to rest on: live again where it reaches now. @param now [UTC ms] */
export function lookedAt({ from, to }: { from: number; to: number }, now: number): TrendWindow {
  const span = clamp(to - from);
  return to >= now
    ? { kind: 'live', span: clamp(now - from) }
    : { kind: 'past', from: Math.round(to - span), to };
}

function settled(window: TrendWindow & { kind: 'past' }, now: number): TrendWindow {
  return window.to >= now ? { kind: 'live', span: window.to - window.from } : window;
}

function clamp(span: number): number {
  return Math.min(longest, Math.max(shortest, span));
}
