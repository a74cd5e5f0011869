import { ChangeDetectionStrategy, Component, computed, input, model, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { mdiClose } from '@mdi/js';
import { Glyph } from '../ui/glyph';
import { formatNumber } from '../ui/numbers';
import { ComponentPicker } from './component-picker';
import {
  amountFault,
  amountTotal,
  bases,
  normalised,
  type AmountBasis,
  type Group,
  type SlateRow,
} from './desk-case';
import { readPastedSlate } from './pasted-slate';
import { grouped, slateFault, withComponent, type SlateComponent } from './slate-edits';

/** The components of a slate, how much there is of each, and which of them are light or heavy. */
@Component({
  selector: 'app-slate-editor',
  imports: [ComponentPicker, Glyph, MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './slate-editor.html',
  styleUrl: './slate-editor.scss',
})
export class SlateEditor {
  readonly rows = model.required<readonly SlateRow[]>();
  readonly basis = model.required<AmountBasis>();
  readonly library = input.required<readonly SlateComponent[]>();

  protected readonly mdiClose = mdiClose;
  protected readonly basisNames: readonly { readonly basis: AmountBasis; readonly label: string }[] = [
    { basis: 'mole', label: 'mol %' },
    { basis: 'mass', label: 'mass %' },
    { basis: 'volume', label: 'liquid volume % at 60 °F' },
  ];
  /** What pasting changed or left out, until the next change. */
  protected readonly remarks = signal<readonly string[]>([]);
  protected readonly shown = computed(() =>
    this.rows().map((row) => {
      const component = this.library().find(({ id }) => id === row.id);
      return {
        ...row,
        name: component?.name ?? row.id,
        short: component?.short ?? '',
        fault: amountFault(row.amount),
      };
    }),
  );
  protected readonly taken = computed(() => this.rows().map(({ id }) => id));
  protected readonly fault = computed(() => slateFault(this.rows()));
  private readonly total = computed(() => amountTotal(this.rows()));
  protected readonly sum = computed(() => formatNumber(this.total(), 2));
  /** Whether the amounts are per cent of a whole as they stand, or are taken by proportion. */
  protected readonly isWhole = computed(() => Math.abs(this.total() - 100) < 0.005);

  protected setBasis(name: string): void {
    const chosen = bases.find((basis) => basis === name);
    if (chosen) this.basis.set(chosen);
  }

  protected setAmount(id: string, amount: string): void {
    this.change(this.rows().map((row) => (row.id === id ? { ...row, amount } : row)));
  }

  protected setGroup(id: string, group: Group): void {
    this.change(this.rows().map((row) => (row.id === id ? { ...row, group } : row)));
  }

  protected add(id: string): void {
    this.change(withComponent(this.rows(), id, this.library()));
  }

  protected remove(id: string): void {
    this.change(this.rows().filter((row) => row.id !== id));
  }

  protected normalise(): void {
    this.change(normalised(this.rows()));
  }

  /** A whole table pasted anywhere in the slate replaces it; a single figure goes into its field as usual. */
  protected paste(event: ClipboardEvent): void {
    const text = event.clipboardData?.getData('text') ?? '';
    if (!/[\t\r\n;]/.test(text.trim())) return;
    event.preventDefault();
    this.take(text);
  }

  protected take(text: string): void {
    const { rows, remarks } = readPastedSlate(text, this.library());
    if (rows.length > 0) this.rows.set(grouped(rows, this.library()));
    this.remarks.set(remarks);
  }

  private change(rows: readonly SlateRow[]): void {
    this.rows.set(rows);
    this.remarks.set([]);
  }
}
