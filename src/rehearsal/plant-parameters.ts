/**
 * What the simulated vehicle is made of: the sheet's vehicle as it stands, or one drawn from its tolerances.
 *
 * A perturbed vehicle, each figure uniform in its range and independent of the others:
 *   motor gain         each motor's speed at a given duty, within the sheet's motorGainPercent
 *   time constant      of both motors together, within timeConstantPercent
 *   grip               within gripPercent
 *   battery            between the sheet's empty and full voltage
 *   start              5 mm to either side of the line, 3 degrees to either side of its direction    (common practice)
 *   sensors            each reading over ground and over line off by up to 3 % of their difference   (common practice)
 * and reading noise, normal, with a standard deviation of 0.3 % of full scale (common practice: 3 counts of 1023).
 * The seed alone repeats a vehicle. Seed 0 is the sheet's own: nothing perturbed, no noise.
 */
import { degToRad, mmToM } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { Random } from './random.js';

/** Half-widths of what the sheet has no tolerance for. */
export const START_LATERAL_M = mmToM(5);
export const START_HEADING_RAD = degToRad(3);
export const READING_ERROR = 0.03;
/** Standard deviation of readings, share of full scale. */
export const READING_NOISE = 0.003;

/** Streams of random numbers that belong to one seed. */
export const STREAM = { vehicle: 1, noise: 2 } as const;

export interface PlantParameters {
  /** Repeats the noise; 0 for the nominal vehicle. */
  seed: number;
  trackM: number;
  /** Wheel surface speed at full duty and nominal battery voltage, m/s. */
  topLeftMps: number;
  topRightMps: number;
  /** Each wheel answers to its duty divided by this: the trim that it needs, 1 for none. */
  trimLeft: number;
  trimRight: number;
  /** Time constant of both motors, s. */
  lagS: number;
  /** Duty at which the wheels begin to turn at nominal battery voltage, 0..1. */
  startDuty: number;
  /** Battery voltage over nominal. */
  batteryFactor: number;
  /** Friction coefficient. */
  grip: number;
  /** Distance from axle to bar, m. */
  aheadM: number;
  /** Sensor positions left of the centre line, m; leftmost first. */
  positionsM: readonly number[];
  spotRadiusM: number;
  kind: 'analog' | 'digital';
  /** Digital: level of the pin over the line. */
  lineLevel: 'high' | 'low';
  /** Analog: readings over ground and line, counts. */
  ground: readonly number[];
  line: readonly number[];
  /** Largest reading, counts. */
  adcMaxCount: number;
  /** Standard deviation of a reading: share of full scale; digital: of the spot. */
  noiseShare: number;
  /** Where the axle's middle starts beside the lane, m, positive left. */
  startLateralM: number;
  /** Heading at the start against the lane's, rad. */
  startHeadingRad: number;
}

/**
 * The vehicle just as the sheet describes it.
 *
 * Where the sheet trims a wheel's duty, the vehicle is one that needs it: that wheel answers to so much less or more of it.
 */
export function nominalPlant(vehicle: Vehicle): PlantParameters {
  const { bar, drive } = vehicle;
  return {
    seed: 0,
    trackM: drive.trackM,
    topLeftMps: drive.topSpeedMps,
    topRightMps: drive.topSpeedMps,
    trimLeft: drive.trimLeft,
    trimRight: drive.trimRight,
    lagS: drive.lagS,
    startDuty: drive.startDuty,
    batteryFactor: 1,
    grip: drive.grip,
    aheadM: bar.aheadM,
    positionsM: bar.positionsM,
    spotRadiusM: bar.spotRadiusM,
    kind: bar.kind,
    lineLevel: bar.lineLevel,
    ground: bar.calibration.ground,
    line: bar.calibration.line,
    adcMaxCount: vehicle.board.adcMaxCount,
    noiseShare: 0,
    startLateralM: 0,
    startHeadingRad: 0,
  };
}

/**
 * A vehicle drawn from the sheet's tolerances.
 *
 * @param seed integer from 0 to 2^32 - 1; 0 gives the nominal vehicle
 */
export function perturbedPlant(vehicle: Vehicle, seed: number): PlantParameters {
  const nominal = nominalPlant(vehicle);
  if (seed === 0) return nominal;
  const { tolerance, power } = vehicle;
  const random = new Random(seed, STREAM.vehicle);
  const within = (share: number): number => random.uniform(1 - share, 1 + share);
  // The order of the draws is part of what a seed means.
  const topLeftMps = nominal.topLeftMps * within(tolerance.motorGain);
  const topRightMps = nominal.topRightMps * within(tolerance.motorGain);
  const lagS = nominal.lagS * within(tolerance.lag);
  const grip = nominal.grip * within(tolerance.grip);
  const batteryFactor = random.uniform(power.emptyV, power.fullV) / power.nominalV;
  const startLateralM = random.uniform(-START_LATERAL_M, START_LATERAL_M);
  const startHeadingRad = random.uniform(-START_HEADING_RAD, START_HEADING_RAD);
  const spans = nominal.ground.map((ground, i) => (nominal.line[i] ?? ground) - ground);
  const ground = nominal.ground.map(
    (count, i) => count + spans[i]! * random.uniform(-READING_ERROR, READING_ERROR),
  );
  const line = nominal.line.map(
    (count, i) => count + (spans[i] ?? 0) * random.uniform(-READING_ERROR, READING_ERROR),
  );
  return {
    ...nominal,
    seed,
    topLeftMps,
    topRightMps,
    lagS,
    grip,
    batteryFactor,
    startLateralM,
    startHeadingRad,
    ground,
    line,
    noiseShare: READING_NOISE,
  };
}
