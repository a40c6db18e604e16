import { degToRad } from '../units.js';
import { withUnit } from '../words.js';
import type { SheetRule } from './rule.js';
import { barView } from './view.js';

/**
 * Heading error across a gap, deg: what a settled vehicle still has, and what unequal wheels add while nothing is seen.
 * Our assumption; 6 deg is 10 mm to the side for every 100 mm.
 */
const HEADING_ERROR_DEG = 6;

export const rule: SheetRule = {
  name: 'gap-is-bridged',
  level: 'problem',
  why: 'Over a gap the vehicle holds its course; where the line begins again it has to be under the bar.',
  check(context) {
    const view = barView(context);
    if (view === undefined) return [];
    const { longestGapMm } = context.sheet.line;
    const driftPerMm = Math.tan(degToRad(HEADING_ERROR_DEG));
    const longestMm = Math.floor(view.halfWidthMm / driftPerMm);
    if (longestGapMm <= longestMm) return [];
    const drift = withUnit(Math.round(longestGapMm * driftPerMm), 'mm');
    const sees = withUnit(Math.floor(view.halfWidthMm), 'mm');
    return [
      {
        pointer: '/line/longestGapMm',
        message: `Over a gap of ${withUnit(longestGapMm, 'mm')} the vehicle may drift ${drift} to the side (${HEADING_ERROR_DEG} deg of heading error), but the bar sees only ${sees} to each side.`,
        got: withUnit(longestGapMm, 'mm'),
        allowed: `at most ${withUnit(longestMm, 'mm')}`,
        fix: 'Shorten the gap, or take a wider bar.',
      },
    ];
  },
};
