/** Where a curve is well apart from others, so that a leader to it cannot be mistaken. */
import { filled, type Point } from './polyline.js';

const CANDIDATES = 24;
/** Nearer together than this, curves cannot be told apart by a leader, px. */
const LEAST_APART_PX = 6;

/**
 * Points of one of several curves where it is apart from the others, the loneliest first; none where it lies along another.
 *
 * @param curves each in the parts it was cut into, px
 * @param index the curve whose points are wanted
 */
export function apartPoints(curves: readonly (readonly (readonly Point[])[])[], index: number): Point[] {
  const others = curves.filter((_, i) => i !== index).flatMap((parts) => filledAll(parts));
  const own = filledAll(curves[index] ?? []);
  const picked = own.filter((_, i) => i % Math.ceil(own.length / CANDIDATES) === 0);
  const apartPx = ([x, y]: Point) => Math.min(...others.map(([ox, oy]) => Math.hypot(ox - x, oy - y)));
  return picked
    .map((point) => ({ point, apart: apartPx(point) }))
    .filter(({ apart }) => apart >= LEAST_APART_PX)
    .sort((a, b) => b.apart - a.apart)
    .map(({ point }) => point);
}

const STEP_PX = 4;

function filledAll(parts: readonly (readonly Point[])[]): Point[] {
  return parts.flatMap((part) => filled(part, STEP_PX));
}
