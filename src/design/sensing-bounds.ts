/** Largest magnitudes from the readings to the offset; see intervals.ts. */
import {
  CALIBRATION_BITS,
  EDGE_BITS,
  EDGE_STEP_BITS,
  FULL_COVERAGE,
  GAP_HALF_BITS,
  type ControllerConstants,
} from '../controller/constants.js';
import { type Bound, largest } from './bound.js';
import { INT16_MAX } from './scales.js';

/** Largest gain, the sheet's or one that a sweep may find. */
function gainBound({ sensing, sweep }: ControllerConstants): number {
  if (sensing.digital) return 0;
  const swept = sweep === undefined ? 0 : Math.ceil((FULL_COVERAGE << CALIBRATION_BITS) / sweep.minSpan);
  return Math.max(largest(sensing.gain), swept);
}

/** What a sweep works out; none without one. */
function sweepBounds({ sweep }: ControllerConstants, adcMaxCount: number): Bound[] {
  if (sweep === undefined) return [];
  return [
    { name: 'rise of two sensors in a sweep', magnitude: 4 * adcMaxCount },
    { name: 'full coverage over a span', magnitude: (FULL_COVERAGE << CALIBRATION_BITS) + adcMaxCount },
  ];
}

/** @param adcMaxCount largest reading, counts */
export function sensingBounds(constants: ControllerConstants, adcMaxCount: number): Bound[] {
  const { sensing } = constants;
  const gain = gainBound(constants);
  const counts = sensing.digital ? 1 : adcMaxCount;
  const table = largest(sensing.edgeTable);
  const steps = sensing.edgeTable.slice(1).map((value, i) => value - (sensing.edgeTable[i] as number));
  const products = largest(sensing.gapHalf) * table;
  const shift = products / 2 ** (EDGE_BITS + GAP_HALF_BITS);
  const edge = Math.ceil(largest(sensing.gapMiddle) + shift);
  const offset = edge + sensing.halfLine;
  return [
    { name: 'reading above ground', magnitude: counts, limit: INT16_MAX },
    { name: 'calibration gain', magnitude: gain, limit: INT16_MAX },
    { name: 'reading times calibration gain', magnitude: counts * gain },
    { name: 'coverage before its limits', magnitude: (counts * gain) >> CALIBRATION_BITS, limit: INT16_MAX },
    { name: 'half gap', magnitude: largest(sensing.gapHalf), limit: INT16_MAX },
    { name: 'value of the edge table', magnitude: table, limit: INT16_MAX },
    { name: 'step of the edge table', magnitude: largest(steps), limit: INT16_MAX },
    { name: 'part of a step of the edge table', magnitude: largest(steps) * (2 ** EDGE_STEP_BITS - 1) },
    { name: 'half gap times edge table', magnitude: products },
    { name: 'edge beside the middle of its gap', magnitude: Math.ceil(shift), limit: INT16_MAX },
    { name: 'offset', magnitude: offset, limit: INT16_MAX },
    { name: 'sum of two edges', magnitude: 2 * edge },
    { name: 'width up to an end of the bar', magnitude: 2 * edge },
    { name: 'way from the offset before', magnitude: 2 * offset },
    { name: 'sum of coverages', magnitude: sensing.sensorCount * FULL_COVERAGE, limit: INT16_MAX },
    ...sweepBounds(constants, adcMaxCount),
  ];
}
