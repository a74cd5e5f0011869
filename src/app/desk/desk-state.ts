import { Injectable, computed, signal } from '@angular/core';
import { createInference } from '@shared/inference/inference';
import { bubblePoint, dewPoint, flash, type EquilibriumResult } from '@shared/vle/equilibrium';
import {
  distinctWarnings,
  inferredProduct,
  mixtureAt,
  phaseLines,
  saturationPoint,
  andThen,
  type Outcome,
} from './desk-answer';
import { impurityOf, type Answer, type DeskCase } from './desk-case';
import type { DeskResults } from './desk-table';
import { pressureSpan, spanFor, temperatureSpan } from './desk-units';
import { lastGood } from './last-good';
import { groupFault } from './slate-edits';
import { mixtureOf } from './slate-mixture';
import { provenanceWords } from './slate-sources';
import { caseOf, presetSlates } from './slates';

/** Fields in which something stands that is no value yet. */
type Unfinished = ReadonlySet<keyof DeskCase>;

/**
 * The desk's case and everything that follows from it. Each answer depends on no more than it needs, so that moving the
 * temperature works out anew only what the temperature decides.
 */
@Injectable()
export class DeskState {
  private readonly current = signal<DeskCase>(caseOf(presetSlates[0]));
  readonly case = this.current.asReadonly();
  private readonly unfinished = signal<Unfinished>(new Set());
  /** Whether a field holds something that is no value yet: what is shown belongs to the last that was one. */
  readonly isUnfinished = computed(() => this.unfinished().size > 0);

  readonly rows = computed(() => this.current().rows);
  readonly basis = computed(() => this.current().basis);
  readonly method = computed(() => this.current().method);
  readonly correlations = computed(() => this.current().correlations);
  readonly temperature = computed(() => this.current().temperature);
  readonly pressure = computed(() => this.current().pressure);
  readonly relation = computed(() => this.current().relation);
  readonly target = computed(() => this.current().target);
  readonly answer = computed(() => this.current().answer);
  private readonly thermometer = computed(() => this.current().thermometer);
  private readonly pressureTolerance = computed(() => this.current().pressureTolerance);
  readonly instruments = computed(() => ({
    thermometer: this.thermometer(),
    pressureTolerance: this.pressureTolerance(),
  }));

  readonly temperatureSpan = signal(temperatureSpan(this.current().temperature));
  readonly pressureSpan = signal(pressureSpan(this.current().pressure));

  readonly mixture = computed(() =>
    mixtureOf({
      rows: this.rows(),
      basis: this.basis(),
      method: this.method(),
      correlations: this.correlations(),
    }),
  );

  private readonly bubbleAtPressureNow = computed(() => {
    const pressure = this.pressure();
    return andThen(this.mixture(), (mixture) => bubblePoint(mixture, { pressure }));
  });
  private readonly dewAtPressureNow = computed(() => {
    const pressure = this.pressure();
    return andThen(this.mixture(), (mixture) => dewPoint(mixture, { pressure }));
  });
  private readonly bubbleAtTemperatureNow = computed(() => {
    const temperature = this.temperature();
    return andThen(this.mixture(), (mixture) => bubblePoint(mixture, { temperature }));
  });
  private readonly dewAtTemperatureNow = computed(() => {
    const temperature = this.temperature();
    return andThen(this.mixture(), (mixture) => dewPoint(mixture, { temperature }));
  });
  private readonly flashNow = computed(() => {
    const at = { temperature: this.temperature(), pressure: this.pressure() };
    return andThen(this.mixture(), (mixture) => flash(mixture, at));
  });

  readonly bubbleAtPressure = lastGood(this.bubbleAtPressureNow);
  readonly dewAtPressure = lastGood(this.dewAtPressureNow);
  readonly bubbleAtTemperature = lastGood(this.bubbleAtTemperatureNow);
  readonly dewAtTemperature = lastGood(this.dewAtTemperatureNow);
  readonly flash = lastGood(this.flashNow);

  /** The state looked at: its result, and the table of phases. */
  readonly phases = lastGood(
    computed(() => {
      const mixture = this.mixture();
      if (mixture.kind === 'refused') return mixture;
      return andThen(this.outcomeOf(this.answer()), (result) => ({
        result,
        lines: phaseLines(mixture.value, result),
      }));
    }),
  );

  readonly inference = computed(() => {
    const relation = this.relation();
    const rows = this.rows();
    const fault = groupFault(rows);
    const mixture = this.mixture();
    if (mixture.kind === 'answered' && fault !== undefined) return { kind: 'refused', words: fault } as const;
    return andThen(mixture, ({ method, correlations, components }) =>
      createInference({
        relation,
        method,
        correlations,
        base: components.map((part, i) => ({ ...part, group: rows[i]?.group ?? 'light' })),
      }),
    );
  });
  private readonly productNow = computed(() => {
    const [temperature, pressure, instruments] = [this.temperature(), this.pressure(), this.instruments()];
    return andThen(this.inference(), (inference) =>
      inferredProduct(inference, temperature, pressure, instruments),
    );
  });
  /** What temperature and pressure say of the product. */
  readonly product = lastGood(this.productNow);

