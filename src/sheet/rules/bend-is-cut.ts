import { withUnit } from '../words.js';
import { bendOf, cutPath, tightestCutRadius, tightestRadius } from './bend.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'bend-is-cut',
  level: 'note',
  why: 'Where the view does not reach the line of the tightest bend, the vehicle cuts it: worth knowing where things stand close to the lane.',
  check(context) {
    const bend = bendOf(context);
    if (bend === undefined) return [];
    const { radiusMm, aheadMm, seenMm } = bend;
    if (radiusMm >= tightestRadius(aheadMm, seenMm) || radiusMm < tightestCutRadius(aheadMm, seenMm))
      return [];
    const insideMm = Math.round(radiusMm - cutPath(radiusMm, aheadMm, seenMm));
    return [
      {
        pointer: '/line/tightestRadiusMm',
        message: `In a bend of ${withUnit(radiusMm, 'mm')} the axle runs about ${withUnit(insideMm, 'mm')} inside the line, so that the line stays under the bar; from ${withUnit(Math.ceil(tightestRadius(aheadMm, seenMm)), 'mm')} on it follows the line itself.`,
        fix: 'Keep that room clear on the inner side, move the bar nearer to the axle, or make it wider.',
      },
    ];
  },
};
