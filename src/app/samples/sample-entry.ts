import { HttpClient } from '@angular/common/http';
import {
  ChangeDetectionStrategy,
  Component,
  ElementRef,
  Injector,
  afterNextRender,
  computed,
  inject,
  input,
  linkedSignal,
  output,
  signal,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { MatFormField, MatLabel, MatSuffix } from '@angular/material/form-field';
import { MatInput } from '@angular/material/input';
import { MatSelect, MatOption } from '@angular/material/select';
import { firstValueFrom } from 'rxjs';
import { sampleOutcome, samplesPath, type NewSample, type SampleOutcome } from '@shared/api/samples';
import type { SensorDetail, Tower } from '@shared/api/sensors';
import { checkSample } from '@shared/correction/check-sample';
import { components, componentById } from '@shared/vle/components';
import { describeFailure } from '../core/api-error';
import { Clock } from '../core/clock';
import { PlantMoment } from '../ui/plant-moment';
import { pastedFigures, typedFractions, type TypedFraction } from './sample-draft';

/** Where a sample may be drawn, with what its sensors need to know of it. */
export interface SamplePlace {
  readonly tower: Tower;
  readonly point: 'overhead' | 'bottoms';
  readonly sensors: readonly SensorDetail[];
}

/** Between drawing and result, common practice, no source [ms]. */
const usualDelay = 90 * 60_000;

/** A typed result is checked as the server will check it, while it is typed. */
@Component({
  selector: 'app-sample-entry',
  imports: [MatButton, MatFormField, MatInput, MatLabel, MatOption, MatSelect, MatSuffix, PlantMoment],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './sample-entry.html',
  styleUrl: './sample-entry.scss',
})
export class SampleEntry {
  private readonly http = inject(HttpClient);
  private readonly clock = inject(Clock);
  private readonly injector = inject(Injector);
  private readonly element = inject<ElementRef<HTMLElement>>(ElementRef);

  readonly places = input.required<readonly SamplePlace[]>();
  /** Tower to begin with, from the address. */
  readonly startTower = input<string>();
  readonly entered = output<SampleOutcome>();

  protected readonly chosen = linkedSignal<number>(() =>
    Math.max(
      0,
      this.places().findIndex((place) => place.tower.id === this.startTower()),
    ),
  );
  protected readonly place = computed(() => this.places()[this.chosen()]);
  private readonly slate = computed(() => [
    ...new Set(
      (this.place()?.sensors ?? []).flatMap(
        (sensor) => sensor.version?.parameters.base.map((part) => part.id) ?? [],
      ),
    ),
  ]);
  protected readonly typed = linkedSignal<readonly string[], readonly TypedFraction[]>({
    source: () => this.slate(),
    // What was typed stays when the point is changed, also for components the other point does not have.
    computation: (slate, previous) => [
      ...slate.map((id) => previous?.value.find((one) => one.id === id) ?? { id, text: '' }),
      ...(previous?.value.filter((one) => !slate.includes(one.id) && one.text.trim() !== '') ?? []),
    ],
  });
  protected readonly drawnAt = signal(Number.NaN);
  protected readonly receivedAt = signal(Number.NaN);
  protected readonly remark = signal('');
  /** What a paste brought, and what it left. */
  protected readonly pasteWords = signal('');
  protected readonly isSending = signal(false);
  protected readonly refusal = signal('');
  /** Set once sending was tried: until then an empty field is no error. */
  protected readonly wasTried = signal(false);

  protected readonly others = computed(() =>
    components.filter((component) => !this.typed().some((one) => one.id === component.id)),
  );
  private readonly draft = computed(() => ({
    drawnAt: this.drawnAt(),
    receivedAt: this.receivedAt(),
    fractions: typedFractions(this.typed()),
  }));
  protected readonly check = computed(() =>
    checkSample(this.draft(), this.slate(), this.clock.minute() + 60_000),
  );
  protected readonly sumText = computed(() => `${(100 * this.check().sum).toFixed(3)} %`);
  protected readonly isUntouched = computed(() => this.typed().every((one) => one.text.trim() === ''));
  protected readonly sumWords = computed(() => {
    if (this.isUntouched()) return 'type the result; the fractions must sum to 100 %';
    const { errors, remarks } = this.check();
    return errors['sum'] ?? remarks[0] ?? 'sums to 100 %';
  });
  protected readonly canSend = computed(() => Object.keys(this.check().errors).length === 0);

  /** The drawing time the form began with [UTC ms]: a proposal, said to be one until somebody has set it. */
  private readonly proposed = signal(Number.NaN);
  protected readonly isProposed = computed(() => this.drawnAt() === this.proposed());

  constructor() {
    this.proposeTimes();
  }

  private proposeTimes(): void {
    const now = this.clock.minute();
    this.receivedAt.set(now);
    this.proposed.set(now - usualDelay);
    this.drawnAt.set(now - usualDelay);
  }

  protected isExtra(id: string): boolean {
    return !this.slate().includes(id);
  }

  protected name(id: string): string {
    return componentById(id).name;
  }

  protected short(id: string): string {
    return componentById(id).short;
  }

  /** What is wrong with one field; a field nobody has come to yet is left in peace. */
  protected problemOf(id: string): string {
    const words = this.check().errors[id] ?? '';
    const isEmpty =
      this.typed()
        .find((one) => one.id === id)
        ?.text.trim() === '';
    return isEmpty && !this.wasTried() ? '' : words;
  }

  protected type(id: string, event: Event): void {
    const { value } = event.target as HTMLInputElement;
    this.typed.update((all) => all.map((one) => (one.id === id ? { id, text: value } : one)));
  }

  /** A list copied from a report fills the fields, and brings fields for components that had none. */
  protected paste(event: ClipboardEvent): void {
    const fields = this.typed().map(({ id }) => id);
    const inputs = [...this.element.nativeElement.querySelectorAll('input.fraction')];
    const first = Math.max(0, inputs.indexOf(event.target as Element));
    const pasted = pastedFigures(event.clipboardData?.getData('text') ?? '', fields, first, components);
    if (!pasted) return;
    event.preventDefault();
    const brought = new Map(pasted.figures.map(({ id, text }) => [id, text]));
    this.typed.update((all) => [
      ...all.map(({ id, text }) => ({ id, text: brought.get(id) ?? text })),
      ...[...brought].filter(([id]) => !fields.includes(id)).map(([id, text]) => ({ id, text })),
    ]);
    const left = pasted.unread.map((line) => `“${line}”`).join(', ');
    this.pasteWords.set(
      `${brought.size === 1 ? '1 figure' : `${brought.size} figures`} pasted${left ? `; left out, as it could not be told what it is: ${left}` : ''}.`,
    );
  }

  /** Enter goes on to the next field, as in a spreadsheet; in the last one it sends. */
  protected goOn(event: Event): void {
    if (!(event.target instanceof HTMLInputElement) || event.target.type === 'radio') return;
    event.preventDefault();
    const fields = [
      ...this.element.nativeElement.querySelectorAll<HTMLInputElement>('input:not([type=radio])'),
    ];
    const next = fields[fields.indexOf(event.target) + 1];
    if (!next) return void this.send();
    next.focus();
    if (next.type === 'text') next.select();
  }

  protected remove(id: string): void {
    this.typed.update((all) => all.filter((one) => one.id !== id));
  }

  protected add(id: string): void {
    this.typed.update((all) => [...all, { id, text: '' }]);
    // To its field, once it is there.
    afterNextRender(
      () =>
        [...this.element.nativeElement.querySelectorAll<HTMLInputElement>('input.fraction')].at(-1)?.focus(),
      { injector: this.injector },
    );
  }

  protected textOf(event: Event): string {
    return (event.target as HTMLInputElement).value;
  }

  protected async send(): Promise<void> {
    this.wasTried.set(true);
    this.refusal.set('');
    const place = this.place();
    if (!place || !this.canSend())
      return this.refusal.set('Please correct what is marked, then enter it again.');
    this.isSending.set(true);
    const body: NewSample = {
      towerId: place.tower.id,
      point: place.point,
      ...this.draft(),
      remark: this.remark().trim(),
    };
    try {
      const outcome = sampleOutcome.parse(await firstValueFrom(this.http.post(samplesPath, body)));
      this.entered.emit(outcome);
      this.typed.set(this.slate().map((id) => ({ id, text: '' })));
      this.remark.set('');
      this.pasteWords.set('');
      this.proposeTimes();
      this.wasTried.set(false);
    } catch (error) {
      // Everything typed stays where it is.
      const failure = describeFailure(error);
      this.refusal.set(`${failure.words} Nothing that was typed is lost.`);
    } finally {
      this.isSending.set(false);
    }
  }
}
