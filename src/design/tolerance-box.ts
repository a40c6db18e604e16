/** The tolerance box: how far the vehicle may differ from its sheet, and the margins a law keeps all over it. */
import type { Vehicle } from '../vehicle/vehicle.js';
import { delayBudget } from './delay.js';
import type { Margins } from './design.js';
import type { LanePlant } from './lane-plant.js';
import { type SteeringGains, controllerOf, loopMargins } from './steering-loop.js';

/** What every corner of the tolerance box must keep. */
export const LEAST_MARGINS: Margins = { gainMargin: 2, phaseMarginDeg: 33, ms: 1.8 };

/** One corner of the tolerance box: factors on speed and on the time constant. */
export interface Corner {
  gain: number;
  lag: number;
}

/** Corners of the tolerance box, the nominal vehicle first. Battery and motor spread act on speed alike. */
export function toleranceCorners(vehicle: Vehicle): Corner[] {
  const { tolerance, power } = vehicle;
  const slow = ((1 - tolerance.motorGain) * power.emptyV) / power.nominalV;
  const fast = ((1 + tolerance.motorGain) * power.fullV) / power.nominalV;
  const corners: Corner[] = [{ gain: 1, lag: 1 }];
  for (const gain of [slow, fast])
    for (const lag of [1 - tolerance.lag, 1 + tolerance.lag]) corners.push({ gain, lag });
  return corners;
}

/** The lane plant of a vehicle at a speed, in one corner. */
export function lanePlantOf(vehicle: Vehicle, speedMps: number, corner: Corner): LanePlant {
  return {
    lookaheadM: vehicle.bar.aheadM,
    speedMps: speedMps * corner.gain,
    lagS: vehicle.drive.lagS * corner.lag,
    delayS: delayBudget(vehicle).totalS,
    samplePeriodS: vehicle.board.samplePeriodS,
  };
}

/**
 * Margins of a law at one corner of the box; speed factors act on loop gain through the speed itself.
 *
 * @param speedMps speed of the class, which the firmware takes the vehicle to have in every corner
 */
export function marginsAt(vehicle: Vehicle, speedMps: number, gains: SteeringGains, corner: Corner): Margins {
  const plant = lanePlantOf(vehicle, speedMps, corner);
  return loopMargins(plant, controllerOf(gains, plant.speedMps, plant.samplePeriodS, speedMps));
}

/** The law while its integral part stands still: in bends, gaps and crossings. */
export function withoutIntegral(gains: SteeringGains): SteeringGains {
  const { proportionalPerM2, derivativeTimeS, filterCoefficient } = gains;
  return { proportionalPerM2, derivativeTimeS, filterCoefficient };
}

/** Worst of each margin over the corners of the box, with the integral part at work and standing still. */
export function worstMargins(vehicle: Vehicle, speedMps: number, gains: SteeringGains): Margins {
  const worst: Margins = { gainMargin: Infinity, phaseMarginDeg: Infinity, ms: 0 };
  const modes = gains.integralDistanceM === undefined ? [gains] : [gains, withoutIntegral(gains)];
  for (const corner of toleranceCorners(vehicle)) {
    for (const mode of modes) {
      const found = marginsAt(vehicle, speedMps, mode, corner);
      worst.gainMargin = Math.min(worst.gainMargin, found.gainMargin);
      worst.phaseMarginDeg = Math.min(worst.phaseMarginDeg, found.phaseMarginDeg);
      worst.ms = Math.max(worst.ms, found.ms);
    }
  }
  return worst;
}

/** Whether margins are at least those required. */
export function keeps(margins: Margins): boolean {
  return (
    margins.gainMargin >= LEAST_MARGINS.gainMargin &&
    margins.phaseMarginDeg >= LEAST_MARGINS.phaseMarginDeg &&
    margins.ms <= LEAST_MARGINS.ms
  );
}
