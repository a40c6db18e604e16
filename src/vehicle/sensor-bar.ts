/**
 * What a row of reflectance sensors sees of a line. Lengths in any one unit.
 *
 * A sensor sees a circular spot of floor; its reading follows the share of the spot that the line covers. With
 * F(u) = 1/2 + (u sqrt(1 - u^2) + asin u) / pi, the share of a unit disc left of the chord at u (plane geometry), a
 * strip of width w whose middle is at distance d from the spot's middle covers F((d + w/2)/s) - F((d - w/2)/s).
 */

/**
 * Share of the view at which the line is held in a steady tight bend: the rest is for entering it. The rules of the sheet and the design
 * go by it alike.
 */
export const HELD_VIEW_SHARE = 0.7;
/** Least radius of a bend over the bar's distance from the axle: nearer, the bar swings past the line. */
export const LEAST_RADIUS_AHEAD_RATIO = 1.02;

/** Positions of an evenly spaced row, leftmost first, positive to the left, symmetrical about 0. */
export function evenPositions(count: number, pitch: number): number[] {
  return Array.from({ length: count }, (_, index) => ((count - 1) / 2 - index) * pitch);
}

/** Share of a unit disc left of the chord at `u`, 0 to 1. */
export function discShare(u: number): number {
  if (u <= -1) return 0;
  if (u >= 1) return 1;
  return 0.5 + (u * Math.sqrt(1 - u * u) + Math.asin(u)) / Math.PI;
}

/** Share of a sensor's spot, 0 to 1, covered by a line whose middle is `offset` away from the spot's middle. */
export function coveredShare(offset: number, lineWidth: number, spotRadius: number): number {
  const half = lineWidth / 2;
  return discShare((offset + half) / spotRadius) - discShare((offset - half) / spotRadius);
}

/**
 * Greatest distance between the middles of spot and line at which the line still covers `share` of the spot;
 * undefined if it never does, because the spot is too wide for the line. `share` is above 0 and at most 1.
 */
export function seeingReach(lineWidth: number, spotRadius: number, share: number): number | undefined {
  if (coveredShare(0, lineWidth, spotRadius) < share) return undefined;
  let inside = 0;
  let outside = lineWidth / 2 + spotRadius;
  // The share falls steadily with the distance; 60 halvings reach the last bit of a double.
  for (let step = 0; step < 60; step += 1) {
    const middle = (inside + outside) / 2;
    if (coveredShare(middle, lineWidth, spotRadius) >= share) inside = middle;
    else outside = middle;
  }
  return inside;
}
