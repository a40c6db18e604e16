import { edgesPerS, windowBits } from '../../vehicle/encoder.js';
import { topSpeedMps } from '../top-speed.js';
import { mmToM, msToS } from '../units.js';
import { rounded, withUnit } from '../words.js';
import type { SheetRule } from './rule.js';

/** At full speed, in a window: one edge then stands for half the full speed, which is as much as the loop corrects at all. */
const FEWEST_EDGES = 2;

export const rule: SheetRule = {
  name: 'encoder-resolution',
  level: 'problem',
  why: 'Where one edge stands for more speed than the loop may correct, it would only jump from end to end.',
  check({ sheet, board }) {
    const { encoders, drive } = sheet;
    if (encoders === undefined) return [];
    const periodS = board.samplePeriodS;
    const perS = edgesPerS(encoders.linesPerTurn, mmToM(drive.wheelDiameterMm), topSpeedMps(sheet));
    const inSample = perS * periodS;
    const windowSamples = 2 ** windowBits(inSample, msToS(drive.motor.timeConstantMs), periodS);
    const edges = inSample * windowSamples;
    if (edges >= FEWEST_EDGES) return [];
    const fewest = Math.ceil((encoders.linesPerTurn * FEWEST_EDGES) / edges);
    return [
      {
        pointer: '/encoders/linesPerTurn',
        message: `At full speed a wheel gives ${rounded(edges)} edges in ${rounded(windowSamples * periodS * 1000)} ms, the longest that the loop can wait beside this motor; that is too coarse for a speed.`,
        got: withUnit(encoders.linesPerTurn, '1'),
        allowed: `at least ${fewest}`,
        fix: `Take at least ${fewest} lines a turn, as with the encoder on the motor's shaft, or leave the encoders out.`,
      },
    ];
  },
};
