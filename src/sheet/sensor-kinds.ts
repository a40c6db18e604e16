/** Which sensors of a bar read a voltage and which a level. */
import type { Sheet } from './sheet-types.js';

export type SensorKind = 'analog' | 'digital';

/** Kind of each sensor, leftmost first; in a mixed bar what the sheet does not list counts as analog. */
export function kindsOf({ kind, count, kinds = [] }: Sheet['sensors']): SensorKind[] {
  return Array.from({ length: count }, (_, i) => (kind === 'mixed' ? (kinds[i] ?? 'analog') : kind));
}

/** Places, from 0, of the sensors that read a voltage: the readings of a calibration are theirs, in this order. */
export function analogPlaces(sensors: Sheet['sensors']): number[] {
  return kindsOf(sensors).flatMap((kind, i) => (kind === 'analog' ? [i] : []));
}

/** A usual mixed bar: digital sensors at the ends of an analog middle; of two sensors one each. */
export function usualKinds(count: number): SensorKind[] {
  return Array.from({ length: count }, (_, i) =>
    i === 0 || (i === count - 1 && i > 1) ? 'digital' : 'analog',
  );
}
