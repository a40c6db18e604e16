/** What proves the arithmetic from the readings to the offset, and of a sweep. */
import { CALIBRATION_BITS, EDGE_STEP_BITS, FULL_COVERAGE } from '../../../src/controller/constants.js';
import { BYTE, type Proof, TWO_COVERAGES, after } from './proof.js';

export const CALIBRATION: Record<string, Proof> = {
  'i++': BYTE,
  'riseOf(analog[0]) + riseOf(analog.at(-1))': 'rise of two sensors in a sweep',
  '(most[i]) - (least[i])': 'reading above ground',
  'FULL_COVERAGE << CALIBRATION_BITS': 'full coverage over a span',
  '(FULL_COVERAGE << CALIBRATION_BITS) + span': 'full coverage over a span',
  '(FULL_COVERAGE << CALIBRATION_BITS) + span - 1': 'full coverage over a span',
  '((FULL_COVERAGE << CALIBRATION_BITS) + span - 1) / span': 'calibration gain',
  '-scale': 'calibration gain',
  '(most[i]) + (least[i])': 'rise of two sensors in a sweep',
  '2 * (initial[i])': 'rise of two sensors in a sweep',
  '(most[i]) + (least[i]) - 2 * (initial[i])': 'rise of two sensors in a sweep',
};

const EDGES: Record<string, Proof> = {
  'sum + 1': { scale: 2 * FULL_COVERAGE + 1 },
  'place >> EDGE_STEP_BITS': BYTE,
  '1 << EDGE_STEP_BITS': BYTE,
  '(1 << EDGE_STEP_BITS) - 1': BYTE,
  'index + 1': BYTE,
  '(table[index + 1]) - low': 'step of the edge table',
  '((table[index + 1]) - low) * part': 'part of a step of the edge table',
  '(((table[index + 1]) - low) * part) >> EDGE_STEP_BITS': after(
    'part of a step of the edge table',
    EDGE_STEP_BITS,
  ),
  'low + ((((table[index + 1]) - low) * part) >> EDGE_STEP_BITS)': 'value of the edge table',
  'halfGap * value': 'half gap times edge table',
  '(halfGap * value) >> (EDGE_BITS + GAP_HALF_BITS)': 'edge beside the middle of its gap',
};

export const SENSING: Record<string, Proof> = {
  ...EDGES,
  'i++': BYTE,
  '(counts[i]) - (ground[i])': 'reading above ground',
  '((counts[i]) - (ground[i])) * (gain[i])': 'reading times calibration gain',
  '(((counts[i]) - (ground[i])) * (gain[i])) >> CALIBRATION_BITS': after(
    'reading times calibration gain',
    CALIBRATION_BITS,
  ),
  'total += value': 'sum of coverages',
  'first - 1': BYTE,
  '(coverage[first - 1]) + (coverage[first])': TWO_COVERAGES,
  '(gapMiddle[first]) + edgeShift(constants, gapHalf[first], sum)': 'offset',
  'sensorCount - 1': BYTE,
  'last + 1': BYTE,
  '(coverage[last]) + (coverage[last + 1])': TWO_COVERAGES,
  '(gapMiddle[last + 1]) - edgeShift(constants, gapHalf[last + 1], sum)': 'offset',
  'leftEdge + rightEdge': 'sum of two edges',
  '(leftEdge + rightEdge) >> 1': after('sum of two edges', 1),
  'leftEdge - (gapMiddle[sensorCount])': 'width up to an end of the bar',
  'leftEdge - halfLine': 'offset',
  '(gapMiddle[0]) - rightEdge': 'width up to an end of the bar',
  'rightEdge + halfLine': 'offset',
  'middle - offset': 'way from the offset before',
  'offset - middle': 'way from the offset before',
  'FULL_COVERAGE + left': TWO_COVERAGES,
  '(gapMiddle[0]) - shift': 'offset',
  '(gapMiddle[0]) - shift + halfLine': 'offset',
  'FULL_COVERAGE + right': TWO_COVERAGES,
  '(gapMiddle[sensorCount]) + shift': 'offset',
  '(gapMiddle[sensorCount]) + shift - halfLine': 'offset',
  'i - 1': BYTE,
  'i - first': BYTE,
};
