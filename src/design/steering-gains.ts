/**
 * Steering gains of one speed class: the law that keeps the margins over the whole tolerance box.
 *
 * The proportional gain comes from geometry. With kappa = kp y, the axle stays on a bend of radius R if
 * kp = 1 / (R y) with y the line's offset at the bar there; for wide bends this tends to 2 / L^2. Where that
 * offset would be too near the end of the bar, kp is larger and the axle cuts the bend. The derivative time
 * is the one with the least worst Ms; the derivative filter is as fast as the noise at the motors allows.
 *
 * An integral part, where the vehicle needs one (bias.ts), works over the way driven: in that domain the loop's natural frequency
 * is sqrt(kp), whatever the speed. Its distance is the least multiple of 1 / sqrt(kp) with which the margins hold.
 */
import type { Vehicle } from '../vehicle/vehicle.js';
import { HELD_VIEW_SHARE, LEAST_RADIUS_AHEAD_RATIO } from '../vehicle/sensor-bar.js';
import { axleCurvaturePerM, bendOffsetM, viewM } from './bar-view.js';
import type { Margins } from './design.js';
import { leastBetween } from './golden-section.js';
import { offsetNoiseM } from './offset-noise.js';
import { type SteeringGains, controllerOf, loopPeak } from './steering-loop.js';
import { keeps, lanePlantOf, toleranceCorners, worstMargins } from './tolerance-box.js';

/** Largest share of the wheel-speed range that one step of measurement noise may ask for through the gains. */
const NOISE_SHARE = 0.4;
/** Fastest derivative filter: two samples. */
export const FASTEST_FILTER_SAMPLES = 2;
/** Steps of the golden-section search for the derivative time. */
const SEARCH_STEPS = 9;

/** Proportional gain that keeps the line of a bend well under the bar, 1/m^2: [least, wanted]. */
export function proportionalRange(vehicle: Vehicle, radiusM: number): [number, number] {
  const { aheadM } = vehicle.bar;
  const radius = Math.max(radiusM, aheadM * LEAST_RADIUS_AHEAD_RATIO);
  const kept = HELD_VIEW_SHARE * viewM(vehicle);
  const least = axleCurvaturePerM(radius, aheadM, kept) / kept;
  const offset = bendOffsetM(radius, aheadM);
  const onLine = offset < kept ? 1 / (radius * offset) : least;
  return [least, Math.max(least, onLine)];
}

/** The law that the sheet gives, if it does. */
export function givenGains(vehicle: Vehicle): SteeringGains | undefined {
  const { gains } = vehicle.control;
  if (gains === undefined) return undefined;
  const { filterTimeS, ...rest } = gains;
  const filterCoefficient = -Math.expm1(-vehicle.board.samplePeriodS / filterTimeS);
  return { ...rest, filterCoefficient };
}

/** Law with a given derivative time; its filter is as fast as noise allows. */
function lawWith(
  vehicle: Vehicle,
  speedMps: number,
  proportional: number,
  derivativeTimeS: number,
  integralRad: number | undefined,
): SteeringGains {
  const { drive, board } = vehicle;
  const noiseM = offsetNoiseM(vehicle);
  const perUnit = speedMps * (drive.trackM / 2) * proportional * noiseM;
  const allowed = (NOISE_SHARE * drive.topSpeedMps) / perUnit - 1;
  const fastest = 1 - Math.exp(-1 / FASTEST_FILTER_SAMPLES);
  // ratio kd / kp = Td a / h must not pass what noise allows
  const ratioPerCoefficient = derivativeTimeS / board.samplePeriodS;
  const coefficient =
    ratioPerCoefficient > 0 ? Math.min(fastest, Math.max(allowed, 0) / ratioPerCoefficient) : fastest;
  return {
    proportionalPerM2: proportional,
    derivativeTimeS: coefficient > 0 ? derivativeTimeS : 0,
    filterCoefficient: coefficient > 0 ? coefficient : fastest,
    ...(integralRad !== undefined && { integralDistanceM: integralRad / Math.sqrt(proportional) }),
  };
}

