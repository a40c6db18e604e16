/**
 * Which bound of the interval analysis (src/design/intervals.ts) proves each piece of the twin's arithmetic. A piece that is written
 * anew has to be entered here with what proves it, or the test fails.
 *
 * A shift to the right is proven by what it shifts: `>>` gives the bound and how far. What is not of the sheet's making is proven by its
 * scale: places in a table and counts of sensors fit a byte.
 */
import {
  type ControllerConstants,
  CLASS_SPEED_BITS,
  COEFFICIENT_BITS,
  CURVATURE_BITS,
  FRACTION_BITS,
  INTEGRAL_BITS,
  INTEGRAL_SPEED_BITS,
  RULE_CURVATURE_BITS,
  SPEED_BITS,
  SPEED_MODEL_BITS,
  TRACK_BITS,
} from '../../../src/controller/constants.js';
import { INT16_MAX } from '../../../src/design/scales.js';
import { BYTE, COUNT, type Proof, WHEELS, after } from './proof.js';
import { CALIBRATION, SENSING } from './sensing-sites.js';
import { DUTY, WHEEL_LOOP } from './wheel-sites.js';

const gainBits = (constants: ControllerConstants) => constants.steering.gainBits;

const MEMORY: Record<string, Proof> = {
  'corner -= speed': 'distance',
  'travelled += speed': ['distance', 'search distance'],
  'searched++': COUNT,
  '-sideOffset': 'offset',
};

const RULES: Record<string, Proof> = {
  '(rules.right[index]) - (rules.left[index])': 'difference of a rule',
  'difference * rules.curvatureFactor': 'curvature of the rule table',
  '(difference * rules.curvatureFactor) >> RULE_CURVATURE_BITS': after(
    'curvature of the rule table',
    RULE_CURVATURE_BITS,
  ),
  '(rules.left[index]) + (rules.right[index])': 'sum of a rule',
  'speed * sum': 'speed times rule',
  '(speed * sum) >> (FRACTION_BITS + 1)': after('speed times rule', FRACTION_BITS + 1),
};

const RUN_INDEX: Record<string, Proof> = {
  'first * sensorCount': BYTE,
  'first - 1': BYTE,
  'first * (first - 1)': BYTE,
  '(first * (first - 1)) >> 1': BYTE,
  'first * sensorCount - ((first * (first - 1)) >> 1)': BYTE,
  'last - first': BYTE,
  'first * sensorCount - ((first * (first - 1)) >> 1) + (last - first)': BYTE,
};

const LAW: Record<string, Proof> = {
  'input << FILTER_BITS': 'filtered input',
  '(input << FILTER_BITS) - filtered': 'filtered input',
  'change * gains.derivativeFilter': 'filter product',
  '(change * gains.derivativeFilter) >> COEFFICIENT_BITS': after('filter product', COEFFICIENT_BITS),
  'filtered += (change * gains.derivativeFilter) >> COEFFICIENT_BITS': 'filtered input',
  'input * gains.proportional': 'proportional and derivative sum',
  'change * gains.derivative': 'proportional and derivative sum',
  'input * gains.proportional + change * gains.derivative': 'proportional and derivative sum',
  '(input * gains.proportional + change * gains.derivative) >> steering.gainBits': after(
    'proportional and derivative sum',
    gainBits,
  ),
  'integral >> INTEGRAL_BITS': after('integral part before its limit', INTEGRAL_BITS),
  'sum + (integral >> INTEGRAL_BITS)': 'curvature asked for',
  'speed * (gains.integral ?? 0)': 'speed times integral gain',
  '(speed * (gains.integral ?? 0)) >> INTEGRAL_SPEED_BITS': after(
    'speed times integral gain',
    INTEGRAL_SPEED_BITS,
  ),
  'curvature - asked': 'curvature cut off',
  '-integral.limit': 'curvature',
  'input * gain': 'offset times integral gain',
  '(input * gain) >> integral.gainBits': after(
    'offset times integral gain',
    ({ integral }) => integral!.gainBits,
  ),
  'integral += (input * gain) >> integral.gainBits': 'integral part with an offset',
  'clamp(beyond, LARGEST_CURVATURE) * integral.tracking': 'integral part before its limit',
  'integral += clamp(beyond, LARGEST_CURVATURE) * integral.tracking': 'integral part before its limit',
  'integral.limit << INTEGRAL_BITS': 'integral part with an offset',
};

