/**
 * The choices of the driving manner that no margin or limit decides, each with its reason.
 *
 * Lengths and times follow from the vehicle where they can; the shares are this project's own, checked in
 * rehearsal.
 */
import { STANDARD_GRAVITY_MPS2 } from '../vehicle/gravity.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { viewM } from './bar-view.js';

/** Memory for the curvature to hold over gaps and crossings, s. */
export const HOLD_FILTER_S = 0.06;
/** Wheel speeds below this share of full speed are left without duty: less than what stiction lets through. */
export const WHEEL_DEAD_SHARE = 0.01;
/** Least contrast between line and ground, share of full scale. */
export const LEAST_CONTRAST_SHARE = 0.1;

/** Share of the grip, at the low end of its tolerance, that speeding up and braking use. */
const SPEED_UP_GRIP_SHARE = 0.9;
const BRAKING_GRIP_SHARE = 0.95;

function leastGripMps2(vehicle: Vehicle): number {
  return vehicle.drive.grip * (1 - vehicle.tolerance.grip) * STANDARD_GRAVITY_MPS2;
}

export function speedUpMps2(vehicle: Vehicle): number {
  return SPEED_UP_GRIP_SHARE * leastGripMps2(vehicle);
}

export function brakingMps2(vehicle: Vehicle): number {
  return BRAKING_GRIP_SHARE * leastGripMps2(vehicle);
}

/** Filter on the curvature demand: with analog sensors only noise, with on-off readings also their steps. */
export function demandFilterS(vehicle: Vehicle): number {
  const stepped = vehicle.bar.kind !== 'analog' || vehicle.control.kind === 'rules';
  return Math.max(vehicle.board.samplePeriodS, stepped ? 0.025 : 0.006);
}

/** Beyond turning with the inner wheel as fast backward as the outer one forward nothing is gained, 1/m. */
export function curvatureLimitPerM(vehicle: Vehicle): number {
  return 4 / vehicle.drive.trackM;
}

/** A lost line is searched on a circle that turns well inside the tightest bend, 1/m. */
export function searchCurvaturePerM(vehicle: Vehicle): number {
  return Math.max(2 / vehicle.drive.trackM, 2 / vehicle.line.tightestRadiusM);
}

/** Speed of the search: a third of what grip allows on the search circle, and no more than a third of top speed. */
export function searchSpeedMps(vehicle: Vehicle): number {
  const onCircle = Math.sqrt(leastGripMps2(vehicle) / searchCurvaturePerM(vehicle));
  return Math.min(0.6 * onCircle, 0.35 * vehicle.drive.topSpeedMps);
}

/** Time for the search to turn once round, s. */
export function searchTimeS(vehicle: Vehicle): number {
  const turn = searchSpeedMps(vehicle) * searchCurvaturePerM(vehicle);
  return (1.1 * 2 * Math.PI) / turn;
}

/** Longest gap with reserve for a slanted approach and the blur of the spots. */
export function gapDistanceM(vehicle: Vehicle): number {
  const blur = 2 * vehicle.bar.spotRadiusM + 0.01;
  return 1.3 * vehicle.line.longestGapM + blur;
}

/** A crossing line passes under the bar over its width and the spots' blur, more when met at a slant. */
export function crossingDistanceM(vehicle: Vehicle): number {
  return 3 * vehicle.line.widthM + 2 * vehicle.bar.spotRadiusM;
}

/** After a corner was seen the line is gone within its own width. */
export function cornerDistanceM(vehicle: Vehicle): number {
  return 2 * vehicle.line.widthM + 2 * vehicle.bar.spotRadiusM;
}

/**
 * The axle leaves a bend one look-ahead after the bar; the motors' lag allows them to speed up before it does.
 * The share is the one that was quickest in rehearsal without losing the line.
 */
const RELEASE_SHARE = 0.35;

export function releaseDistanceM(vehicle: Vehicle): number {
  return RELEASE_SHARE * vehicle.bar.aheadM;
}

/** Turn that carries both end sensors clear across the line and back, at a slow turn rate. */
export function sweepTurn(vehicle: Vehicle): { turnTimeS: number; wheelSpeedMps: number } {
  const { drive, bar, line, tolerance } = vehicle;
  const reach = viewM(vehicle) + line.widthM / 2 + bar.spotRadiusM;
  const angle = Math.atan2(reach, bar.aheadM) * (1 + tolerance.motorGain) + 0.1;
  const wheelSpeedMps = Math.min(0.25 * drive.topSpeedMps, (2.5 * drive.trackM) / 2);
  const turnRate = (2 * wheelSpeedMps) / drive.trackM;
  return { turnTimeS: angle / turnRate + drive.lagS, wheelSpeedMps };
}
