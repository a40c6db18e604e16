import { LEAST_RADIUS_AHEAD_RATIO } from '../../vehicle/sensor-bar.js';
import { withUnit } from '../words.js';
import { type Bend, bendOf, tightestCutRadius } from './bend.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'bend-in-view',
  level: 'problem',
  why: 'In the tightest bend the line has to stay under the bar.',
  check(context) {
    const bend = bendOf(context);
    if (bend === undefined) return [];
    const { radiusMm, aheadMm, seenMm } = bend;
    const tightestMm = Math.ceil(tightestCutRadius(aheadMm, seenMm));
    if (radiusMm >= tightestMm) return [];
    const where =
      aheadMm * LEAST_RADIUS_AHEAD_RATIO >= radiusMm
        ? `the bar, ${withUnit(aheadMm, 'mm')} ahead of the axle, is beyond the bend`
        : `the line leaves the bar, which sees ${withUnit(Math.floor(seenMm), 'mm')} to the side`;
    return [
      {
        pointer: '/line/tightestRadiusMm',
        message: `In a bend of ${withUnit(radiusMm, 'mm')} ${where}; the tightest bend that this bar can follow is ${withUnit(tightestMm, 'mm')}.`,
        got: withUnit(radiusMm, 'mm'),
        allowed: `at least ${withUnit(tightestMm, 'mm')}`,
        fix: `Move the bar to at most ${withUnit(longestAheadMm(bend), 'mm')} ahead of the axle, or widen the bend.`,
      },
    ];
  },
};

/** Furthest place of the bar, whole mm, at which it can follow the bend. */
function longestAheadMm({ radiusMm, seenMm }: Bend): number {
  let ahead = Math.floor(radiusMm / LEAST_RADIUS_AHEAD_RATIO);
  while (ahead > 1 && Math.ceil(tightestCutRadius(ahead, seenMm)) > radiusMm) ahead -= 1;
  return ahead;
}
