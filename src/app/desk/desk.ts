import { Clipboard } from '@angular/cdk/clipboard';
import { Location } from '@angular/common';
import { ChangeDetectionStrategy, Component, DOCUMENT, computed, inject, signal } from '@angular/core';
import { takeUntilDestroyed, toObservable } from '@angular/core/rxjs-interop';
import { MatButton } from '@angular/material/button';
import { ActivatedRoute, Router } from '@angular/router';
import { debounceTime, skip } from 'rxjs';
import { components } from '@shared/vle/components';
import { Clock } from '../core/clock';
import { Notices } from '../core/notices';
import { PlantTime } from '../core/plant-time';
import { SessionStore } from '../core/session';
import { Quantities } from '../ui/quantities';
import { AnswersPanel } from './answers-panel';
import { readLink, writeFollowLink, writeLink } from './case-link';
import type { DeskCase } from './desk-case';
import { DeskState } from './desk-state';
import { deskTable } from './desk-table';
import { pressureUnits, temperatureUnits } from './desk-units';
import { slateOf, stateOf } from './followed-case';
import { FollowedSensor, type Following } from './followed-sensor';
import { MethodChoice } from './method-choice';
import { PhasesTable } from './phases-table';
import { PlotsPanel } from './plots-panel';
import { ProductPanel } from './product-panel';
import { QuantityField } from './quantity-field';
import { ShownUnitsOfPerson } from './shown-units';
import { SlateEditor } from './slate-editor';
import { SlateSource } from './slate-source';
import { SourcesPanel } from './sources-panel';
import { toCsv, toTsv, type Table } from './table-text';
import { caseOf, type PresetSlate } from './slates';

/** How long the address waits for a drag to end: browsers refuse hundreds of changes in a row [ms]. */
const addressDelayMs = 400;

/** Bubble point, dew point and flash of any slate, worked out here while the person types and drags. */
@Component({
  selector: 'app-desk',
  imports: [
    AnswersPanel,
    MatButton,
    MethodChoice,
    PhasesTable,
    PlotsPanel,
    ProductPanel,
    QuantityField,
    SlateEditor,
    SlateSource,
    SourcesPanel,
  ],
  providers: [DeskState, FollowedSensor],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './desk.html',
  styleUrl: './desk.scss',
})
export class Desk {
  protected readonly state = inject(DeskState);
  protected readonly quantities = inject(Quantities);
  private readonly followed = inject(FollowedSensor);
  private readonly shown = inject(ShownUnitsOfPerson);
  private readonly clock = inject(Clock);
  private readonly plantTime = inject(PlantTime);
  private readonly notices = inject(Notices);
  private readonly clipboard = inject(Clipboard);
  private readonly location = inject(Location);
  private readonly document = inject(DOCUMENT);
  private readonly router = inject(Router);
  private readonly route = inject(ActivatedRoute);
  private readonly site = inject(SessionStore).site;

  protected readonly library = components;
  protected readonly temperatureUnits = temperatureUnits;
  protected readonly pressureUnits = computed(() => pressureUnits(this.site().barometricPressure));
  /** What of the link could not be used, until the next change. */
  protected readonly faults = signal<readonly string[]>([]);

  private readonly address = computed(() => {
    const sensorId = this.followed.sensorId();
    return sensorId === null ? writeLink(this.state.case()) : writeFollowLink(this.state.case(), sensorId);
  });
  private slateFollowed: Pick<Following & { kind: 'following' }, 'sensor' | 'sampled'> | null = null;

  constructor() {
    this.openLink();
    toObservable(this.followed.state)
      .pipe(takeUntilDestroyed())
      .subscribe((following) => this.apply(following));
    toObservable(this.address)
      .pipe(skip(1), debounceTime(addressDelayMs), takeUntilDestroyed())
      .subscribe(
        (queryParams) =>
          void this.router.navigate([], { relativeTo: this.route, queryParams, replaceUrl: true }),
      );
  }

  protected openPreset(preset: PresetSlate): void {
    this.followed.follows(null);
    this.faults.set([]);
    this.state.open({ ...this.state.case(), ...caseOf(preset) });
  }

  /** A change by hand of what a tower gives: from then on the desk no longer follows it. */
  protected changeByHand(change: Partial<DeskCase>): void {
    this.followed.follows(null);
    this.faults.set([]);
    this.state.change(change);
  }

  protected edit(field: 'temperature' | 'pressure', value: number | null): void {
    this.followed.follows(null);
    this.state.edit(field, value);
  }

  protected copyLink(): void {
    const tree = this.router.createUrlTree(['/desk'], { queryParams: writeLink(this.state.case()) });
    const path = this.location.prepareExternalUrl(this.router.serializeUrl(tree));
    this.tellCopied('The link', this.clipboard.copy(new URL(path, this.document.baseURI).href));
  }

  protected copyTable(): void {
    this.tellCopied('The table', this.clipboard.copy(toTsv(this.table())));
  }

  protected downloadCsv(): void {
    // The mark at the beginning tells spreadsheets that it is UTF-8: units have degree signs.
    const file = new Blob(['\ufeff', toCsv(this.table())], { type: 'text/csv;charset=utf-8' });
    const address = URL.createObjectURL(file);
    const link = this.document.createElement('a');
    link.href = address;
    link.download = `equilibrium-${this.plantTime.wallClock(this.clock.now()).date}.csv`;
    link.click();
    URL.revokeObjectURL(address);
  }

  private table(): Table {
    return deskTable(this.state.results(), this.shown.units());
  }

  private tellCopied(what: string, isCopied: boolean): void {
    if (isCopied) this.notices.tell(`${what} is copied.`);
    else
      this.notices.warn(
        `${what} could not be copied: the browser does not let this page write to the clipboard.`,
      );
  }

  private openLink(): void {
    const query = this.route.snapshot.queryParams as Record<string, string>;
    const isKnown = (id: string) => components.some((component) => component.id === id);
    const { case: linked, sensorId, faults } = readLink(query, this.state.case(), isKnown);
    this.state.open(linked);
    this.faults.set(faults);
    if (sensorId !== null) this.followed.follows(sensorId);
  }

  private apply(following: Following): void {
    if (following.kind !== 'following') {
      if (following.kind === 'none') this.slateFollowed = null;
      return;
    }
    const { sensor, sampled, latest } = following;
    const state = stateOf(latest, sensor);
    const readings = state ? { temperature: state.temperature, pressure: state.pressure } : {};
    if (this.slateFollowed?.sensor === sensor && this.slateFollowed.sampled === sampled) {
      this.state.change(readings);
      this.state.settle();
      return;
    }
    this.slateFollowed = { sensor, sampled };
    this.state.open({ ...this.state.case(), ...slateOf(sensor, sampled), ...readings });
  }
}
