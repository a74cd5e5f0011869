import type { EquilibriumResult, SaturationResult } from '@shared/vle/equilibrium';
import type { EquilibriumWarning } from '@shared/vle/errors';
import { componentById } from '@shared/vle/components';
import type { InferredProduct, PhaseLine } from './desk-answer';
import type { DeskCase } from './desk-case';
import { answerNames, productNames } from './desk-words';
import { coverage } from './inferred-plot';
import type { Shown } from './last-good';
import type { ShownUnits } from './plot-frame';
import type { Cell, Table } from './table-text';

/** All that a copied or downloaded table holds. */
export interface DeskResults {
  readonly case: DeskCase;
  readonly bubbleAtPressure: Shown<SaturationResult>;
  readonly dewAtPressure: Shown<SaturationResult>;
  readonly bubbleAtTemperature: Shown<SaturationResult>;
  readonly dewAtTemperature: Shown<SaturationResult>;
  readonly flash: Shown<EquilibriumResult>;
  readonly phases: Shown<{ readonly result: EquilibriumResult; readonly lines: readonly PhaseLine[] }>;
  readonly product: Shown<InferredProduct>;
  readonly targetAtPressure: Shown<SaturationResult>;
  readonly targetAtTemperature: Shown<SaturationResult>;
  readonly provenance: string;
  readonly warnings: readonly EquilibriumWarning[];
}

/** The desk's figures as a table: a line each for what was given and found, then the phases component by component. */
export function deskTable(results: DeskResults, shown: ShownUnits): Table {
  const { temperature, pressure, relation, target } = results.case;
  const temperatureOf = (at: Shown<SaturationResult>) =>
    at.value && !at.isOld ? rounded(shown.temperature(at.value.temperature)) : at.words;
  const pressureOf = (at: Shown<SaturationResult>) =>
    at.value && !at.isOld ? rounded(shown.pressure(at.value.pressure)) : at.words;
  const { flash, product, phases } = results;
  const fraction = (value: number) => rounded(shown.fraction(value));
  const T = shown.temperatureUnit;
  const P = shown.pressureUnit;
  return [
    ['Equilibrium desk', 'calculated; certifies nothing'],
    ['Method and sources', results.provenance],
    ...results.warnings.map(({ message }): Cell[] => ['Warning', message]),
    [],
    ['Temperature', rounded(shown.temperature(temperature)), T],
    ['Pressure', rounded(shown.pressure(pressure)), P],
    ['Bubble point at this pressure', temperatureOf(results.bubbleAtPressure), T],
    ['Dew point at this pressure', temperatureOf(results.dewAtPressure), T],
    ['Bubble point at this temperature', pressureOf(results.bubbleAtTemperature), P],
    ['Dew point at this temperature', pressureOf(results.dewAtTemperature), P],
    [
      'Share vaporised at both',
      flash.value && !flash.isOld ? rounded(100 * flash.value.vapourFraction) : flash.words,
      'mol %',
    ],
    [
      `Inferred: ${productNames[relation]}`,
      product.value && !product.isOld ? fraction(product.value.groupFraction) : product.words,
      shown.fractionUnit,
    ],
    ...(product.value && !product.isOld
      ? [['± by the instruments, 95 %', fraction(coverage * product.value.uncertainty), shown.fractionUnit]]
      : []),
    ['Target', fraction(target), shown.fractionUnit],
    ['Target is met at this pressure at', temperatureOf(results.targetAtPressure), T],
    ['Target is met at this temperature at', pressureOf(results.targetAtTemperature), P],
    [],
    [`Phases ${answerNames[results.case.answer]}`],
    ...phaseTable(phases, shown),
  ];
}

function phaseTable({ value, isOld, words }: DeskResults['phases'], shown: ShownUnits): Table {
  if (!value || isOld) return [[words]];
  const percent = (fraction: number | null) => (fraction === null ? null : rounded(shown.fraction(fraction)));
  const unit = shown.fractionUnit;
  return [
    ['Temperature', rounded(shown.temperature(value.result.temperature)), shown.temperatureUnit],
    ['Pressure', rounded(shown.pressure(value.result.pressure)), shown.pressureUnit],
    [
      'Component',
      'Short',
      `Feed, ${unit}`,
      `Liquid x, ${unit}`,
      `Vapour y, ${unit}`,
      'K = y/x',
      'Partial pressure, Pa abs',
    ],
    ...value.lines.map((line): Cell[] => {
      const { name, short } = componentById(line.id);
      return [
        name,
        short,
        percent(line.feed),
        percent(line.liquid),
        percent(line.vapour),
        line.kValue === null ? null : rounded(line.kValue),
        line.partialPressure === null ? null : rounded(line.partialPressure),
      ];
    }),
  ];
}

/** Nine digits: more than anybody measures, without the noise of the last bits. */
function rounded(value: number): number {
  return Number(value.toPrecision(9));
}
