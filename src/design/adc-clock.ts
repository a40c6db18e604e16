/**
 * The converter's clock: as fast as the resolution that the design needs allows.
 *
 * While an edge of the line crosses a spot, the reading runs through its span: an error of e counts shifts the edge by 2 r e / span, r
 * being the spot's radius. Half of the offset's uncertainty that the steering is designed for may come from the converter (our
 * assumption); the sensors take the rest. Where no clock is that good, the best one is taken that leaves the sample its time.
 */
import type { AdcClock } from '../vehicle/board-facts.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { offsetNoiseM } from './offset-noise.js';

const CONVERTER_SHARE = 0.5;
/** Share of a sample that scanning and computing may take. */
const BUSY_SHARE = 0.6;

export interface ChosenClock extends AdcClock {
  /** Largest error that the design allows, counts. */
  allowedCounts: number;
}

/** The clock for a vehicle; undefined without a choice: digital sensors, or a board whose language reads the converter. */
export function adcClockOf(vehicle: Vehicle): ChosenClock | undefined {
  const { bar, board } = vehicle;
  const { ground, line } = bar.calibration;
  const spans = bar.kinds.flatMap((kind, i) => (kind === 'analog' ? [Math.abs(line[i]! - ground[i]!)] : []));
  if (board.adcClocks === undefined || spans.length === 0) return undefined;
  const allowedM = CONVERTER_SHARE * offsetNoiseM(vehicle);
  const allowedCounts = (allowedM * Math.min(...spans)) / (2 * bar.spotRadiusM);
  const inTime = board.adcClocks.filter(
    ({ readS }, i) => i === 0 || spans.length * readS + board.computeS <= BUSY_SHARE * board.samplePeriodS,
  );
  const chosen = inTime.find(({ errorCounts }) => errorCounts <= allowedCounts) ?? inTime.at(-1)!;
  return { ...chosen, allowedCounts };
}

/** The choice in words: "500 kHz, good to 2.9 counts where 13.4 are allowed". */
export function adcClockWords({ clockHz, errorCounts, allowedCounts }: ChosenClock): string {
  const good = `good to ${errorCounts.toFixed(1)} counts`;
  const how =
    errorCounts <= allowedCounts
      ? `where ${allowedCounts.toFixed(1)} are allowed`
      : `the best there is time for; ${allowedCounts.toFixed(1)} would be wanted`;
  return `${clockHz / 1000} kHz, ${good}, ${how}`;
}