const TWIN: Record<string, Proof> = {
  'speed >> (SPEED_MODEL_BITS - SPEED_BITS)': after('modelled speed', SPEED_MODEL_BITS - SPEED_BITS),
  'memory.side * constants.steering.searchCurvature': 'curvature',
  'held >> COEFFICIENT_BITS': after('filtered curvature', COEFFICIENT_BITS),
  'curvature - (held >> COEFFICIENT_BITS)': 'change of curvature',
  '(curvature - (held >> COEFFICIENT_BITS)) * steering.holdFilter': 'filter product',
  'held += (curvature - (held >> COEFFICIENT_BITS)) * steering.holdFilter': 'filtered curvature',
  '-curvature': 'curvature',
  'demand >> COEFFICIENT_BITS': after('filtered curvature', COEFFICIENT_BITS),
  'size - (demand >> COEFFICIENT_BITS)': 'change of curvature',
  '(size - (demand >> COEFFICIENT_BITS)) * steering.demandFilter': 'filter product',
  'demand += (size - (demand >> COEFFICIENT_BITS)) * steering.demandFilter': 'filtered curvature',
  'classes.length - 1': BYTE,
  'release -= wholeSpeed': 'distance',
  'index++': BYTE,
  'curvature - bend': 'curvature',
  '(curvature - bend) * speedSlope': 'speed slope product',
  '((curvature - bend) * speedSlope) >> drive.slopeBits': after(
    'speed slope product',
    ({ drive }) => drive.slopeBits,
  ),
  'speed + (((curvature - bend) * speedSlope) >> drive.slopeBits)':
    'speed of a class with what its slope gains',
  'speed >> (SPEED_MODEL_BITS - CLASS_SPEED_BITS)': after(
    'modelled speed',
    SPEED_MODEL_BITS - CLASS_SPEED_BITS,
  ),
  'targetSpeed() - (speed >> (SPEED_MODEL_BITS - CLASS_SPEED_BITS))': 'lead before its limits',
  '-drive.leadDown': 'lead',
  'speed + lead': 'wheel speed before its limits',
  'curvature * drive.halfTrack': 'curvature times half track',
  '(curvature * drive.halfTrack) >> CURVATURE_BITS': after('curvature times half track', CURVATURE_BITS),
  'speed * perSpeed': 'speed times turn',
  '(speed * perSpeed) >> TRACK_BITS': after('speed times turn', TRACK_BITS),
  'base - half': 'wheel speed before its limits',
  'base + half': 'wheel speed before its limits',
  'outer - FULL_SPEED': 'wheel speed before its limits',
  'left -= outer - FULL_SPEED': 'inner wheel behind the outer one',
  'right -= outer - FULL_SPEED': 'inner wheel behind the outer one',
  'left + right': WHEELS,
  '2 * speed': WHEELS,
  'left + right - 2 * speed': 'change of speed',
  '(left + right - 2 * speed) * drive.motorStep': 'change of speed times motor step',
  'speed += (left + right - 2 * speed) * drive.motorStep': 'modelled speed',
};

/** Sums of scales alone, and the constants of the design that leave the arithmetic alone. */
const FIXED: Record<string, Proof> = {
  'clamp.ts: -limit': [INT16_MAX, 'integral part before its limit', 'held correction'],
  'constants.ts: drive.fullSpeedUmS / 1e6': { scale: Infinity },
  'rule-action.ts: FRACTION_BITS + 1': BYTE,
  'rule-action.ts: 2 * FULL_SPEED': WHEELS,
  'scales.ts: 1 << CURVATURE_BITS': COUNT,
  'scales.ts: 1 << SPEED_BITS': COUNT,
  'scales.ts: (1 << SPEED_BITS) - 1': COUNT,
  'sensing.ts: EDGE_BITS + GAP_HALF_BITS': BYTE,
  'twin.ts: SPEED_MODEL_BITS - SPEED_BITS': BYTE,
  'twin.ts: SPEED_MODEL_BITS - CLASS_SPEED_BITS': BYTE,
  'wheel-loop.ts: WHEEL_MODEL_BITS - SPEED_BITS': BYTE,
  'wheel-loop.ts: 2 * FULL_SPEED': WHEELS,
};

const inFile = (file: string, proofs: Record<string, Proof>): [string, Proof][] =>
  Object.entries(proofs).map(([text, proof]) => [`${file}: ${text}`, proof]);

export const SITE_BOUNDS: ReadonlyMap<string, Proof> = new Map([
  ...inFile('calibration.ts', CALIBRATION),
  ...inFile('line-memory.ts', MEMORY),
  ...inFile('rule-action.ts', RULES),
  ...inFile('run-index.ts', RUN_INDEX),
  ...inFile('sensing.ts', SENSING),
  ...inFile('steering-law.ts', LAW),
  ...inFile('twin.ts', TWIN),
  ...inFile('wheel-duty.ts', DUTY),
  ...inFile('wheel-loop.ts', WHEEL_LOOP),
  ...Object.entries(FIXED),
]);
