import { ChangeDetectionStrategy, Component, inject } from '@angular/core';
import { fractionUnits, pressureUnits, temperatureUnits } from '@shared/units';
import { Preferences, type PreferenceValues } from '../core/preferences';

interface Choice {
  readonly key: keyof PreferenceValues;
  readonly legend: string;
  readonly options: readonly { readonly value: string; readonly label: string }[];
}

const asLabelled = (...values: string[]) => values.map((value) => ({ value, label: value }));

/** Units and colours, as this person likes them on this device. */
@Component({
  selector: 'app-display-menu',
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    @for (choice of choices; track choice.key) {
      <fieldset>
        <legend>{{ choice.legend }}</legend>
        @for (option of choice.options; track option.value) {
          <label>
            <input
              type="radio"
              [name]="choice.key"
              [value]="option.value"
              [checked]="isChosen(choice, option.value)"
              (change)="choose(choice, option.value)"
            />
            {{ option.label }}
          </label>
        }
      </fieldset>
    }
    <p class="soft">Kept on this device.</p>
  `,
  styles: `
    :host {
      display: grid;
      gap: 12px;
      min-width: 216px;
    }
    fieldset {
      display: flex;
      flex-wrap: wrap;
      gap: 0 14px;
      margin: 0;
      padding: 0;
      border: 0;
    }
    legend {
      padding: 0;
      font-size: 12px;
      color: var(--soft);
    }
    label {
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
    p {
      font-size: 12px;
    }
  `,
})
export class DisplayMenu {
  private readonly preferences = inject(Preferences);

  protected readonly choices: readonly Choice[] = [
    { key: 'temperature', legend: 'Temperature', options: asLabelled(...temperatureUnits) },
    { key: 'pressure', legend: 'Pressure', options: asLabelled(...pressureUnits) },
    {
      key: 'pressureReference',
      legend: 'Pressure counts from',
      options: [
        { value: 'gauge', label: 'the air (gauge)' },
        { value: 'absolute', label: 'zero (absolute)' },
      ],
    },
    { key: 'fraction', legend: 'Composition', options: asLabelled(...fractionUnits) },
    {
      key: 'theme',
      legend: 'Colours',
      options: [
        { value: 'day', label: 'day' },
        { value: 'night', label: 'night' },
        { value: 'system', label: 'as the computer' },
      ],
    },
  ];

  protected isChosen(choice: Choice, value: string): boolean {
    return choice.key === 'theme'
      ? this.preferences.theme() === value
      : this.preferences.units()[choice.key] === value;
  }

  protected choose(choice: Choice, value: string): void {
    this.preferences.choose({ [choice.key]: value });
  }
}
