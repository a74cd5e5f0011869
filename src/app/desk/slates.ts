import type { DeskCase, SlateRow } from './desk-case';

/** A slate to begin with; invented, of the kind such towers make. */
export interface PresetSlate {
  readonly id: string;
  readonly name: string;
  readonly case: Omit<DeskCase, 'thermometer' | 'pressureTolerance' | 'pair' | 'answer' | 'correlations'>;
}

type Amounts = readonly (readonly [id: string, amount: string])[];

const rowsOf = (light: Amounts, heavy: Amounts): readonly SlateRow[] => [
  ...light.map(([id, amount]) => ({ id, amount, group: 'light' as const })),
  ...heavy.map(([id, amount]) => ({ id, amount, group: 'heavy' as const })),
];

export const presetSlates: readonly [PresetSlate, ...PresetSlate[]] = [
  {
    id: 'depropaniser-top',
    name: 'Depropaniser overhead: C4+ in propane',
    case: {
      rows: rowsOf(
        [
          ['ethane', '1.2'],
          ['propane', '96.6'],
        ],
        [
          ['isobutane', '1.4'],
          ['n-butane', '0.8'],
        ],
      ),
      basis: 'mole',
      method: 'peng-robinson',
      temperature: 324.35,
      pressure: 1_720_000,
      relation: 'dew',
      target: 0.025,
    },
  },
  {
    id: 'debutaniser-top',
    name: 'Debutaniser overhead: C5+ in butanes',
    case: {
      rows: rowsOf(
        [
          ['propane', '1.5'],
          ['isobutane', '33.4'],
          ['n-butane', '63.9'],
        ],
        [
          ['isopentane', '0.9'],
          ['n-pentane', '0.3'],
        ],
      ),
      basis: 'mole',
      method: 'peng-robinson',
      temperature: 324.35,
      pressure: 560_000,
      relation: 'dew',
      target: 0.012,
    },
  },
  {
    id: 'debutaniser-bottom',
    name: 'Debutaniser bottoms: C4 in gasoline',
    case: {
      rows: rowsOf(
        [
          ['isobutane', '0.3'],
          ['n-butane', '1.7'],
        ],
        [
          ['isopentane', '27'],
          ['n-pentane', '31'],
          ['n-hexane', '25'],
          ['n-heptane', '15'],
        ],
      ),
      basis: 'mole',
      method: 'peng-robinson',
      temperature: 384.05,
      pressure: 600_000,
      relation: 'bubble',
      target: 0.01,
    },
  },
  {
    id: 'deisobutaniser-top',
    name: 'Deisobutaniser overhead: nC4 in isobutane',
    case: {
      rows: rowsOf(
        [
          ['propane', '1.1'],
          ['isobutane', '95.4'],
        ],
        [['n-butane', '3.5']],
      ),
      basis: 'mole',
      method: 'peng-robinson',
      temperature: 323.25,
      pressure: 680_000,
      relation: 'dew',
      target: 0.03,
    },
  },
  {
    id: 'propylene-top',
    name: 'Propylene splitter overhead: propane in propylene',
    case: {
      rows: rowsOf([['propylene', '99.5']], [['propane', '0.5']]),
      basis: 'mole',
      method: 'peng-robinson',
      temperature: 314.45,
      pressure: 1_700_000,
      relation: 'dew',
      target: 0.005,
    },
  },
  {
    id: 'benzene-top',
    name: 'Benzene column overhead: toluene in benzene',
    case: {
      rows: rowsOf(
        [['benzene', '99.3']],
        [
          ['toluene', '0.6'],
          ['ethylbenzene', '0.1'],
        ],
      ),
      basis: 'mass',
      method: 'ideal',
      temperature: 359.25,
      pressure: 120_000,
      relation: 'dew',
      target: 0.005,
    },
  },
];

/** The case a preset begins with. */
export function caseOf(preset: PresetSlate): DeskCase {
  return {
    ...preset.case,
    answer: preset.case.relation === 'dew' ? 'dew-at-pressure' : 'bubble-at-pressure',
    correlations: {},
    pair: null,
    thermometer: 'A',
    pressureTolerance: 1500,
  };
}
