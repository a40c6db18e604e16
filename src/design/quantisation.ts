/**
 * What the rounding to the firmware's integers costs: each design constant as wanted and as held.
 *
 * The margins of the design are those of the held values; this says how far they are from the wanted ones.
 */
import {
  CLASS_SPEED_BITS,
  COEFFICIENT_BITS,
  CURVATURE_PER_INV_M,
  FULL_COVERAGE,
  CALIBRATION_BITS,
  SLOPE_BITS,
  SPEED_BITS,
  TRACK_BITS,
  FULL_DUTY,
  fullSpeedMps,
} from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import type { Design } from './design.js';

/** One constant. */
export interface Quantised {
  name: string;
  unit: string;
  wanted: number;
  held: number;
  /** held / wanted - 1. */
  relativeError: number;
}

function quantised(name: string, unit: string, wanted: number, held: number): Quantised {
  return { name, unit, wanted, held, relativeError: wanted === 0 ? 0 : held / wanted - 1 };
}

/** Every rounded constant of a design, in the order of the controller. */
export function quantisedConstants({ vehicle, classes, controller }: Design): Quantised[] {
  const { drive, bar, board } = vehicle;
  const { sensing, drive: held } = controller;
  const rows = gainsOfSensors(bar, sensing.gain);
  const slope = ((1 - drive.startDuty) * FULL_DUTY) / (1 << SPEED_BITS);
  rows.push(
    quantised('half track width', 'm', drive.trackM / 2, held.halfTrack / 2 ** TRACK_BITS),
    quantised('start duty, left', '1', drive.startDuty * drive.trimLeft, held.startDutyLeft / FULL_DUTY),
    quantised('start duty, right', '1', drive.startDuty * drive.trimRight, held.startDutyRight / FULL_DUTY),
    quantised(
      'duty per speed, left',
      '1/4096 per speed unit',
      slope * drive.trimLeft,
      held.slopeLeft / 2 ** SLOPE_BITS,
    ),
    quantised(
      'duty per speed, right',
      '1/4096 per speed unit',
      slope * drive.trimRight,
      held.slopeRight / 2 ** SLOPE_BITS,
    ),
    quantised(
      'motor model step',
      '1',
      -Math.expm1(-board.samplePeriodS / drive.lagS),
      held.motorStep / 2 ** COEFFICIENT_BITS,
    ),
  );
  classes.forEach((each, i) => {
    const integers = controller.classes[i]!;
    rows.push(
      quantised(
        `${each.name}: speed`,
        'm/s',
        each.speedMps,
        (integers.speed / (1 << CLASS_SPEED_BITS)) * fullSpeedMps(controller),
      ),
      quantised(
        `${each.name}: curvature`,
        '1/m',
        1 / each.minRadiusM,
        integers.curvature / CURVATURE_PER_INV_M,
      ),
      quantised(
        `${each.name}: proportional gain`,
        '1/m^2',
        each.wantedGains.proportionalPerM2,
        each.gains.proportionalPerM2,
      ),
      quantised(
        `${each.name}: derivative time`,
        's',
        each.wantedGains.derivativeTimeS,
        each.gains.derivativeTimeS,
      ),
    );
  });
  classes.forEach(({ name, wantedGains, gains }) => {
    const [wanted, held] = [wantedGains.integralDistanceM, gains.integralDistanceM];
    if (wanted !== undefined && held !== undefined)
      rows.push(quantised(`${name}: integral distance`, 'm', wanted, held));
  });
  return rows;
}

function gainsOfSensors(
  { kinds, calibration: { ground, line } }: Vehicle['bar'],
  gain: readonly number[],
): Quantised[] {
  return gain.flatMap((held, i): Quantised[] => {
    if (kinds[i] === 'digital') return [];
    const wanted = FULL_COVERAGE / ((line[i] as number) - (ground[i] as number));
    const name = `sensor ${i + 1}: coverage per count`;
    return [quantised(name, '1/255', wanted, held / 2 ** CALIBRATION_BITS)];
  });
}

/** The constant with the largest relative error. */
export function worstQuantised(rows: readonly Quantised[]): Quantised | undefined {
  return rows.toSorted((a, b) => Math.abs(b.relativeError) - Math.abs(a.relativeError))[0];
}
