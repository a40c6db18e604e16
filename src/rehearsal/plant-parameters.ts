/**
 * What the simulated vehicle is made of: the sheet's vehicle as it stands, or one drawn from its tolerances.
 *
 * plant-table.ts lists what differs from vehicle to vehicle: each figure uniform in its range and independent of the others,
 * beside normal noise on every reading. The seed alone repeats a vehicle. Seed 0 is the sheet's own: nothing perturbed, no noise.
 */
import type { Vehicle } from '../vehicle/vehicle.js';
import { READING_NOISE, spreads } from './plant-table.js';
import { Random } from './random.js';

/** Streams of random numbers that belong to one seed; those of the vehicle, one for each row of its table, come last. */
export const STREAM = { noise: 2, jitter: 3, faults: 4, vehicle: 16 } as const;

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
  /** Share by which each motor's speed has changed when it is warm. */
  driftLeft: number;
  driftRight: number;
  /** Time constant of both motors, s. */
  lagS: number;
  /** Duty at which the wheels begin to turn at nominal battery voltage, 0..1. */
  startDuty: number;
  /** Friction of each wheel over that of the start duty. */
  frictionLeft: number;
  frictionRight: number;
  /** Friction of a standing wheel over that of a turning one, 1 or more. */
  stiction: number;
  /** Drag of the castor over the force of one stalled wheel at nominal voltage. */
  castorDrag: number;
  /** Nominal battery voltage, V. */
  nominalV: number;
  /** Battery voltage without load over nominal. */
  batteryFactor: number;
  /** Resistance of battery and wiring over that of one motor's winding. */
  batteryResistanceRatio: number;
  /** Friction coefficient. */
  grip: number;
  /** Distance from axle to bar, m. */
  aheadM: number;
  /** Sensor positions left of the centre line, m; leftmost first. */
  positionsM: readonly number[];
  spotRadiusM: number;
  /** Kind of each sensor, leftmost first. */
  kinds: readonly ('analog' | 'digital')[];
  /** Digital: level of the pin over the line. */
  lineLevel: 'high' | 'low';
  /** Analog: readings over ground and line, counts. */
  ground: readonly number[];
  line: readonly number[];
  /** Difference of line and ground, all sensors alike, over that of their readings. */
  contrast: number;
  /** Ambient light: its amplitude over the floor, share of the difference of line and ground; and where on the floor it begins, rad. */
  lightShare: number;
  lightPhaseRad: number;
  /** Worn or soiled stretches of line: share of the contrast that they lack; and where along the lane they begin, rad. */
  wearShare: number;
  wearPhaseRad: number;
  /** Largest reading, counts. */
  adcMaxCount: number;
  /** Standard deviation of a reading: share of full scale; digital: of the spot. */
  noiseShare: number;
  /** The controller's delay varies by up to this from sample to sample, s. */
  loopJitterS: number;
  /** Where the axle's middle starts beside the lane, m, positive left. */
  startLateralM: number;
  /** Heading at the start against the lane's, rad. */
  startHeadingRad: number;
  /** Distance from one joint in the floor to the next, m; 0 for none. */
  bumpEveryM: number;
  /** How a joint shifts the vehicle, m, positive left, and turns it, rad. */
  bumpLateralM: number;
  bumpHeadingRad: number;
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
    driftLeft: 0,
    driftRight: 0,
    lagS: drive.lagS,
    startDuty: drive.startDuty,
    frictionLeft: 1,
    frictionRight: 1,
    stiction: 1,
    castorDrag: 0,
    nominalV: vehicle.power.nominalV,
    batteryFactor: 1,
    batteryResistanceRatio: batteryOhm(vehicle) / drive.windingOhm,
    grip: drive.grip,
    aheadM: bar.aheadM,
    positionsM: bar.positionsM,
    spotRadiusM: bar.spotRadiusM,
    kinds: bar.kinds,
    lineLevel: bar.lineLevel,
    ground: bar.calibration.ground,
    line: bar.calibration.line,
    contrast: 1,
    lightShare: 0,
    lightPhaseRad: 0,
    wearShare: 0,
    wearPhaseRad: 0,
    adcMaxCount: vehicle.board.adcMaxCount,
    noiseShare: 0,
    loopJitterS: 0,
    startLateralM: 0,
    startHeadingRad: 0,
    bumpEveryM: 0,
    bumpLateralM: 0,
    bumpHeadingRad: 0,
  };
}

/** Resistance of rechargeable cells for each volt of theirs, ohm/V: 25 mohm a cell of 1.2 V (common practice, 15 to 40). */
const CELL_OHM_PER_V = 0.021;
/** Resistance of wires, switch and contacts, ohm (common practice). */
const WIRING_OHM = 0.05;

/** Resistance behind the motor driver where none was measured, ohm. */
export function batteryOhm(vehicle: Vehicle): number {
  return CELL_OHM_PER_V * vehicle.power.nominalV + WIRING_OHM;
}

/**
 * A vehicle drawn from the sheet's tolerances.
 *
 * @param seed integer from 0 to 2^32 - 1; 0 gives the nominal vehicle
 */
export function perturbedPlant(vehicle: Vehicle, seed: number): PlantParameters {
  return drawnPlant(nominalPlant(vehicle), vehicle, seed);
}

/** The same from a given nominal vehicle. */
export function drawnPlant(nominal: PlantParameters, vehicle: Vehicle, seed: number): PlantParameters {
  if (seed === 0) return nominal;
  const plant = { ...nominal };
  const spans = plant.ground.map((ground, i) => (plant.line[i] ?? ground) - ground);
  // each row has a stream of its own: a seed means the same vehicle also with more sensors, or after a row was added
  for (const [row, spread] of spreads(vehicle).entries()) {
    const random = new Random(seed, STREAM.vehicle + row);
    if (spread.by === 'sensor') {
      plant[spread.key] = plant[spread.key].map(
        (count, i) => count + spans[i]! * random.uniform(spread.low, spread.high),
      );
    } else if (spread.by === 'factor') plant[spread.key] *= random.uniform(spread.low, spread.high);
    else plant[spread.key] = random.uniform(spread.low, spread.high);
  }
  return { ...plant, seed, noiseShare: READING_NOISE };
}
