/** Figures printed by others; typed over from stored copies, none of the books was seen. */

/** Normal boiling points at 101325 Pa [K]. */
export const boilingPoints: readonly {
  readonly id: string;
  readonly printed: number;
  readonly source: string;
}[] = [
  { id: 'methane', printed: 111.67, source: 'kidnay2006' },
  { id: 'ethane', printed: 184.55, source: 'kidnay2006' },
  { id: 'propane', printed: 231.08, source: 'kidnay2006' },
  { id: 'isobutane', printed: 261.53, source: 'kidnay2006' },
  { id: 'n-butane', printed: 272.64, source: 'kidnay2006' },
  { id: 'isopentane', printed: 300.99, source: 'kidnay2006' },
  { id: 'n-pentane', printed: 309.25, source: 'kidnay2006' },
  { id: 'methane', printed: 111.65, source: 'crc2014' },
  { id: 'ethane', printed: 184.55, source: 'crc2014' },
  { id: 'ethylene', printed: 169.35, source: 'crc2014' },
  { id: 'propane', printed: 231.04, source: 'crc2014' },
  { id: 'propylene', printed: 225.55, source: 'crc2014' },
  { id: 'isobutane', printed: 261.45, source: 'crc2014' },
  { id: 'n-butane', printed: 272.65, source: 'crc2014' },
  { id: 'isobutylene', printed: 266.15, source: 'crc2014' },
  { id: '1-butene', printed: 266.85, source: 'crc2014' },
  { id: 'trans-2-butene', printed: 274.03, source: 'crc2014' },
  { id: 'cis-2-butene', printed: 276.87, source: 'crc2014' },
  { id: '1-3-butadiene', printed: 268.55, source: 'crc2014' },
  { id: 'isopentane', printed: 300.98, source: 'crc2014' },
  { id: 'n-pentane', printed: 309.21, source: 'crc2014' },
  { id: 'neopentane', printed: 282.65, source: 'crc2014' },
  { id: '1-pentene', printed: 303.15, source: 'crc2014' },
  { id: '2-methylpentane', printed: 333.36, source: 'crc2014' },
  { id: 'n-hexane', printed: 341.87, source: 'crc2014' },
  { id: 'cyclohexane', printed: 353.85, source: 'crc2014' },
  { id: 'methylcyclopentane', printed: 344.95, source: 'crc2014' },
  { id: 'benzene', printed: 353.23, source: 'crc2014' },
  { id: 'n-heptane', printed: 371.53, source: 'crc2014' },
  { id: 'toluene', printed: 383.75, source: 'crc2014' },
  { id: 'n-octane', printed: 398.77, source: 'crc2014' },
  { id: 'ethylbenzene', printed: 409.35, source: 'crc2014' },
  { id: 'o-xylene', printed: 417.55, source: 'crc2014' },
  { id: 'm-xylene', printed: 412.25, source: 'crc2014' },
  { id: 'p-xylene', printed: 411.45, source: 'crc2014' },
  { id: 'cumene', printed: 425.55, source: 'crc2014' },
  { id: 'methanol', printed: 337.65, source: 'crc2014' },
  { id: 'ethanol', printed: 351.39, source: 'crc2014' },
];

/** Vapour pressures [psia] at [K]; those of the GPSA table are from memory. */
export const vapourPressures: readonly {
  readonly id: string;
  readonly temperature: number;
  readonly printed: number;
  readonly source: string;
}[] = [
  {
    id: 'propane',
    temperature: 310.92777777777775,
    printed: 188.64,
    source: 'GPSA Engineering Data Book, Figure 23-2 (from memory)',
  },
  {
    id: 'isobutane',
    temperature: 310.92777777777775,
    printed: 72.581,
    source: 'GPSA Engineering Data Book, Figure 23-2 (from memory)',
  },
  {
    id: 'n-butane',
    temperature: 310.92777777777775,
    printed: 51.706,
    source: 'GPSA Engineering Data Book, Figure 23-2 (from memory)',
  },
  {
    id: 'isopentane',
    temperature: 310.92777777777775,
    printed: 20.445,
    source: 'GPSA Engineering Data Book, Figure 23-2 (from memory)',
  },
  {
    id: 'n-pentane',
    temperature: 310.92777777777775,
    printed: 15.574,
    source: 'GPSA Engineering Data Book, Figure 23-2 (from memory)',
  },
  {
    id: 'n-hexane',
    temperature: 310.92777777777775,
    printed: 4.9597,
    source: 'GPSA Engineering Data Book, Figure 23-2 (from memory)',
  },
  {
    id: 'n-heptane',
    temperature: 310.92777777777775,
    printed: 1.6201,
    source: 'GPSA Engineering Data Book, Figure 23-2 (from memory)',
  },
  {
    id: 'n-octane',
    temperature: 310.92777777777775,
    printed: 0.53694,
    source: 'GPSA Engineering Data Book, Figure 23-2 (from memory)',
  },
  {
    id: 'cyclohexane',
    temperature: 310.92777777777775,
    printed: 3.2661,
    source: 'GPSA Engineering Data Book, Figure 23-2 (from memory)',
  },
  {
    id: 'benzene',
    temperature: 310.92777777777775,
    printed: 3.225,
    source: 'GPSA Engineering Data Book, Figure 23-2 (from memory)',
  },
  {
    id: 'toluene',
    temperature: 310.92777777777775,
    printed: 1.0321,
    source: 'GPSA Engineering Data Book, Figure 23-2 (from memory)',
  },
  {
    id: 'n-butane',
    temperature: 279.15,
    printed: 18.727,
    source: 'NIST Chemistry WebBook, thermophysical properties of fluid systems',
  },
  {
    id: 'n-butane',
    temperature: 323.15,
    printed: 71.976,
    source: 'NIST Chemistry WebBook, thermophysical properties of fluid systems',
  },
];

/** Vapour fractions of feeds at known K-values, worked in textbooks. */
export const splits: readonly {
  readonly z: readonly number[];
  readonly K: readonly number[];
  readonly printed: number;
  readonly halfDigit: number;
  readonly source: string;
}[] = [
  {
    z: [0.45, 0.35, 0.2],
    K: [195.75 / 110, 97.84 / 110, 50.32 / 110],
    printed: 0.7364,
    halfDigit: 1.5e-4,
    source:
      'Smith, Van Ness and Abbott, 7th ed. 2005, Example 10.5 (from memory; its vapour pressures are rounded, which moves the last digit)',
  },
  {
    z: [0.1, 0.2, 0.3, 0.4],
    K: [4.2, 1.75, 0.74, 0.34],
    printed: 0.1219,
    halfDigit: 0.5e-4,
    source: 'Seader and Henley, Separation Process Principles, Example 4.1 (from memory)',
  },
  {
    z: [0.1, 0.3, 0.4, 0.2],
    K: [5, 2, 0.8, 0.07],
    printed: 0.3822,
    halfDigit: 0.5e-4,
    source: 'Finlayson, Introduction to Chemical Engineering Computing, chapter 3',
  },
  {
    z: [0.1, 0.2, 0.7],
    K: [10, 1.76, 0.52],
    printed: 0.273,
    halfDigit: 0.5e-3,
    source: 'Smith, Van Ness and Abbott, 7th ed. 2005, Example 10.6 (from memory)',
  },
];