  private readonly targetMixture = computed(() => {
    const target = this.target();
    return andThen(this.inference(), (inference) => mixtureAt(inference, target));
  });
  readonly targetAtPressure = lastGood(
    computed(() => {
      const [relation, pressure] = [this.relation(), this.pressure()];
      return andThen(this.targetMixture(), (mixture) => saturationPoint(relation, mixture, { pressure }));
    }),
  );
  readonly targetAtTemperature = lastGood(
    computed(() => {
      const [relation, temperature] = [this.relation(), this.temperature()];
      return andThen(this.targetMixture(), (mixture) => saturationPoint(relation, mixture, { temperature }));
    }),
  );

  readonly warnings = computed(() =>
    distinctWarnings([
      this.bubbleAtPressureNow(),
      this.dewAtPressureNow(),
      this.bubbleAtTemperatureNow(),
      this.dewAtTemperatureNow(),
      this.flashNow(),
      this.productNow(),
    ]),
  );

  /** Method and sources of every answer, in words. */
  readonly provenance = computed(() =>
    provenanceWords(
      this.method(),
      this.rows().map(({ id }) => id),
      this.correlations(),
    ),
  );

  /** All of it as it stands, for the table to copy. */
  readonly results = computed((): DeskResults => ({
    case: this.case(),
    bubbleAtPressure: this.bubbleAtPressure(),
    dewAtPressure: this.dewAtPressure(),
    bubbleAtTemperature: this.bubbleAtTemperature(),
    dewAtTemperature: this.dewAtTemperature(),
    flash: this.flash(),
    phases: this.phases(),
    product: this.product(),
    targetAtPressure: this.targetAtPressure(),
    targetAtTemperature: this.targetAtTemperature(),
    provenance: this.provenance(),
    warnings: this.warnings(),
  }));

  /** The two components that the T–x–y plot is of: those chosen, else the two of which there is most. */
  readonly pair = computed((): readonly [string, string] | null => {
    const rows = this.rows();
    const chosen = this.current().pair;
    const isThere = (id: string) => rows.some((row) => row.id === id);
    if (chosen?.every(isThere)) return chosen;
    const mixture = this.mixture();
    if (mixture.kind === 'refused') return null;
    const [first, second] = [...mixture.value.components].sort((a, b) => b.fraction - a.fraction);
    return first && second ? [first.id, second.id] : null;
  });

  /** Changes some of the case. */
  change(change: Partial<DeskCase>): void {
    this.current.update((before) => ({ ...before, ...change }));
    this.setUnfinished(Object.keys(change) as (keyof DeskCase)[], false);
  }

  /** Puts the desk onto another case, its sliders around the new state. */
  open(opened: DeskCase): void {
    this.current.set(opened);
    this.unfinished.set(new Set());
    this.temperatureSpan.set(temperatureSpan(opened.temperature));
    this.pressureSpan.set(pressureSpan(opened.pressure));
  }

  /** Takes what a field gives: a value, or null while what stands there is none. */
  edit(field: 'temperature' | 'pressure' | 'pressureTolerance', value: number | null): void {
    if (value === null) this.setUnfinished([field], true);
    else this.change({ [field]: value });
  }

  /** Puts the sliders around their values anew where these have come near an end. */
  settle(): void {
    this.temperatureSpan.update((span) => spanFor(this.temperature(), span, temperatureSpan));
    this.pressureSpan.update((span) => spanFor(this.pressure(), span, pressureSpan));
  }

  /** The sum of the relation's own group as the slate stands [mol/mol]. */
  readonly slateGroupFraction = computed(() => {
    const mixture = this.mixture();
    if (mixture.kind === 'refused') return null;
    const group = impurityOf(this.relation());
    return mixture.value.components.reduce(
      (sum, { fraction }, i) => sum + (this.rows()[i]?.group === group ? fraction : 0),
      0,
    );
  });

  private outcomeOf(answer: Answer): Outcome<EquilibriumResult> {
    switch (answer) {
      case 'flash':
        return this.flashNow();
      case 'bubble-at-pressure':
        return this.bubbleAtPressureNow();
      case 'dew-at-pressure':
        return this.dewAtPressureNow();
      case 'bubble-at-temperature':
        return this.bubbleAtTemperatureNow();
      case 'dew-at-temperature':
        return this.dewAtTemperatureNow();
    }
  }

  private setUnfinished(fields: readonly (keyof DeskCase)[], isUnfinished: boolean): void {
    this.unfinished.update((before) => {
      if (fields.every((field) => before.has(field) === isUnfinished)) return before;
      const after = new Set(before);
      for (const field of fields)
        if (isUnfinished) after.add(field);
        else after.delete(field);
      return after;
    });
  }
}
