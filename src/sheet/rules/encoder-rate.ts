import { edgesPerM } from '../../vehicle/encoder.js';
import { topSpeedMps } from '../top-speed.js';
import { mmToM } from '../units.js';
import { withUnit } from '../words.js';
import type { SheetRule } from './rule.js';

/** Share of the processor that counting edges may take at full speed on both wheels. */
const LARGEST_SHARE = 0.2;

/** Edges a second and wheel at full speed below which the loop would only learn of a change after the bend. */
const LEAST_EDGES_PER_S = 60;

export const rule: SheetRule = {
  name: 'encoder-rate',
  level: 'problem',
  why: 'Each edge interrupts the program: too many leave the control loop no time, too few tell a speed too late.',
  check({ sheet, board }) {
    const { encoders, drive } = sheet;
    if (encoders === undefined) return [];
    const perM = edgesPerM(encoders.linesPerTurn, mmToM(drive.wheelDiameterMm));
    const rate = 2 * perM * topSpeedMps(sheet);
    if (rate < 2 * LEAST_EDGES_PER_S) {
      const least = Math.ceil((2 * LEAST_EDGES_PER_S * encoders.linesPerTurn) / rate);
      return [
        {
          pointer: '/encoders/linesPerTurn',
          message: `At full speed each wheel gives ${(rate / 2).toFixed(1)} edges a second; below ${LEAST_EDGES_PER_S} a speed cannot be told in time.`,
          got: withUnit(encoders.linesPerTurn, '1'),
          allowed: `at least ${least}`,
          fix: `Take a disc with at least ${least} lines in a turn of the wheel, or an encoder on the motor shaft.`,
        },
      ];
    }
    const largest = LARGEST_SHARE / board.edgeS;
    if (rate <= largest) return [];
    const most = Math.floor((encoders.linesPerTurn * largest) / rate);
    const fewer = most >= 4 ? `Take at most ${most} lines a turn` : 'Take slower motors';
    return [
      {
        pointer: '/encoders/linesPerTurn',
        message: `At full speed both wheels give ${Math.round(rate)} edges a second; ${board.title} can count ${Math.round(largest)} beside its other work.`,
        got: withUnit(encoders.linesPerTurn, '1'),
        allowed: `at most ${Math.max(most, 0)}`,
        fix: `${fewer}, an encoder on a slower shaft, or a quicker board.`,
      },
    ];
  },
};
