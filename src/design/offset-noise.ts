/** How uncertain the measured offset is, for which the steering is designed. */
import type { Vehicle } from '../vehicle/vehicle.js';
import { meanPitchM } from './bar-view.js';

/** Uncertainty of a measured offset: share of the pitch, analog and digital sensors. */
const OFFSET_NOISE_SHARE = { analog: 0.03, digital: 0.5 } as const;

/**
 * Uncertainty of the offset while the line is held, m. Of a mixed bar only the gaps count in which the edges of a line then lie, within
 * half a pitch of the middle: what digital sensors further out say comes once and is no noise.
 */
export function offsetNoiseM({ bar, line, control }: Vehicle): number {
  const { positionsM, kinds } = bar;
  const pitchM = meanPitchM(positionsM);
  if (control.kind === 'rules') return OFFSET_NOISE_SHARE.digital * pitchM;
  if (bar.kind !== 'mixed') return OFFSET_NOISE_SHARE[bar.kind] * pitchM;
  const [nearM, farM] = [line.widthM / 2 - pitchM / 2, line.widthM / 2 + pitchM / 2];
  const noises = positionsM.slice(1).flatMap((right, i) => {
    const left = positionsM[i] as number;
    const held = (left > nearM && right < farM) || (right < -nearM && left > -farM);
    const kind = kinds[i] === 'digital' || kinds[i + 1] === 'digital' ? 'digital' : 'analog';
    return held ? [OFFSET_NOISE_SHARE[kind] * (left - right)] : [];
  });
  // a bar narrower than the line is steered by its end sensors
  return noises.length > 0 ? Math.max(...noises) : OFFSET_NOISE_SHARE.digital * pitchM;
}
