import { ChangeDetectionStrategy, Component, computed, inject } from '@angular/core';
import { noNumber, formatNumber } from '../ui/numbers';
import { Quantities } from '../ui/quantities';
import type { Answer } from './desk-case';
import { DeskState } from './desk-state';
import type { Shown } from './last-good';
import type { SaturationResult } from '@shared/vle/equilibrium';

interface Card {
  readonly answer: Answer;
  readonly title: string;
  readonly value: string;
  readonly unit: string;
  readonly isOld: boolean;
  readonly words: string;
}

/** Bubble and dew points at the present pressure and temperature, and the state at both; each can be looked into. */
@Component({
  selector: 'app-answers-panel',
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './answers-panel.html',
  styleUrl: './answers-panel.scss',
})
export class AnswersPanel {
  protected readonly state = inject(DeskState);
  private readonly quantities = inject(Quantities);

  protected readonly atPressure = computed(
    () => `At ${this.quantities.pressure(this.state.pressure())} ${this.quantities.pressureUnit()}`,
  );
  protected readonly atTemperature = computed(
    () =>
      `At ${this.quantities.temperature(this.state.temperature(), 2)} ${this.quantities.temperatureUnit()}`,
  );
  protected readonly pressureCards = computed(() => [
    this.temperatureCard('bubble-at-pressure', 'Bubble point', this.state.bubbleAtPressure()),
    this.temperatureCard('dew-at-pressure', 'Dew point', this.state.dewAtPressure()),
  ]);
  protected readonly temperatureCards = computed(() => [
    this.pressureCard('bubble-at-temperature', 'Bubble point', this.state.bubbleAtTemperature()),
    this.pressureCard('dew-at-temperature', 'Dew point', this.state.dewAtTemperature()),
  ]);
  protected readonly flashCard = computed((): Card => {
    const { value, isOld, words } = this.state.flash();
    return {
      answer: 'flash',
      title: 'Share vaporised',
      value: value ? formatNumber(100 * value.vapourFraction, 2) : noNumber,
      unit: 'mol %',
      isOld: this.isOld(isOld),
      words: words || this.stateWords(),
    };
  });
  /** Which phase there is, and how far it is from boiling or condensing. */
  private readonly stateWords = computed(() => {
    const flash = this.state.flash().value;
    if (!flash) return '';
    if (flash.vapourFraction > 0 && flash.vapourFraction < 1) return 'two phases';
    const isVapour = flash.vapourFraction === 1;
    const line = isVapour ? this.state.dewAtPressure() : this.state.bubbleAtPressure();
    if (line.isOld || !line.value) return isVapour ? 'all vapour or dense gas' : 'all liquid or dense fluid';
    const distance = formatNumber(
      this.quantities.toTemperatureChange(Math.abs(flash.temperature - line.value.temperature)),
      2,
    );
    const unit = this.quantities.temperatureChangeUnit();
    return isVapour
      ? `all vapour, ${distance} ${unit} above its dew point`
      : `all liquid, ${distance} ${unit} below its bubble point`;
  });

  private temperatureCard(answer: Answer, title: string, shown: Shown<SaturationResult>): Card {
    return {
      answer,
      title,
      value: shown.value ? this.quantities.temperature(shown.value.temperature, 2) : noNumber,
      unit: this.quantities.temperatureUnit(),
      isOld: this.isOld(shown.isOld),
      words: shown.words,
    };
  }

  private pressureCard(answer: Answer, title: string, shown: Shown<SaturationResult>): Card {
    return {
      answer,
      title,
      value: shown.value ? this.quantities.pressure(shown.value.pressure) : noNumber,
      unit: this.quantities.pressureUnit(),
      isOld: this.isOld(shown.isOld),
      words: shown.words,
    };
  }

  private isOld(isOld: boolean): boolean {
    return isOld || this.state.isUnfinished();
  }
}
