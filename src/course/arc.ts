/**
 * Moving along a circular arc without trouble near the straight line.
 *
 * A point that starts at (x, y) with heading h and moves the arc length s while its heading changes by a = k s moves along the
 * chord, which has the length s sinc(a/2) and the direction h + a/2 (chord and tangent-chord angle of a circle):
 *   x' = x + s sinc(a/2) cos(h + a/2),  y' = y + s sinc(a/2) sin(h + a/2),  h' = h + a.
 * The form by the turning centre divides by k and loses digits as k goes to 0; this one does not.
 */

/** Position and direction on the floor; x forward at the start of a lane, y to its left. */
export interface Pose {
  xM: number;
  yM: number;
  headingRad: number;
}

/** sin(x)/x; 1 at 0. Below 0.03 the series: its first neglected term is under 2e-13. */
export function sinc(x: number): number {
  if (x < 0.03 && x > -0.03) {
    const square = x * x;
    return 1 - (square / 6) * (1 - square / 20);
  }
  return Math.sin(x) / x;
}

/**
 * The pose at the end of an arc.
 *
 * @param from pose at its beginning
 * @param lengthM arc length, m; negative goes backward
 * @param turnRad change of heading over that length, rad, positive to the left
 */
export function alongArc(from: Pose, lengthM: number, turnRad: number): Pose {
  const chordM = lengthM * sinc(turnRad / 2);
  const direction = from.headingRad + turnRad / 2;
  return {
    xM: from.xM + chordM * Math.cos(direction),
    yM: from.yM + chordM * Math.sin(direction),
    headingRad: from.headingRad + turnRad,
  };
}

/** The same angle between -pi and pi. */
export function wrapAngle(angleRad: number): number {
  return angleRad - 2 * Math.PI * Math.round(angleRad / (2 * Math.PI));
}
