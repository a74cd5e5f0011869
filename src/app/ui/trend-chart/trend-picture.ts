import type { Trend } from '@shared/api/sensors';

/** Everything one picture of a trend shows, canonical: mole fractions, K, Pa absolute, UTC milliseconds. */
export interface TrendPicture {
  readonly trend: Trend;
  readonly symbol: string;
  readonly limits: {
    readonly high: number | null;
    readonly low: number | null;
    readonly target: number | null;
  };
  /** Ends of the time axis [UTC ms]. */
  readonly from: number;
  readonly to: number;
  /** How far the axis may be dragged to the right [UTC ms]: there is nothing to see after now. */
  readonly latest: number;
  readonly isNarrow: boolean;
  /** Whether a drag moves the picture. On a touch screen it must scroll the page instead. */
  readonly canDrag: boolean;
}

/** How the trend writes what it shows: canonical in, the person's units and the plant's time out. */
export interface TrendWords {
  readonly fraction: (moleFraction: number) => number;
  readonly fractionUnit: string;
  readonly temperature: (kelvin: number) => number;
  readonly temperatureUnit: string;
  readonly pressure: (pascal: number) => number;
  readonly pressureUnit: string;
  readonly offset: (inDomain: number) => number;
  readonly offsetUnit: string;
  /** The plant's wall clock minus UTC at a moment [ms]: ticks fall on the plant's hours and midnights. */
  readonly zoneOffset: (t: number) => number;
  /** `14:07`, and `2 Dec` where a day begins. */
  readonly axisTime: (t: number) => string;
  /** `2 Dec, 14:07 AST`. */
  readonly fullTime: (t: number) => string;
  /** Figures as the tooltip and the labels write them, without their unit. */
  readonly fractionText: (moleFraction: number) => string;
  readonly temperatureText: (kelvin: number) => string;
  readonly pressureText: (pascal: number) => string;
  readonly offsetText: (inDomain: number) => string;
}

/** Height of each lane and where it begins [px]; `height` is that of the whole picture. */
export const lanes = {
  composition: { top: 30, height: 216 },
  temperature: { top: 282, height: 64 },
  pressure: { top: 382, height: 64 },
  offset: { top: 482, height: 46 },
  height: 560,
} as const;
