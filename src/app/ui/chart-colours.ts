/** Colours for charts, which draw on a canvas and cannot follow style sheets. */
export interface ChartColours {
  readonly ground: string;
  readonly sheet: string;
  readonly ink: string;
  readonly soft: string;
  readonly line: string;
  readonly edge: string;
  readonly inferred: string;
  /** The inferred colour, thin enough to lie over other things. */
  readonly band: string;
  readonly laboratory: string;
  readonly limit: string;
  readonly attention: string;
  readonly urgent: string;
}

/** The same values as `src/theme/_colours.scss`, which a test compares. */
export const chartColourTable: Readonly<Record<'day' | 'night', ChartColours>> = {
  day: {
    ground: '#f4f3ef',
    sheet: '#ffffff',
    ink: '#1b2a2f',
    soft: '#4c5d63',
    line: '#d9d8d0',
    edge: '#788587',
    inferred: '#0b6e75',
    band: 'rgba(11, 110, 117, 0.16)',
    laboratory: '#7a2e6b',
    limit: '#8a4b1f',
    attention: '#855800',
    urgent: '#b3261e',
  },
  night: {
    ground: '#14191c',
    sheet: '#1c2327',
    ink: '#e4eaea',
    soft: '#a3b3b7',
    line: '#303a3f',
    edge: '#718187',
    inferred: '#5cc2c8',
    band: 'rgba(92, 194, 200, 0.22)',
    laboratory: '#d79bcb',
    limit: '#e0a679',
    attention: '#e6b84c',
    urgent: '#ff8a80',
  },
};

/** The colours of the theme in force: `computed(() => chartColours(preferences.isNight()))`. */
export function chartColours(isNight: boolean): ChartColours {
  return chartColourTable[isNight ? 'night' : 'day'];
}

/** Fonts for charts, the same as in the style sheet. */
export const chartFonts = {
  text: "Roboto, 'Helvetica Neue', Arial, sans-serif",
  numbers: "'Roboto Mono', 'DejaVu Sans Mono', monospace",
} as const;
