/**
 * How far the bar of a sheet sees: the ground that the rules of geometry share. Lengths in mm.
 *
 * A sensor takes part in steering while the line covers enough of its spot. A digital sensor, and an analog one whose reading a rule table
 * turns into a bit, switch at half contrast; a mixed bar is judged by its digital sensors, which see least. Feedback also uses a weaker reading; a quarter of the contrast stands clear of
 * noise (our assumption).
 */
import { seeingReach } from '../../vehicle/sensor-bar.js';
import type { RuleContext } from './rule.js';

const SWITCHING_SHARE = 0.5;
const READABLE_SHARE = 0.25;

export interface BarView {
  /** Share of the spot that the line has to cover. */
  share: number;
  /** Greatest distance between a sensor and the middle of a line that it still sees. */
  reachMm: number;
  /** Distance of the outermost sensor from the centre line, on the side where it is less. */
  outermostMm: number;
  /** Greatest offset of the line's middle, to either side, at which the bar still sees it. */
  halfWidthMm: number;
}

/** Share of its spot that the line has to cover for a sensor to count as seeing it. */
export function neededShare(sheet: RuleContext['sheet']): number {
  return sheet.sensors.kind === 'analog' && sheet.control.kind === 'pid' ? READABLE_SHARE : SWITCHING_SHARE;
}

/** What the bar sees; undefined where positions are contradictory or the spot is too wide for the line. */
export function barView({ sheet, positionsMm }: RuleContext): BarView | undefined {
  const share = neededShare(sheet);
  const reachMm = seeingReach(sheet.line.widthMm, sheet.sensors.spotRadiusMm, share);
  const left = positionsMm?.[0];
  const right = positionsMm?.at(-1);
  if (reachMm === undefined || left === undefined || right === undefined) return undefined;
  const outermostMm = Math.min(left, -right);
  return { share, reachMm, outermostMm, halfWidthMm: outermostMm + reachMm };
}
