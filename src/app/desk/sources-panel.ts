import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { references } from '@shared/references';
import { componentById } from '@shared/vle/components';
import { formatNumber, noNumber } from '../ui/numbers';
import { Quantities } from '../ui/quantities';
import { DeskState } from './desk-state';
import { equationNames, methodNames } from './desk-words';
import { correlationsInUse, interactionsInUse, methodSources, referenceText } from './slate-sources';

/** Every figure that the answers rest on, with the publication it is from. */
@Component({
  selector: 'app-sources-panel',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './sources-panel.html',
  styleUrl: './sources-panel.scss',
})
export class SourcesPanel {
  protected readonly state = inject(DeskState);
  protected readonly quantities = inject(Quantities);

  protected readonly method = computed(
    () => `${methodNames[this.state.method()]}: ${methodSources[this.state.method()]}`,
  );
  protected readonly instruments = `${references.iec60751}; ${references.gum}`;
  protected readonly interactionSource = references.knapp1982;
  private readonly ids = computed(() => this.state.rows().map(({ id }) => id));

  protected readonly components = computed(() =>
    this.ids().map((id) => {
      const component = componentById(id);
      const sources = [
        `critical point and ω: ${referenceText(component.criticalSource)}`,
        `boiling point: ${referenceText(component.normalBoilingPointSource)}`,
        ...(component.liquidAt60F ? [`density: ${referenceText(component.liquidAt60F.source)}`] : []),
      ];
      return {
        id,
        name: component.name,
        formula: component.formula,
        cas: component.cas,
        molarMass: formatNumber(component.molarMass, 3),
        critical: this.quantities.temperature(component.criticalTemperature, 2),
        criticalPressure: this.quantities.pressure(component.criticalPressure),
        acentricFactor: component.acentricFactor.toFixed(4),
        boiling: this.quantities.temperature(component.normalBoilingPoint, 2),
        density: component.liquidAt60F
          ? formatNumber((component.liquidAt60F.density * component.molarMass) / 1000, 1)
          : noNumber,
        sources: sources.join('; '),
      };
    }),
  );
  protected readonly correlations = computed(() =>
    this.state.method() === 'ideal'
      ? correlationsInUse(this.ids(), this.state.correlations()).map((row) => ({
          id: row.id,
          name: componentById(row.componentId).name,
          equation: equationNames[row.equation],
          range: `${this.quantities.temperature(row.low, 0)} to ${this.quantities.temperature(row.high, 0)}`,
          coefficients: row.coefficients.join(', '),
          source: `${referenceText(row.source)}, ${row.table}`,
          note: row.note,
        }))
      : [],
  );
  protected readonly interactions = computed(() =>
    this.state.method() === 'peng-robinson'
      ? interactionsInUse(this.ids()).map(({ a, b, kij }) => ({
          pair: `${a.name} with ${b.name}`,
          kij: kij === null ? 'none published, taken as 0' : kij.toFixed(4),
        }))
      : [],
  );
}
