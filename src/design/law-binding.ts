/** What keeps the steering law of a class from being stronger, and the corner of the tolerance box that decides it. */
import { fractionToPercent } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import type { Margins } from './design.js';
import { entryPeakM } from './entry.js';
import { FASTEST_FILTER_SAMPLES, proportionalRange } from './steering-gains.js';
import type { SteeringGains } from './steering-loop.js';
import { type Corner, LEAST_MARGINS, marginsAt, toleranceCorners } from './tolerance-box.js';

/** A requirement on the loop. */
export type LoopRequirement = 'gain margin' | 'phase margin' | 'Ms';

export interface LawBinding {
  /** What sets the proportional gain: the bend's geometry, as wanted, or the requirement that cuts it. */
  proportional: 'bend geometry' | LoopRequirement | 'sheet';
  /** What sets the derivative filter: two samples, the fastest, or the noise that the motors may get. */
  filter: 'sampling' | 'noise at the motors' | 'sheet';
  /** The requirement with the least room, and the corner where it is least. */
  nearest: LoopRequirement;
  corner: Corner;
  /** Largest turn rate asked for while entering the class's bend, as a share of what the wheels can do; above 1 they saturate. */
  wheelShare: number;
}

/** Share of the wanted proportional gain from which nothing has cut it. */
const UNCUT_SHARE = 0.99;

/** Room over each requirement, as a share of the requirement; negative where it is missed. */
function room({ gainMargin, phaseMarginDeg, ms }: Margins): Record<LoopRequirement, number> {
  return {
    'gain margin': gainMargin / LEAST_MARGINS.gainMargin - 1,
    'phase margin': phaseMarginDeg / LEAST_MARGINS.phaseMarginDeg - 1,
    Ms: LEAST_MARGINS.ms / ms - 1,
  };
}

const REQUIREMENTS: readonly LoopRequirement[] = ['gain margin', 'phase margin', 'Ms'];

/**
 * What binds a law.
 *
 * @param speedMps speed of the class, m/s
 * @param radiusM bend that the law is for, m
 */
export function lawBinding(
  vehicle: Vehicle,
  gains: SteeringGains,
  speedMps: number,
  radiusM: number,
): LawBinding {
  const corners = toleranceCorners(vehicle);
  const found = corners.flatMap((corner) => {
    const rooms = room(marginsAt(vehicle, speedMps, gains, corner));
    return REQUIREMENTS.map((requirement) => ({ corner, requirement, room: rooms[requirement] }));
  });
  const least = found.reduce((a, b) => (b.room < a.room ? b : a));
  const [, wanted] = proportionalRange(vehicle, radiusM);
  const given = vehicle.control.gains !== undefined;
  const uncut = gains.proportionalPerM2 >= UNCUT_SHARE * wanted;
  const fastest = -Math.expm1(-1 / FASTEST_FILTER_SAMPLES);
  let wheelShare = 0;
  for (const corner of corners) {
    entryPeakM(vehicle, gains, speedMps, radiusM, corner, (_distanceM, _offsetM, share) => {
      wheelShare = Math.max(wheelShare, Math.abs(share));
    });
  }
  return {
    proportional: given ? 'sheet' : uncut ? 'bend geometry' : least.requirement,
    filter: given
      ? 'sheet'
      : gains.filterCoefficient < UNCUT_SHARE * fastest
        ? 'noise at the motors'
        : 'sampling',
    nearest: least.requirement,
    corner: least.corner,
    wheelShare,
  };
}

function signedPercent(factor: number): string {
  const percent = Math.round(fractionToPercent(factor - 1));
  return `${percent < 0 ? '' : '+'}${percent} %`;
}

/** A corner in words: "speed +18 %, time constant -35 %". */
export function cornerText({ gain, lag }: Corner): string {
  if (gain === 1 && lag === 1) return 'nominal';
  return `speed ${signedPercent(gain)}, time constant ${signedPercent(lag)}`;
}
