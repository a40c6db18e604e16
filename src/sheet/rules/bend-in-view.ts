/**
 * Axle on the line of a bend of radius R, vehicle tangential to it: at the bar, L ahead, the line lies R - sqrt(R^2 - L^2) to the
 * side (plane geometry). The bar sees offsets up to V. Solved for each: R >= (L^2 + V^2) / (2 V) and, of a bar with V < R,
 * L <= sqrt(2 R V - V^2).
 */
import { withUnit } from '../words.js';
import type { SheetRule } from './rule.js';
import { barView } from './view.js';

export const rule: SheetRule = {
  name: 'bend-in-view',
  level: 'problem',
  why: 'In the tightest bend the line has to stay under the bar while the axle follows it.',
  check(context) {
    const view = barView(context);
    if (view === undefined) return [];
    const radiusMm = context.sheet.line.tightestRadiusMm;
    const aheadMm = context.sheet.sensors.aheadOfAxleMm;
    const seenMm = view.halfWidthMm;
    const tightestMm = Math.ceil(tightestRadius(aheadMm, seenMm));
    if (radiusMm >= tightestMm) return [];
    const nearest = Math.floor(longestAhead(radiusMm, seenMm));
    const where =
      aheadMm >= radiusMm
        ? `the bar, ${withUnit(aheadMm, 'mm')} ahead of the axle, is beyond the bend`
        : `the line lies ${withUnit(Math.round(sideways(radiusMm, aheadMm)), 'mm')} to the side at the bar, which sees ${withUnit(Math.floor(seenMm), 'mm')}`;
    const wider =
      aheadMm >= radiusMm
        ? ''
        : `, or make the bar so wide that its outermost sensors sit ${withUnit(Math.ceil(sideways(radiusMm, aheadMm) - view.reachMm), 'mm')} from the centre line`;
    return [
      {
        pointer: '/line/tightestRadiusMm',
        message: `In a bend of ${withUnit(radiusMm, 'mm')} ${where}; the tightest bend that this bar can see is ${withUnit(tightestMm, 'mm')}.`,
        got: withUnit(radiusMm, 'mm'),
        allowed: `at least ${withUnit(tightestMm, 'mm')}`,
        fix: `Move the bar to at most ${withUnit(nearest, 'mm')} ahead of the axle${wider}.`,
      },
    ];
  },
};

function sideways(radius: number, ahead: number): number {
  return radius - Math.sqrt(radius * radius - ahead * ahead);
}

/** Tightest radius of which the line stays within `seen` to the side, `ahead` of the axle. */
export function tightestRadius(ahead: number, seen: number): number {
  return seen >= ahead ? ahead : (ahead * ahead + seen * seen) / (2 * seen);
}

function longestAhead(radius: number, seen: number): number {
  return seen >= radius ? radius : Math.sqrt(2 * radius * seen - seen * seen);
}
