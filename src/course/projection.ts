/**
 * The place on a lane that is nearest to a point, found in a window around the last known place.
 *
 * On a straight the foot of the perpendicular; on an arc the place at the same angle seen from the turning centre,
 * k s = atan2(k u, 1 - k w) for a point u ahead of the start of the arc and w to its left. Both are held within the piece and the
 * window. Gaps are part of the lane. On a closed lane the arc length goes on counting, lap after lap.
 */

/** Half the window in which the nearest place is looked for, m. */
export const WINDOW_M = 0.1;

/** A piece of lane with length: what the search needs of it. */
export interface ProjectedPiece {
  readonly startM: number;
  readonly lengthM: number;
  readonly curvaturePerM: number;
  readonly xM: number;
  readonly yM: number;
  readonly headingRad: number;
}

/** Where a projection is written to; made once, used again and again. */
export interface Projection {
  /** Arc length from the start of the lane, m; on a closed lane beyond its length after the first lap. */
  sM: number;
  /** Distance from the centre line, m; positive: the point lies left of it. */
  lateralM: number;
  /** Direction of the lane there, rad. */
  headingRad: number;
  /** Index of the piece: where the next search begins. */
  piece: number;
}

export function makeProjection(): Projection {
  return { sM: 0, lateralM: 0, headingRad: 0, piece: 0 };
}

/** Fields of one piece in the flat table. */
const F = {
  start: 0,
  length: 1,
  curvature: 2,
  x: 3,
  y: 4,
  heading: 5,
  cosHeading: 6,
  sinHeading: 7,
  size: 8,
} as const;

/** Finds places on one lane. */
export class Projector {
  private readonly table: Float64Array;
  private readonly last: number;
  private bestSquare = 0.5;

  /**
   * @param pieces all of positive length, one behind the other
   * @param lengthM length of the lane, m
   */
  constructor(
    pieces: readonly ProjectedPiece[],
    private readonly lengthM: number,
    private readonly closed: boolean,
  ) {
    this.last = pieces.length - 1;
    this.table = Float64Array.from(
      pieces.flatMap(({ startM, lengthM: pieceM, curvaturePerM, xM, yM, headingRad }) => {
        return [
          startM,
          pieceM,
          curvaturePerM,
          xM,
          yM,
          headingRad,
          Math.cos(headingRad),
          Math.sin(headingRad),
        ];
      }),
    );
  }

  /**
   * Writes the place nearest to a point into `out`.
   *
   * @param nearM arc length around which to look, `WINDOW_M` to either side, m
   */
  project(xM: number, yM: number, nearM: number, out: Projection): void {
    const { last, table } = this;
    const lapM = this.closed ? Math.floor(nearM / this.lengthM) * this.lengthM : 0;
    const near = this.closed ? nearM - lapM : Math.min(this.lengthM, Math.max(0, nearM));
    let middle = Math.min(out.piece, last);
    while (middle > 0 && table[middle * F.size]! > near) middle--;
    while (middle < last && table[(middle + 1) * F.size]! <= near) middle++;

    this.bestSquare = Infinity;
    this.offer(middle, xM, yM, near, lapM, out);
    let back = 0;
    for (let i = middle; back + table[i * F.size]! > near - WINDOW_M;) {
      if (i === 0 && !this.closed) break;
      if (i === 0) back -= this.lengthM;
      i = i === 0 ? last : i - 1;
      this.offer(i, xM, yM, near - back, lapM + back, out);
    }
    let on = 0;
    for (let i = middle; on + table[i * F.size]! + table[i * F.size + F.length]! < near + WINDOW_M;) {
      if (i === last && !this.closed) break;
      if (i === last) on += this.lengthM;
      i = i === last ? 0 : i + 1;
      this.offer(i, xM, yM, near - on, lapM + on, out);
    }
  }

  /** Writes the nearest place on one piece if none nearer was written before. */
  private offer(index: number, xM: number, yM: number, near: number, lapM: number, out: Projection): void {
    const { table } = this;
    const at = index * F.size;
    const startM = table[at]!;
    const from = Math.max(0, near - WINDOW_M - startM);
    const to = Math.min(table[at + F.length]!, near + WINDOW_M - startM);
    if (from > to) return;
    const dx = xM - table[at + F.x]!;
    const dy = yM - table[at + F.y]!;
    const ahead = dx * table[at + F.cosHeading]! + dy * table[at + F.sinHeading]!;
    const left = dy * table[at + F.cosHeading]! - dx * table[at + F.sinHeading]!;
    const k = table[at + F.curvature]!;
    let s = ahead;
    let lateralM = left;
    if (k !== 0) {
      const middle = (from + to) / 2;
      const turn = Math.atan2(k * ahead, 1 - k * left) - k * middle;
      s = middle + (turn - 2 * Math.PI * Math.round(turn / (2 * Math.PI))) / k;
      lateralM = (1 - Math.sqrt(k * ahead * k * ahead + (1 - k * left) * (1 - k * left))) / k;
    }
    let square = lateralM * lateralM;
    if (s < from || s > to) {
      s = s < from ? from : to;
      const beside = k === 0 ? left : left - (1 - Math.cos(k * s)) / k;
      const beyond = k === 0 ? ahead - s : ahead - Math.sin(k * s) / k;
      square = beside * beside + beyond * beyond;
      const isLeft = beside * Math.cos(k * s) - beyond * Math.sin(k * s) >= 0;
      lateralM = isLeft ? Math.sqrt(square) : -Math.sqrt(square);
    }
    if (square >= this.bestSquare) return;
    this.bestSquare = square;
    out.sM = lapM + startM + s;
    out.lateralM = lateralM;
    out.headingRad = table[at + F.heading]! + k * s;
    out.piece = index;
  }
}
