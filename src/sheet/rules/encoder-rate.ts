import { edgesPerS } from '../../vehicle/encoder.js';
import { topSpeedMps } from '../top-speed.js';
import { mmToM } from '../units.js';
import { withUnit } from '../words.js';
import type { SheetRule } from './rule.js';

/** Share of the processor that counting edges may take at full speed on both wheels. */
const LARGEST_SHARE = 0.2;

export const rule: SheetRule = {
  name: 'encoder-rate',
  level: 'problem',
  why: 'Each edge interrupts the program; too many leave the control loop no time.',
  check({ sheet, board }) {
    const { encoders, drive } = sheet;
    if (encoders === undefined) return [];
    const rate = 2 * edgesPerS(encoders.linesPerTurn, mmToM(drive.wheelDiameterMm), topSpeedMps(sheet));
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