/**
 * The law with the least worst Ms for a given proportional gain and speed.
 *
 * @param integralRad distance of the integral part times sqrt(kp); without one by default
 */
export function bestLaw(
  vehicle: Vehicle,
  speedMps: number,
  proportional: number,
  integralRad?: number,
): { gains: SteeringGains; worst: Margins } {
  const law = (time: number) => lawWith(vehicle, speedMps, proportional, time, integralRad);
  if (vehicle.control.kind === 'rules' && !vehicle.control.stateMemory) {
    const gains = law(0);
    return { gains, worst: worstMargins(vehicle, speedMps, gains) };
  }
  const outer = toleranceCorners(vehicle).slice(1);
  const plants = outer.map((corner) => lanePlantOf(vehicle, speedMps, corner));
  const cost = (time: number) => {
    const gains = law(time);
    return Math.max(
      ...plants.map((p) => loopPeak(p, controllerOf(gains, p.speedMps, p.samplePeriodS, speedMps))),
    );
  };
  const gains = law(leastBetween(cost, 0, 2.5 * vehicle.drive.lagS, SEARCH_STEPS).at);
  return { gains, worst: worstMargins(vehicle, speedMps, gains) };
}

/** Proportional gains that are tried, as shares of the wanted one, and steps that refine the largest that holds. */
const TRIED_SHARES = [1, 0.75, 0.55, 0.4, 0.3, 0.2];
const REFINING_STEPS = 3;

/** Proportional gains that serve a bend, 1/m^2, largest first. */
function triedGains(vehicle: Vehicle, radiusM: number): number[] {
  const [least, wanted] = proportionalRange(vehicle, radiusM);
  const tried = TRIED_SHARES.map((share) => share * wanted).filter((gain) => gain > least);
  return least < (TRIED_SHARES.at(-1) as number) * wanted ? tried : [...tried, least];
}

/** Distances of the integral part that are tried, times sqrt(kp), shortest first; undefined is no integral part. */
const TRIED_INTEGRALS = [6, 9, 14, 20, 30, 45];

function triedIntegrals({ control }: Vehicle): readonly (number | undefined)[] {
  return control.integral === 'always' ? TRIED_INTEGRALS : [undefined];
}

/** Whether a law for the class keeps the margins at a speed. */
export function lawExists(vehicle: Vehicle, speedMps: number, radiusM: number): boolean {
  const longest = triedIntegrals(vehicle).at(-1);
  return triedGains(vehicle, radiusM).some((gain) => keeps(bestLaw(vehicle, speedMps, gain, longest).worst));
}

/** The law with a proportional gain and the shortest integral distance that keep the margins; undefined if none does. */
function lawKeeping(vehicle: Vehicle, speedMps: number, proportional: number) {
  for (const integralRad of triedIntegrals(vehicle)) {
    const found = bestLaw(vehicle, speedMps, proportional, integralRad);
    if (keeps(found.worst)) return found;
  }
  return undefined;
}

/** The law of a class at a speed: the largest wanted proportional gain that keeps the margins, if any does. */
export function designLaw(
  vehicle: Vehicle,
  speedMps: number,
  radiusM: number,
): { gains: SteeringGains; worst: Margins } | undefined {
  let above: number | undefined;
  for (const gain of triedGains(vehicle, radiusM)) {
    let found = lawKeeping(vehicle, speedMps, gain);
    if (found === undefined) {
      above = gain;
      continue;
    }
    let low = gain;
    for (let i = 0; above !== undefined && i < REFINING_STEPS; i++) {
      const middle = Math.sqrt(low * above);
      const tried = lawKeeping(vehicle, speedMps, middle);
      if (tried) [found, low] = [tried, middle];
      else above = middle;
    }
    return found;
  }
  return undefined;
}
