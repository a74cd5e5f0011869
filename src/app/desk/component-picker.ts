import {
  ChangeDetectionStrategy,
  Component,
  computed,
  input,
  output,
  signal,
  viewChild,
} from '@angular/core';
import {
  MatAutocomplete,
  MatAutocompleteTrigger,
  MatOption,
  type MatAutocompleteSelectedEvent,
} from '@angular/material/autocomplete';
import { MatButton } from '@angular/material/button';
import { matchingComponents, namedComponent, type NamedComponent } from '../ui/find-component';

/** Picks a component from the library by name, abbreviation or formula. */
@Component({
  selector: 'app-component-picker',
  imports: [MatAutocomplete, MatAutocompleteTrigger, MatButton, MatOption],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <label for="add-component" class="for-ears">Add a component by name, abbreviation or formula</label>
    <input
      id="add-component"
      type="text"
      autocomplete="off"
      placeholder="Add: name, iC4, C4H10"
      [value]="text()"
      [matAutocomplete]="choices"
      [attr.aria-describedby]="fault() ? 'add-component-fault' : null"
      (input)="type(field.value)"
      (keydown.enter)="pickTyped($event)"
      #field
    />
    <button matButton type="button" (click)="pickTyped($event)">Add</button>
    <mat-autocomplete #choices="matAutocomplete" (optionSelected)="pickOption($event)">
      @for (component of offered(); track component.id) {
        <mat-option [value]="component.id">
          {{ component.name }} <span class="soft">{{ component.short }} · {{ component.formula }}</span>
        </mat-option>
      }
    </mat-autocomplete>
    <p id="add-component-fault" aria-live="polite">{{ fault() }}</p>
  `,
  styles: `
    :host {
      display: grid;
      grid-template-columns: minmax(0, 1fr) auto;
      gap: 4px 8px;
      align-items: center;
    }
    input {
      min-width: 0;
      padding: 7px 10px;
      border: 1px solid var(--edge);
      border-radius: 8px;
      background: var(--sheet);
      color: var(--ink);
      font: inherit;
    }
    input::placeholder {
      color: var(--soft);
      opacity: 1;
    }
    p {
      grid-column: 1 / -1;
      font-size: 12px;
      color: var(--urgent);
    }
  `,
})
export class ComponentPicker {
  readonly library = input.required<readonly NamedComponent[]>();
  /** Ids that are in the slate already. */
  readonly taken = input<readonly string[]>([]);
  readonly picked = output<string>();

  private readonly trigger = viewChild.required(MatAutocompleteTrigger);
  protected readonly text = signal('');
  protected readonly fault = signal('');
  protected readonly offered = computed(() =>
    matchingComponents(this.text(), this.library()).filter(({ id }) => !this.taken().includes(id)),
  );

  protected type(text: string): void {
    this.text.set(text);
    this.fault.set('');
  }

  protected pickOption(event: MatAutocompleteSelectedEvent): void {
    this.pick(String(event.option.value));
  }

  /** Enter, or the button: takes what the text names, or the only thing it can mean. */
  protected pickTyped(event: Event): void {
    event.preventDefault();
    // Enter on a marked option is the list's own: it has picked by now.
    if (this.trigger().activeOption || this.text().trim() === '') return;
    const named = namedComponent(this.text(), this.library());
    const [first, second] = this.offered();
    const meant = named ?? (second ? undefined : first);
    if (!meant)
      this.fault.set(`“${this.text().trim()}” names no single component: choose one from the list.`);
    else if (this.taken().includes(meant.id)) this.fault.set(`${meant.name} is in the slate already.`);
    else this.pick(meant.id);
  }

  private pick(id: string): void {
    this.picked.emit(id);
    this.text.set('');
    this.fault.set('');
    this.trigger().closePanel();
  }
}
