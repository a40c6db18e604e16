/** Where the sensors of a sheet are, whichever of the two ways it says so. */
import { evenPositions } from '../vehicle/sensor-bar.js';
import type { Sheet } from './sheet-types.js';

/** Sensor positions, mm, however the sheet gives them; undefined unless it gives them once and in order. */
export function positionsOf(sheet: Sheet): readonly number[] | undefined {
  const { pitchMm, positionsMm, count } = sheet.sensors;
  if (positionsMm === undefined) return pitchMm === undefined ? undefined : evenPositions(count, pitchMm);
  const descending = positionsMm.every(
    (position, index) => index === 0 || position < positionsMm[index - 1]!,
  );
  return pitchMm === undefined && descending ? positionsMm : undefined;
}
