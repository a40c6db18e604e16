/** Lines through points in px: cutting them at the edge of a plot, and filling them with points. */

export type Point = readonly [x: number, y: number];

/** A rectangle in px, y downward. */
export interface Box {
  x: number;
  y: number;
  width: number;
  height: number;
}

/** The part of a segment inside a box, as shares 0..1 of its length (Liang and Barsky, 1984); undefined if none is. */
function insideShares([ax, ay]: Point, [bx, by]: Point, box: Box): [number, number] | undefined {
  let [enter, leave] = [0, 1];
  // each side: how fast the segment moves outward over it, and how far inside of it the segment begins
  const sides: Point[] = [
    [ax - bx, ax - box.x],
    [bx - ax, box.x + box.width - ax],
    [ay - by, ay - box.y],
    [by - ay, box.y + box.height - ay],
  ];
  for (const [outward, inside] of sides) {
    if (outward === 0 && inside < 0) return undefined;
    if (outward > 0) leave = Math.min(leave, inside / outward);
    if (outward < 0) enter = Math.max(enter, inside / outward);
  }
  return enter <= leave ? [enter, leave] : undefined;
}

/** The parts of a line that lie inside a box. */
export function clipped(points: readonly Point[], box: Box): Point[][] {
  const parts: Point[][] = [];
  let joined = false;
  for (let i = 1; i < points.length; i++) {
    const [a, b] = [points[i - 1]!, points[i]!];
    const shares = insideShares(a, b, box);
    if (shares === undefined) {
      joined = false;
      continue;
    }
    const at = (share: number): Point => [a[0] + share * (b[0] - a[0]), a[1] + share * (b[1] - a[1])];
    if (joined && shares[0] === 0) parts[parts.length - 1]!.push(at(shares[1]));
    else parts.push([at(shares[0]), at(shares[1])]);
    joined = shares[1] === 1;
  }
  return parts;
}

/** Points along a line, no two neighbours farther apart than `stepPx`. */
export function filled(points: readonly Point[], stepPx: number): Point[] {
  return points.flatMap((point, i) => {
    const before = points[i - 1];
    if (before === undefined) return [point];
    const [dx, dy] = [point[0] - before[0], point[1] - before[1]];
    const count = Math.max(1, Math.ceil(Math.hypot(dx, dy) / stepPx));
    return Array.from({ length: count }, (_, k): Point => {
      const share = (k + 1) / count;
      return [before[0] + share * dx, before[1] + share * dy];
    });
  });
}

/** A line without the points that lie nearer than `leastPx` to the one kept before them; both ends stay. */
export function thinned(points: readonly Point[], leastPx: number): Point[] {
  const kept: Point[] = [];
  for (const point of points) {
    const before = kept[kept.length - 1];
    if (before === undefined || Math.hypot(point[0] - before[0], point[1] - before[1]) >= leastPx)
      kept.push(point);
  }
  const end = points[points.length - 1];
  if (end !== undefined && kept[kept.length - 1] !== end) kept.push(end);
  return kept;
}
