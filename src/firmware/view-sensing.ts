/** Constants of the sensor bar, with their comments. */
import { FULL_COVERAGE, OFFSET_PER_M, type SensingConstants } from '../controller/constants.js';
import { edgeShift } from '../controller/sensing.js';
import { mToMm } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { numberText } from './literals.js';
import { type Constant, constant, table } from './constant.js';
import type { Features } from './features.js';

const mm = (units: number) => numberText(mToMm(units / OFFSET_PER_M));
const coveragePercent = (coverage: number) => numberText((100 * coverage) / FULL_COVERAGE, 3);

/** With sensors that are on or off, an edge lies half way between two of them; the table must say so too. */
function checkEdgeOfBinary(sensing: SensingConstants): void {
  if (edgeShift(sensing, sensing.gapHalf[0]!, FULL_COVERAGE) !== 0)
    throw new Error('The edge table does not put an edge of on-off sensors half way between them.');
}

function calibration(sensing: SensingConstants): Constant[] {
  return [
    table(
      'GROUND_COUNTS',
      'int16_t',
      sensing.ground,
      'Reading of each sensor over ground, counts. From sensors.calibration.ground.',
    ),
    table(
      'COVERAGE_255THS_PER_COUNT_Q12',
      'int16_t',
      sensing.gain,
      'Share of a sensor on the line for each count above ground; negative where the line reads lower. From sensors.calibration.',
    ),
  ];
}

/** What makes digital sensors fit among analog ones. */
function mixedConstants({ board }: Vehicle, { levels }: SensingConstants, features: Features): Constant[] {
  const constants = [
    constant(
      'LEVEL_COUNTS',
      'int16_t',
      board.adcMaxCount,
      'Reading that stands for a digital sensor over the line: as the converter would read a full voltage; 0 over ground. From target.board.',
    ),
  ];
  if (!features.sweep) return constants;
  const about = (end: string) => `The ${end} analog sensor, from 0. From sensors.kinds.`;
  return [
    ...constants,
    constant('FIRST_ANALOG_INDEX', 'uint8_t', levels.indexOf(false), about('leftmost')),
    constant('LAST_ANALOG_INDEX', 'uint8_t', levels.lastIndexOf(false), about('rightmost')),
    table(
      'LEVEL_FLAGS',
      'uint8_t',
      levels.map(Number),
      'Digital sensors, 1, and analog ones, 0. From sensors.kinds.',
    ),
  ];
}

function edges(sensing: SensingConstants): Constant[] {
  return [
    table(
      'GAP_HALF_MM_Q9',
      'int16_t',
      sensing.gapHalf,
      'Half the way between neighbouring sensors, same places. From sensors.pitchMm or positionsMm.',
    ),
    table(
      'EDGE_TABLE_Q12',
      'int16_t',
      sensing.edgeTable,
      'Where an edge of the line lies between two sensors, by the sum of their coverages; the spots are discs. From sensors.spotRadiusMm and pitchMm.',
    ),
  ];
}

export function sensingConstants(
  vehicle: Vehicle,
  sensing: SensingConstants,
  features: Features,
): Constant[] {
  if (features.binary) checkEdgeOfBinary(sensing);
  const constants = [
    constant('SENSOR_COUNT', 'uint8_t', sensing.sensorCount, 'Sensors of the bar. From sensors.count.'),
  ];
  if (features.digital || features.mixed) {
    const level = sensing.lineLevelHigh ? 1 : 0;
    constants.push(
      constant(
        'LINE_LEVEL',
        'uint8_t',
        level,
        `Level of a sensor's pin over the line: ${sensing.lineLevelHigh ? 'high' : 'low'}. From sensors.lineLevel.`,
      ),
    );
  }
  if (features.mixed) constants.push(...mixedConstants(vehicle, sensing, features));
  if (features.stored) constants.push(...calibration(sensing));
  constants.push(
    table(
      'GAP_MIDDLE_MM_Q6',
      'int16_t',
      sensing.gapMiddle,
      'Half way between neighbouring sensors, from the left, with one place beyond each end; mm left of the centre line. From sensors.pitchMm or positionsMm.',
    ),
  );
  if (features.graded) constants.push(...edges(sensing));
  if (features.analog)
    constants.push(
      constant(
        'HIGH_COVERAGE_255THS',
        'uint8_t',
        sensing.highCoverage,
        `Coverage from which a sensor counts as on the line: ${coveragePercent(sensing.highCoverage)} %. From line.widthMm, sensors.pitchMm and spotRadiusMm.`,
      ),
    );
  if (features.graded)
    constants.push(
      constant(
        'LOW_COVERAGE_255THS',
        'uint8_t',
        sensing.lowCoverage,
        `Coverage of an end sensor from which a line just outside the bar is still measured: ${coveragePercent(sensing.lowCoverage)} %.`,
      ),
    );
  constants.push(
    constant(
      'HALF_LINE_MM_Q6',
      'int16_t',
      sensing.halfLine,
      `Half the width of the line: ${numberText(mToMm(vehicle.line.widthM / 2))} mm. From line.widthMm.`,
    ),
    constant(
      'CORNER_WIDTH_MM_Q6',
      'int16_t',
      sensing.cornerWidth,
      `Width of line reaching an end of the bar from which it is taken for a corner: ${mm(sensing.cornerWidth)} mm. From line.widthMm and tightestRadiusMm.`,
    ),
  );
  if (features.crossings)
    constants.push(
      constant(
        'WIDE_COVERAGE_255THS',
        'int16_t',
        sensing.wideCoverage,
        `Sum of coverages from which the bar lies on a crossing: ${numberText(sensing.wideCoverage / FULL_COVERAGE)} sensors. From line.widthMm and sensors.pitchMm.`,
      ),
    );
  return constants;
}
