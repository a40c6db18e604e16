/**
 * The lane on which class speeds are proven when no course is known: what the sheet's line section allows, at its worst.
 *
 * Straights long enough to reach full speed lead into the tightest bend, single, doubled to an S and as a long
 * turn, and into one twice as wide; a gap and a crossing follow where the sheet has them. Left and right turns
 * alternate so that the lane never meets itself.
 */
import type { Course } from '../course/course-types.js';
import { type Lane, compileCourse } from '../course/lane.js';
import { mToMm, radToDeg } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { brakingMps2, speedUpMps2 } from './drive-choices.js';

/** Time constants after which a wheel is within 2 % of its speed. */
const RUN_UP_LAGS = 4;
/** Turn of the long tight bend, deg: short of a half turn, so that its legs stay apart. */
const LONG_TURN_DEG = 135;

/** Length in which the vehicle reaches full speed from that of a tight bend, m. */
function runUpM(vehicle: Vehicle): number {
  const { topSpeedMps, lagS } = vehicle.drive;
  const acceleration = Math.min(speedUpMps2(vehicle), brakingMps2(vehicle));
  return Math.min(2, RUN_UP_LAGS * lagS * topSpeedMps + (topSpeedMps * topSpeedMps) / (4 * acceleration));
}

/** Look-aheads, and distances driven in a time constant, after which a bend is steady and teaches no more. */
const STEADY_LOOKAHEADS = 8;
const STEADY_LAGS = 6;

/** Length of bend that the proof needs, m: until the vehicle is steady in it. */
function bendM(vehicle: Vehicle): number {
  const { topSpeedMps, lagS } = vehicle.drive;
  return STEADY_LOOKAHEADS * vehicle.bar.aheadM + STEADY_LAGS * topSpeedMps * lagS;
}

/** The proving course of a vehicle, open, in the course file's form. */
export function provingCourse(vehicle: Vehicle): Course {
  const { tightestRadiusM, longestGapM, crossings, widthM } = vehicle.line;
  const radiusMm = mToMm(tightestRadiusM);
  const runUp = { straightMm: mToMm(runUpM(vehicle)) };
  const settle = { straightMm: mToMm(vehicle.bar.aheadM * 2) };
  const arc = (factor: number, turnDeg: number) => {
    const longestDeg = radToDeg(bendM(vehicle) / (factor * tightestRadiusM));
    return { radiusMm: factor * radiusMm, turnDeg: Math.max(-longestDeg, Math.min(longestDeg, turnDeg)) };
  };
  const pieces: Course['pieces'] = [runUp, arc(1, 90), runUp, arc(1, -LONG_TURN_DEG), runUp];
  if (longestGapM > 0) pieces.push({ gapMm: mToMm(longestGapM) }, settle);
  pieces.push(arc(1, 60), arc(1, -60), arc(2, 90), settle);
  if (crossings) pieces.push({ crossing: true }, settle);
  pieces.push(runUp, arc(1, -60), arc(1, 60), settle);
  return { courseVersion: 1, closed: false, lineWidthMm: mToMm(widthM), pieces };
}

export function provingLane(vehicle: Vehicle): Lane {
  return compileCourse(provingCourse(vehicle));
}
