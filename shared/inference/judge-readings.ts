import { qualityOfStatus } from '../api/historian';
import type { SensorParameters } from '../api/sensor-parameters';
import type { QualityReason } from './quality';

/** The newest value of a tag at a minute; `t` is the value's own time. */
export interface Reading {
  readonly t: number;
  /** SI; null where the historian has none. */
  readonly value: number | null;
  /** Status code of IEC 62541. */
  readonly status: number;
}

/** What is remembered of a tag from minute to minute. */
export interface TagMemory {
  /** Last usable value and its time; null before the first. */
  readonly t: number | null;
  readonly value: number | null;
  /** Since when the value has been the same. */
  readonly sameSince: number | null;
}

export const noMemory: TagMemory = { t: null, value: null, sameSince: null };

const minute = 60_000;

/** A jump is looked for only between readings this close together [minutes]; a longer gap may hide a real change. */
const jumpMinutes = 5;

export interface Judged {
  /** Usable value in SI, null where the reading must not be used. */
  readonly value: number | null;
  readonly reasons: readonly QualityReason[];
  readonly memory: TagMemory;
}

/** Whether a reading may be used, and what is wrong with it. */
export function judgeReading(
  kind: 'temperature' | 'pressure',
  reading: Reading | null,
  memory: TagMemory,
  t: number,
  validity: SensorParameters['validity'],
): Judged {
  if (!reading || t - reading.t > validity.staleMinutes * minute)
    return { value: null, reasons: [`${kind}-missing`], memory };
  const status = qualityOfStatus(reading.status);
  if (status === 'Bad' || reading.value === null || !Number.isFinite(reading.value))
    return { value: null, reasons: [`${kind}-bad`], memory };
  const { value } = reading;
  const reasons: QualityReason[] = [];
  if (status === 'Uncertain') reasons.push(`${kind}-uncertain`);
  const [low, high] = validity[kind];
  if (value < low || value > high) reasons.push(`${kind}-out-of-range`);
  const step = kind === 'temperature' ? validity.temperatureStep : validity.pressureStep;
  if (
    memory.value !== null &&
    memory.t !== null &&
    reading.t > memory.t &&
    reading.t - memory.t <= jumpMinutes * minute &&
    Math.abs(value - memory.value) > step
  )
    reasons.push(`${kind}-jumped`);
  const sameSince = memory.value === value && memory.sameSince !== null ? memory.sameSince : reading.t;
  if (t - sameSince >= validity.flatMinutes * minute) reasons.push(`${kind}-flat`);
  return { value, reasons, memory: { t: reading.t, value, sameSince } };
}
