import { httpResource } from '@angular/common/http';
import { ChangeDetectionStrategy, Component, computed, inject, output } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { sensorList, sensorsPath } from '@shared/api/sensors';
import { PlantTime } from '../core/plant-time';
import { QualityChip } from '../ui/quality-chip';
import { Quantities } from '../ui/quantities';
import { DeskState } from './desk-state';
import { stateOf } from './followed-case';
import { FollowedSensor } from './followed-sensor';
import { presetSlates, type PresetSlate } from './slates';

/** Where the slate comes from: an invented one to begin with, a tower's own followed live, or one's own. */
@Component({
  selector: 'app-slate-source',
  imports: [MatButton, QualityChip],
  changeDetection: ChangeDetectionStrategy.OnPush,
  templateUrl: './slate-source.html',
  styleUrl: './slate-source.scss',
})
export class SlateSource {
  private readonly state = inject(DeskState);
  protected readonly followed = inject(FollowedSensor);
  protected readonly quantities = inject(Quantities);
  private readonly plantTime = inject(PlantTime);

  readonly presetChosen = output<PresetSlate>();

  protected readonly presets = presetSlates;
  protected readonly sensors = httpResource(() => sensorsPath, { parse: sensorList.parse });
  protected readonly chosen = computed(() => {
    const sensorId = this.followed.sensorId();
    if (sensorId !== null) return `sensor ${sensorId}`;
    const { rows, basis } = this.state.case();
    const preset = presetSlates.find((each) => each.case.rows === rows && each.case.basis === basis);
    return preset ? `preset ${preset.id}` : 'own';
  });

  protected readonly following = computed(() => {
    const state = this.followed.state();
    if (state.kind !== 'following') return null;
    const { sensor, latest, sampled } = state;
    const reading = stateOf(latest, sensor);
    return {
      name: `${sensor.towerName}: ${sensor.name}`,
      slate: !sensor.version
        ? 'No version of this sensor is live, so it has no slate: the one below stays.'
        : sampled
          ? 'The slate is that of the last used sample.'
          : 'The slate is that of the sensor’s set-up.',
      time: latest && reading ? this.plantTime.timeWithZone(latest.t) : null,
      offset: reading && reading.offset !== 0 ? this.quantities.temperatureChange(reading.offset, 2) : null,
      quality: latest?.quality ?? null,
      reasons: latest?.reasons ?? [],
    };
  });
  protected readonly failure = computed(() => {
    const state = this.followed.state();
    return state.kind === 'failed' ? state.failure : null;
  });

  protected choose(value: string): void {
    const [kind, id] = value.split(' ');
    if (kind === 'sensor' && id !== undefined) this.followed.follows(id);
    const preset = presetSlates.find((each) => kind === 'preset' && each.id === id);
    if (preset) this.presetChosen.emit(preset);
    if (kind === 'own') this.followed.follows(null);
  }
}
