/** The integers with which the firmware turns readings into the line's offset. */
import {
  CALIBRATION_BITS,
  FULL_COVERAGE,
  GAP_HALF_BITS,
  OFFSET_PER_M,
  type SensingConstants,
} from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { highCoverage, meanPitchM } from './bar-view.js';
import { edgeTable } from './edge-table.js';

/** Share of a spot's coverage from which an end sensor alone places a line just outside the bar. */
const LOW_COVERAGE_SHARE = 0.15;
/** Steepest angle at which the line passes under the bar and is still a line, rad. */
const STEEPEST_LINE_RAD = Math.PI / 3;

const offsetUnits = (m: number) => Math.round(m * OFFSET_PER_M);

/** Apparent width, m, of the line where it passes under the bar in the tightest bend. */
function steepestWidthM(vehicle: Vehicle): number {
  const sine = Math.min(1, vehicle.bar.aheadM / vehicle.line.tightestRadiusM);
  const angle = Math.min(Math.asin(sine), STEEPEST_LINE_RAD);
  return vehicle.line.widthM / Math.cos(angle);
}

/** Sum of coverages from which the bar lies on a crossing; out of reach where there are none. */
function wideCoverage(vehicle: Vehicle): number {
  const count = vehicle.bar.positionsM.length;
  const unreachable = count * FULL_COVERAGE + 1;
  if (!vehicle.line.crossings) return unreachable;
  const pitch = meanPitchM(vehicle.bar.positionsM);
  const sensors = steepestWidthM(vehicle) / pitch + 1;
  // a bar that a line alone can fill cannot tell a crossing
  if (sensors > count) return unreachable;
  return Math.round(FULL_COVERAGE * Math.min(count - 0.25, sensors));
}

export function sensingConstants(vehicle: Vehicle): SensingConstants {
  const { positionsM, spotRadiusM, kind, kinds, lineLevel, calibration } = vehicle.bar;
  const count = positionsM.length;
  const pitch = meanPitchM(positionsM);
  const middles: number[] = [];
  const halves: number[] = [];
  for (let i = 0; i <= count; i++) {
    const left = i > 0 ? (positionsM[i - 1] as number) : (positionsM[0] as number) + pitch;
    const right = i < count ? (positionsM[i] as number) : (positionsM[count - 1] as number) - pitch;
    middles.push(offsetUnits((left + right) / 2));
    halves.push(Math.round(((left - right) / 2) * OFFSET_PER_M * (1 << GAP_HALF_BITS)));
  }
  const spans = calibration.ground.map((ground, i) => (calibration.line[i] as number) - ground);
  return {
    sensorCount: count,
    digital: kind === 'digital',
    levels: kinds.map((each) => each === 'digital'),
    lineLevelHigh: lineLevel === 'high',
    ground: calibration.ground,
    gain: spans.map((span, i) => {
      const gain = (FULL_COVERAGE << CALIBRATION_BITS) / span;
      // a level over the line is a full coverage, no less
      return kinds[i] === 'digital' ? Math.ceil(gain) : Math.round(gain);
    }),
    gapMiddle: middles,
    gapHalf: halves,
    edgeTable: edgeTable(spotRadiusM, pitch),
    highCoverage: highCoverage(vehicle),
    lowCoverage: Math.min(highCoverage(vehicle), Math.round(LOW_COVERAGE_SHARE * FULL_COVERAGE)),
    halfLine: offsetUnits(vehicle.line.widthM / 2),
    wideCoverage: wideCoverage(vehicle),
    cornerWidth: offsetUnits(steepestWidthM(vehicle) + pitch),
  };
}
