/** What the simulation knows of a component. */
export interface SimulatedComponent {
  readonly id: string;
  /** Critical temperature [K], critical pressure [Pa] and acentric factor. */
  readonly tcK: number;
  readonly pcPa: number;
  readonly omega: number;
  /** Molar mass [g/mol]. */
  readonly molarMass: number;
  /** Volume of the liquid [m³/mol], saturated at 15.6 °C and taken as constant: it only enters the Poynting factor. */
  readonly liquidVolume: number;
  /** Heat of vaporisation near the conditions it boils at here [J/mol]. */
  readonly latentHeat: number;
  /** Deliberate factor on the vapour pressure: the simulated plant is not the textbook. */
  readonly vapourPressureFactor: number;
}

/**
 * Critical constants: NIST REFPROP values as listed by Huber et al., Ind. Eng. Chem. Res. 61 (2022) 15449. Liquid volumes
 * from the DIPPR 105 coefficients of Perry's Chemical Engineers' Handbook, 8th ed. 2007. Heats of vaporisation: from
 * memory, rounded. The factors on vapour pressure are invented.
 */
export const simulatedComponents = {
  ethane: {
    id: 'ethane',
    tcK: 305.322,
    pcPa: 4_872_200,
    omega: 0.0995,
    molarMass: 30.06904,
    liquidVolume: 1 / 11_807.2,
    latentHeat: 9_000,
    vapourPressureFactor: 1.01,
  },
  propane: {
    id: 'propane',
    tcK: 369.89,
    pcPa: 4_251_200,
    omega: 0.1521,
    molarMass: 44.09562,
    liquidVolume: 1 / 11_469.8,
    latentHeat: 12_800,
    vapourPressureFactor: 0.995,
  },
  isobutane: {
    id: 'isobutane',
    tcK: 407.81,
    pcPa: 3_629_000,
    omega: 0.184,
    molarMass: 58.1222,
    liquidVolume: 1 / 9_690.7,
    latentHeat: 14_800,
    vapourPressureFactor: 1.008,
  },
  'n-butane': {
    id: 'n-butane',
    tcK: 425.125,
    pcPa: 3_796_000,
    omega: 0.201,
    molarMass: 58.1222,
    liquidVolume: 1 / 10_053.2,
    latentHeat: 16_200,
    vapourPressureFactor: 0.994,
  },
  isopentane: {
    id: 'isopentane',
    tcK: 460.35,
    pcPa: 3_378_000,
    omega: 0.2274,
    molarMass: 72.14878,
    liquidVolume: 1 / 8_675.8,
    latentHeat: 19_000,
    vapourPressureFactor: 1.006,
  },
  'n-pentane': {
    id: 'n-pentane',
    tcK: 469.7,
    pcPa: 3_367_500,
    omega: 0.251,
    molarMass: 72.14878,
    liquidVolume: 1 / 8_747.3,
    latentHeat: 20_000,
    vapourPressureFactor: 0.993,
  },
} as const satisfies Record<string, SimulatedComponent>;

export type SimulatedComponentId = keyof typeof simulatedComponents;

/**
 * Liquid-phase interaction A of a pair in the two-suffix Margules equation, ln γ∞ = A [-], constant over temperature.
 * Invented, of the size and sign regular-solution theory gives paraffins of different length; zero where none is named.
 */
export const liquidInteractions: readonly (readonly [SimulatedComponentId, SimulatedComponentId, number])[] =
  [
    ['ethane', 'propane', 0.015],
    ['ethane', 'isobutane', 0.04],
    ['ethane', 'n-butane', 0.06],
    ['ethane', 'isopentane', 0.1],
    ['ethane', 'n-pentane', 0.12],
    ['propane', 'isobutane', 0.015],
    ['propane', 'n-butane', 0.03],
    ['propane', 'isopentane', 0.05],
    ['propane', 'n-pentane', 0.065],
    ['isobutane', 'n-butane', 0.005],
    ['isobutane', 'n-pentane', 0.015],
    ['n-butane', 'n-pentane', 0.01],
  ];

/** Deliberate reduction of the geometric mean of critical temperatures in vapour cross coefficients [-], per carbon of difference. */
export const vapourInteractionPerCarbon = 0.006;
