/** What proves the arithmetic of duties and of the wheel loop. */
import {
  COEFFICIENT_BITS,
  FULL_DUTY,
  SLOPE_BITS,
  SPEED_BITS,
  WHEEL_GAIN_BITS,
  WHEEL_MODEL_BITS,
} from '../../../src/controller/constants.js';
import { BYTE, COUNT, type Proof, SPEED, WHEELS, after } from './proof.js';

export const DUTY: Record<string, Proof> = {
  '-wheelSpeed': SPEED,
  'size * slope': 'duty product',
  '(size * slope) >> SLOPE_BITS': after('duty product', SLOPE_BITS),
  'startDuty + ((size * slope) >> SLOPE_BITS)': 'duty before its limit',
  '-duty': { scale: FULL_DUTY },
};

export const WHEEL_LOOP: Record<string, Proof> = {
  '1 << constants.windowBits': BYTE,
  'counted - edgesSeen[place]': 'edges in the window before one leaves it',
  'edgeSum += counted - edgesSeen[place]': 'edges in the window',
  'before - speedsWanted[place]': WHEELS,
  'wantedSum += before - speedsWanted[place]': 'wanted speeds in the window',
  'place + 1': BYTE,
  '1 << windowBits': BYTE,
  '(1 << windowBits) - 1': BYTE,
  'model >> (WHEEL_MODEL_BITS - SPEED_BITS)': after('modelled wheel speed', WHEEL_MODEL_BITS - SPEED_BITS),
  'wantedSum >> windowBits': after('wanted speeds in the window', ({ wheelLoop }) => wheelLoop!.windowBits),
  'edgeSum * speedPerEdge': 'edges times speed',
  '(edgeSum * speedPerEdge) >> edgeBits': after('edges times speed', ({ wheelLoop }) => wheelLoop!.edgeBits),
  '-measured': WHEELS,
  'command - before': WHEELS,
  '(command - before) * motorStep': 'change of modelled wheel speed',
  'model += (command - before) * motorStep': 'modelled wheel speed',
  'wanted - measured': 'wheel speed difference',
  '-wheelDead': SPEED,
  'error * proportional': 'difference times proportional gain',
  '(error * proportional) >> WHEEL_GAIN_BITS': after('difference times proportional gain', WHEEL_GAIN_BITS),
  'integral >> COEFFICIENT_BITS': after('held correction', COEFFICIENT_BITS),
  'command + part': 'wheel speed asked for',
  'command + part + held': 'wheel speed asked for',
  'part + held': 'wheel speed asked for',
  'command + clamp(part + held, correctionLimit)': 'wheel speed asked for',
  'error * integral': 'held correction',
  'integral + error * integral': 'held correction',
  'given - asked': 'wheel speed asked for',
  '(given - asked) * tracking': 'held correction',
  'integral + error * integral + (given - asked) * tracking': 'held correction',
  'correctionLimit << COEFFICIENT_BITS': 'held correction',
  '-blockedSpeed': SPEED,
  'still++': COUNT,
};
