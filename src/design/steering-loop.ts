/**
 * The steering loop of one speed class: sampled lane plant and the firmware's control law.
 *
 * The law, per sample (y offset of the line at the bar, kappa curvature, a the filter coefficient):
 *
 *   change   = y - filtered;   filtered += a change
 *   kappa    = kp y + kd change
 *
 * so that from lateral error to commanded turn rate omega = v kappa
 *
 *   C(z) = v kp (1 + g (1 - z^-1) / (1 - (1 - a) z^-1)),   g = kd / kp = Td a / h
 *
 * a derivative of time Td with a first-order filter of time Tf, a = 1 - e^(-h/Tf).
 *
 * With an integral part, kappa has kp / D times the sum of y over the way driven besides, so that C(z) / (v kp) gains
 * r z^-1 / (1 - z^-1), r = h w / D. The way is that of the modelled speed w, which a corner of the tolerances does not change.
 */
import { closedLoopRadius } from './closed-loop.js';
import type { Margins } from './design.js';
import { type LanePlant, type SampledLanePlant, plantResponse, samplePlant } from './lane-plant.js';
import { type SampledController, controllerResponse, productOf, sumOf } from './sampled-controller.js';
import { type Response, quickPeak, scanLoop } from './margins.js';

/** Gains of the law in physical units. */
export interface SteeringGains {
  /** Curvature per offset, 1/m^2. */
  proportionalPerM2: number;
  /** Derivative time, s. */
  derivativeTimeS: number;
  /** Coefficient of the derivative filter per sample, 0..1. */
  filterCoefficient: number;
  /** Way over which the integral part makes as much curvature as the proportional one, m; absent without an integral part. */
  integralDistanceM?: number;
}

/**
 * The law as a transfer function from lateral error (m) to commanded turn rate (rad/s).
 *
 * @param modelledMps speed that the firmware takes the vehicle to have
 */
export function controllerOf(
  gains: SteeringGains,
  speedMps: number,
  samplePeriodS: number,
  modelledMps: number = speedMps,
): SampledController {
  const scale = speedMps * gains.proportionalPerM2;
  const ratio = (gains.derivativeTimeS * gains.filterCoefficient) / samplePeriodS;
  const pole = 1 - gains.filterCoefficient;
  const numerator = [scale * (1 + ratio), -scale * (pole + ratio)];
  const denominator = [1, -pole];
  if (gains.integralDistanceM === undefined) return { numerator, denominator, samplePeriodS };
  const perSample = (scale * samplePeriodS * modelledMps) / gains.integralDistanceM;
  return {
    numerator: sumOf(productOf(numerator, [1, -1]), productOf([0, perSample], denominator)),
    denominator: productOf(denominator, [1, -1]),
    samplePeriodS,
  };
}

/** Whether a controller integrates: its denominator vanishes at z = 1. */
function integrates({ denominator }: SampledController): boolean {
  return Math.abs(denominator.reduce((sum, each) => sum + each, 0)) < 1e-12;
}

/** Lowest frequency at which a lane loop is looked at, as a share of 1 / lag: far below any crossover. */
const LOWEST_SHARE = 0.01;

/** Open loop of plant and controller. */
export function openLoop(sampled: SampledLanePlant, controller: SampledController): Response {
  return (w) => {
    const [gr, gi] = plantResponse(sampled, w);
    const [cr, ci] = controllerResponse(controller, w);
    return [gr * cr - gi * ci, gr * ci + gi * cr];
  };
}

/** Ms of the loop, for searches: coarse grid, refined peak; Infinity where it is unstable or only conditionally stable. */
export function loopPeak(plant: LanePlant, controller: SampledController): number {
  const loop = openLoop(samplePlant(plant), controller);
  const highestRadS = Math.PI / plant.samplePeriodS;
  return quickPeak(loop, LOWEST_SHARE / plant.lagS, highestRadS, integrates(controller));
}

/** Margins of the loop of plant and controller; an unstable loop has none of them. */
export function loopMargins(plant: LanePlant, controller: SampledController): Margins {
  const sampled = samplePlant(plant);
  const loop = openLoop(sampled, controller);
  const { beyondMinusOne, gainMargin, phaseMarginDeg, ms } = scanLoop(
    loop,
    LOWEST_SHARE / plant.lagS,
    Math.PI / plant.samplePeriodS,
  );
  const stable = !beyondMinusOne || closedLoopRadius(sampled, controller) < 1;
  return stable ? { gainMargin, phaseMarginDeg, ms } : { gainMargin: 0, phaseMarginDeg: 0, ms: Infinity };
}

/** Where a loop just oscillates. */
export interface Oscillation {
  /** Loop gain at which it does, over the present one; 0 where it does at any gain. */
  gainRatio: number;
  /** Absent where no gain keeps an oscillation of one size. */
  frequencyRadS?: number;
}

/** Share of the gain at which every crossing of -180 deg lies within the unit circle. */
const SMALL = 1e-9;

/** The smallest gain at which the loop oscillates, and how fast; found for unstable loops too. */
export function oscillation(plant: LanePlant, controller: SampledController): Oscillation {
  const loop = openLoop(samplePlant(plant), controller);
  const lowest = LOWEST_SHARE / plant.lagS;
  const small: Response = (w) => loop(w).map((part) => SMALL * part) as [number, number];
  const { gainMargin, phaseCrossoverRadS } = scanLoop(small, lowest, Math.PI / plant.samplePeriodS);
  if (phaseCrossoverRadS !== undefined)
    return { gainRatio: SMALL * gainMargin, frequencyRadS: phaseCrossoverRadS };
  // two integrators whose phase lag is never made up for: no gain is small enough
  return { gainRatio: loop(lowest)[1] > 0 ? 0 : Infinity };
}

/** Time constant of the derivative filter, s. */
export function filterTimeS(gains: SteeringGains, samplePeriodS: number): number {
  return -samplePeriodS / Math.log1p(-gains.filterCoefficient);
}
