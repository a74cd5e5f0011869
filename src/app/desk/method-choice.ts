import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { componentById } from '@shared/vle/components';
import { correlationsOf, type VapourPressureRow } from '@shared/vle/vapour-pressure';
import { Quantities } from '../ui/quantities';
import { methods } from './desk-case';
import { referenceText } from './slate-sources';
import { DeskState } from './desk-state';
import { equationNames, methodNames } from './desk-words';

/** Which method, and for Raoult's law which vapour pressure correlation of each component. */
@Component({
  selector: 'app-method-choice',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <fieldset>
      <legend>Method</legend>
      @for (method of methods; track method) {
        <label>
          <input
            type="radio"
            name="method"
            [value]="method"
            [checked]="state.method() === method"
            (change)="state.change({ method })"
          />
          {{ names[method] }}
        </label>
      }
    </fieldset>
    @if (state.method() === 'ideal') {
      <details>
        <summary>
          Vapour pressure correlations{{ chosen() > 0 ? ', ' + chosen() + ' chosen by hand' : '' }}
        </summary>
        @for (component of components(); track component.id) {
          <label [for]="'correlation-' + component.id">{{ component.name }}</label>
          <select #row [id]="'correlation-' + component.id" (change)="choose(component.id, row.value)">
            @for (option of component.options; track option.id) {
              <option [value]="option.id" [selected]="option.id === component.chosen">
                {{ option.label }}
              </option>
            }
          </select>
        }
      </details>
    }
  `,
  styles: `
    :host {
      display: grid;
      gap: 8px;
    }
    fieldset {
      display: flex;
      flex-wrap: wrap;
      gap: 0 18px;
      margin: 0;
      padding: 0;
      border: 0;
    }
    legend {
      padding: 0;
      font-size: 12px;
      color: var(--soft);
    }
    fieldset label {
      display: inline-flex;
      align-items: center;
      gap: 6px;
      min-height: 30px;
      cursor: pointer;
    }
    input {
      width: 16px;
      height: 16px;
      margin: 0;
      accent-color: var(--inferred);
    }
    summary {
      font-size: 13px;
      color: var(--inferred);
      cursor: pointer;
    }
    details label {
      display: block;
      margin-top: 8px;
      font-size: 12px;
      color: var(--soft);
    }
    select {
      width: 100%;
      padding: 5px 8px;
      border: 1px solid var(--edge);
      border-radius: 6px;
      background: var(--sheet);
      color: var(--ink);
      font: inherit;
      font-size: 13px;
    }
  `,
})
export class MethodChoice {
  protected readonly state = inject(DeskState);
  private readonly quantities = inject(Quantities);

  protected readonly methods = methods;
  protected readonly names = methodNames;
  protected readonly components = computed(() =>
    this.state.rows().map(({ id }) => {
      const rows = correlationsOf(id);
      return {
        id,
        name: componentById(id).name,
        chosen: this.state.correlations()[id] ?? rows[0]?.id,
        options: rows.map((row) => ({ id: row.id, label: `${row.rank}. ${this.described(row)}` })),
      };
    }),
  );
  protected readonly chosen = computed(
    () => this.state.rows().filter(({ id }) => this.state.correlations()[id] !== undefined).length,
  );

  /** The first choice is not kept as a choice by hand: only so may the stand-in above the critical temperature take over. */
  protected choose(id: string, rowId: string): void {
    const { [id]: _, ...others } = this.state.correlations();
    const isFirst = correlationsOf(id)[0]?.id === rowId;
    this.state.change({ correlations: isFirst ? others : { ...others, [id]: rowId } });
  }

  private described(row: VapourPressureRow): string {
    const [low, high] = [row.low, row.high].map((kelvin) => this.quantities.temperature(kelvin, 0));
    const equation = equationNames[row.equation];
    return `${equation}, ${referenceText(row.source)}, ${low} to ${high} ${this.quantities.temperatureUnit()}`;
  }
}
