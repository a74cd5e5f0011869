import { sensorParameters, type SensorParameters } from '@shared/api/sensor-parameters';
import type { Role } from '@shared/api/session';

/** The invented site of the demonstration. No such plant, and none of its people, exists. */
export const site = {
  name: 'Skarn Inlet Fractionation',
  timeZone: 'America/Halifax',
  barometricPressure: 101_325,
  demonstration: true,
} as const;

/** Password of every demonstration user. */
export const demoPassword = 'dew-point-at-dawn';

export const users: readonly { readonly username: Role; readonly name: string; readonly role: Role }[] = [
  { username: 'operator', name: 'Operator', role: 'operator' },
  { username: 'engineer', name: 'Engineer', role: 'engineer' },
  { username: 'supervisor', name: 'Supervisor', role: 'supervisor' },
  { username: 'administrator', name: 'Administrator', role: 'administrator' },
];

export const tower = {
  id: 'depropaniser',
  name: 'Depropaniser',
  description: 'Takes ethane and propane off the butanes and pentanes; propane overhead at about 17 bar.',
} as const;

/** Tags the demonstration reads; the historian lists more. */
export const tags = [
  { name: 'dp-overhead-temperature', unit: '°C', quantity: 'temperature' },
  { name: 'dp-overhead-pressure', unit: 'kPa gauge', quantity: 'pressure-gauge' },
  { name: 'dp-differential-pressure', unit: 'kPa', quantity: 'pressure-difference' },
] as const;

/** Raoult's law with published vapour pressures; the offset takes up what it lacks at 17 bar. */
const overheadParameters: SensorParameters = sensorParameters.parse({
  relation: 'dew',
  method: 'ideal',
  base: [
    { id: 'ethane', fraction: 0.02, group: 'light' },
    { id: 'propane', fraction: 0.96, group: 'light' },
    { id: 'isobutane', fraction: 0.012, group: 'heavy' },
    { id: 'n-butane', fraction: 0.008, group: 'heavy' },
    { id: 'isopentane', fraction: 0, group: 'heavy' },
    { id: 'n-pentane', fraction: 0, group: 'heavy' },
  ],
  tags: {
    temperature: 'dp-overhead-temperature',
    pressure: 'dp-overhead-pressure',
    differentialPressure: 'dp-differential-pressure',
  },
  // The tap lies below the thermometer's nozzle.
  pressureCorrection: -4000,
  alignment: { windowMinutes: 10, deadTimeMinutes: 3, residenceMinutes: 12 },
  correction: {
    domain: 'temperature',
    initialOffset: 0,
    initialVariance: 4,
    driftVariancePerHour: 0.0003,
    gate: 3,
  },
  noise: {
    temperature: 0.04,
    pressure: 700,
    laboratoryAbsolute: 0.0001,
    laboratoryRelative: 0.02,
    shapeRelative: 0.1,
  },
  validity: {
    temperature: [305, 340],
    pressure: [1_300_000, 2_100_000],
    temperatureStep: 2,
    pressureStep: 60_000,
    staleMinutes: 5,
    flatMinutes: 30,
    differentialPressureLimit: 32_000,
    sampleAgeHours: 24,
    // Ethane is above its critical temperature there; its two per cent are extrapolated by DIPPR 101.
    acceptedExtrapolations: ['ethane'],
    steadiness: { transientAbove: 12, steadyBelow: 4 },
  },
  limits: { high: 0.025, target: 0.015, temperatureStep: 0.5 },
});

export const sensor = {
  id: 'depropaniser-overhead',
  name: 'C4+ in propane, overhead',
  symbol: 'C4+',
  point: 'overhead',
  parameters: overheadParameters,
} as const;
