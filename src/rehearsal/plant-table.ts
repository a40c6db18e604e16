/**
 * What differs from vehicle to vehicle and from run to run: one row a figure, with its range and where that comes from.
 *
 * Each row has its own stream of random numbers, by its place; a new one goes to the end, so that a seed keeps what it meant before. The ranges of the
 * sheet are its tolerances and its battery; all others are common practice: what hobby-class motors, bars and floors do.
 */
import { degToRad, mmToM } from '../sheet/units.js';
import { STANDARD_GRAVITY_MPS2 } from '../vehicle/gravity.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import type { PlantParameters } from './plant-parameters.js';

/** Standard deviation of readings, share of full scale: 3 counts of 1023. */
export const READING_NOISE = 0.003;
/** Largest error of a reading over ground or line, share of their difference. */
export const READING_ERROR = 0.03;
export const START_LATERAL_M = mmToM(5);
export const START_HEADING_RAD = degToRad(3);
/** Time in which a motor warms up, s: windings of small motors take some ten seconds, the case minutes. */
export const WARM_UP_S = 40;
/** Distance from one bright stretch of floor to the next, m: windows and lamps. */
export const LIGHT_PERIOD_M = 2;
/** Distance from one worn stretch of line to the next, and how much of it is worn. */
export const WEAR_PERIOD_M = 0.7;
export const WEAR_LENGTH_SHARE = 1 / 3;

type Keys<Value> = {
  [Key in keyof PlantParameters]: PlantParameters[Key] extends Value ? Key : never;
}[keyof PlantParameters];
type NumberKey = Exclude<Keys<number>, 'seed'>;

interface Described {
  title: string;
  /** Unit of the range as drawn; of a share it is "1". */
  unit: string;
  low: number;
  high: number;
  source: string;
}

/** A range: of a factor on the nominal figure, of the figure itself, or of what each sensor's reading is off by, share of its span. */
export type Spread = Described &
  (
    | { by: 'factor'; key: NumberKey }
    | { by: 'value'; key: NumberKey }
    | { by: 'sensor'; key: 'ground' | 'line' }
  );

const COMMON = 'common practice';

/** All rows for a vehicle, in the order in which they are drawn. */
export function spreads(vehicle: Vehicle): Spread[] {
  const { tolerance, power, drive } = vehicle;
  const weightN = drive.massKg * STANDARD_GRAVITY_MPS2;
  const factor = (key: NumberKey, title: string, half: number, source: string): Spread => {
    return { by: 'factor', key, title, unit: '1', low: 1 - half, high: 1 + half, source };
  };
  const value = (
    key: NumberKey,
    title: string,
    unit: string,
    [low, high]: readonly [number, number],
    source = COMMON,
  ): Spread => ({ by: 'value', key, title, unit, low, high, source });
  const either = (size: number) => [-size, size] as const;
  const reading = (key: 'ground' | 'line'): Spread => {
    const title = `reading over ${key}, each sensor, of the difference`;
    const range = { low: -READING_ERROR, high: READING_ERROR };
    return { by: 'sensor', key, title, unit: '1', ...range, source: COMMON };
  };
  const gain = '/tolerances/motorGainPercent';
  const battery = [power.emptyV / power.nominalV, power.fullV / power.nominalV] as const;
  const phase = [0, 2 * Math.PI] as const;
  return [
    factor('topLeftMps', 'speed of the left motor', tolerance.motorGain, gain),
    factor('topRightMps', 'speed of the right motor', tolerance.motorGain, gain),
    factor('lagS', 'time constant of both motors', tolerance.lag, '/tolerances/timeConstantPercent'),
    factor('grip', 'grip', tolerance.grip, '/tolerances/gripPercent'),
    value('batteryFactor', 'battery without load, of nominal', '1', battery, '/power/emptyV to fullV'),
    value('startLateralM', 'start beside the line', 'm', either(START_LATERAL_M)),
    value('startHeadingRad', 'start across the line', 'rad', either(START_HEADING_RAD)),
    reading('ground'),
    reading('line'),
    factor('frictionLeft', 'friction of the left wheel', 0.15, COMMON),
    factor('frictionRight', 'friction of the right wheel', 0.15, COMMON),
    value('stiction', 'friction standing over turning', '1', [1, 1.3]),
    value('driftLeft', 'speed change of the left motor when warm', '1', either(0.02)),
    value('driftRight', 'speed change of the right motor when warm', '1', either(0.02)),
    factor('batteryResistanceRatio', 'resistance of battery and wiring', 0.5, COMMON),
    value('castorDrag', 'drag of the castor, of one wheel stalled', '1', [
      0,
      (CASTOR_DRAG_OF_WEIGHT * weightN) / stallForceN(vehicle),
    ]),
    factor('spotRadiusM', 'spot of a sensor (height of the bar)', 0.1, COMMON),
    value('contrast', 'contrast (height of the bar)', '1', [0.93, 1.03]),
    value('lightShare', 'ambient light over the floor, of the difference', '1', [0, 0.03]),
    value('lightPhaseRad', 'place of the light', 'rad', phase),
    value('wearShare', 'contrast lost on worn line', '1', [0, 0.15]),
    value('wearPhaseRad', 'place of the wear', 'rad', phase),
    value('loopJitterS', 'jitter of the loop', 's', [0, 50e-6]),
    value('bumpEveryM', 'distance between joints of the floor', 'm', [2, 8]),
    value('bumpLateralM', 'sideways shift by a joint', 'm', either(mmToM(2))),
    value('bumpHeadingRad', 'turn by a joint', 'rad', either(degToRad(1))),
  ];
}

/** Largest drag of a castor beyond what the start duty holds, share of the vehicle's weight. */
const CASTOR_DRAG_OF_WEIGHT = 0.03;

/** Force of one stalled wheel at nominal voltage, N: power of the motor constant, F = (V/top) (V/R). */
export function stallForceN({ power, drive }: Vehicle): number {
  return (power.nominalV / drive.topSpeedMps) * (power.nominalV / drive.windingOhm);
}
