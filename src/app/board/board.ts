import { httpResource } from '@angular/common/http';
import { ChangeDetectionStrategy, Component } from '@angular/core';
import { RouterLink } from '@angular/router';
import { sensorList, sensorsPath } from '@shared/api/sensors';

/** Every product at a glance. */
@Component({
  selector: 'app-board',
  imports: [RouterLink],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <h1>Board</h1>
    @if (sensors.hasValue()) {
      @for (sensor of sensors.value(); track sensor.id) {
        <p>
          <a [routerLink]="['/towers', sensor.towerId]" [queryParams]="{ sensor: sensor.id }">{{
            sensor.name
          }}</a>
        </p>
      }
    }
  `,
})
export class Board {
  protected readonly sensors = httpResource(() => sensorsPath, { parse: sensorList.parse });
}
