/**
 * Steady driving on a bend of radius R with the bar L ahead of the axle (plane geometry): if the line lies y to the inner side at
 * the bar, the axle runs on a circle of radius y + sqrt(R^2 - L^2).
 *
 * On the line itself the axle stays while y = R - sqrt(R^2 - L^2) is in view; so for a bar that sees V to the side, from
 * R = (L^2 + V^2) / (2 V) on. In tighter bends the line is held nearer to the bar's middle and the axle cuts the bend.
 */
import { HELD_VIEW_SHARE, LEAST_RADIUS_AHEAD_RATIO } from '../../vehicle/sensor-bar.js';
import type { RuleContext } from './rule.js';
import { barView } from './view.js';

/** Least radius of the axle's path, share of the bend's: less is turning on the spot rather than following (our assumption). */
const LEAST_PATH_SHARE = 0.6;

/** Tightest radius of which the line stays within `seen` to the side, `ahead` of the axle, with the axle on the line. */
export function tightestRadius(ahead: number, seen: number): number {
  return seen >= ahead ? ahead : (ahead * ahead + seen * seen) / (2 * seen);
}

/** Radius of the axle's path in a bend while the line is held well under the bar; NaN when the bar is beyond the bend. */
export function cutPath(radius: number, ahead: number, seen: number): number {
  return HELD_VIEW_SHARE * seen + Math.sqrt(radius * radius - ahead * ahead);
}

/** Tightest radius that can be followed at all, cutting it. */
export function tightestCutRadius(ahead: number, seen: number): number {
  let low = LEAST_RADIUS_AHEAD_RATIO * ahead;
  if (cutPath(low, ahead, seen) >= LEAST_PATH_SHARE * low) return Math.min(low, tightestRadius(ahead, seen));
  let high = tightestRadius(ahead, seen);
  for (let i = 0; i < 50; i += 1) {
    const middle = (low + high) / 2;
    if (cutPath(middle, ahead, seen) >= LEAST_PATH_SHARE * middle) high = middle;
    else low = middle;
  }
  return high;
}

/** The tightest bend and the bar, mm. */
export interface Bend {
  radiusMm: number;
  aheadMm: number;
  seenMm: number;
}

/** Undefined where the bar is contradictory. */
export function bendOf(context: RuleContext): Bend | undefined {
  const view = barView(context);
  return (
    view && {
      radiusMm: context.sheet.line.tightestRadiusMm,
      aheadMm: context.sheet.sensors.aheadOfAxleMm,
      seenMm: view.halfWidthMm,
    }
  );
}
