/**
 * The painted strips of a lane, and how much of a sensor's spot they cover.
 *
 * A strip is a straight or an arc of at most a quarter turn, of constant width w. A round spot of radius r whose centre lies the
 * signed distance d from the strip's centre line sees the share A((w/2 - d)/r) - A((-w/2 - d)/r), where A(u) is the share of a
 * unit disc on one side of the chord at u. With the chord at height t having the length 2 sqrt(1 - t^2),
 *   A(u) = (1/pi) integral from -1 to u of 2 sqrt(1 - t^2) dt = 1/2 + (u sqrt(1 - u^2) + asin u)/pi,   |u| <= 1,
 * 0 below -1 and 1 above 1. Exact for a straight edge; an edge of radius R changes it by at most 2 r/(3 pi R).
 * Where a strip ends in bare floor, the same A fades it out along the strip. Where it continues in the next strip it ends sharply,
 * and the next one takes over. Strips that overlap count as the one that covers most.
 *
 * A strip is found by a uniform grid: each cell lists the strips that a spot centred in it could touch.
 */
import { discShare } from '../vehicle/sensor-bar.js';
import { alongArc, type Pose } from './arc.js';
import { makeGrid, type Grid } from './strip-grid.js';

/** Largest spot radius that can be asked for, m: the limit of the build sheet. */
export const MAX_SPOT_RADIUS_M = 0.015;

/** Distance between the points by which a strip is entered into the grid, m. */
const POINT_STEP_M = 0.02;

/** Fields of one strip in the flat table. */
const F = {
  x0: 0,
  y0: 1,
  tx0: 2,
  ty0: 3,
  x1: 4,
  y1: 5,
  tx1: 6,
  ty1: 7,
  centreX: 8,
  centreY: 9,
  /** 0 for a straight. */
  radius: 10,
  joined0: 11,
  joined1: 12,
  length: 13,
  size: 14,
} as const;

/** Strips in the making; arcs are cut into pieces of at most a quarter turn. */
export class StripTable {
  private readonly rows: number[] = [];
  private readonly points: Float64Array[] = [];

  /**
   * Adds a strip.
   *
   * @param start pose at its beginning
   * @param lengthM length along its centre line, m
   * @param curvaturePerM constant curvature, 1/m, positive to the left
   * @param joinedBefore another strip leads into it
   * @param joinedAfter another strip continues it
   */
  add(
    start: Pose,
    lengthM: number,
    curvaturePerM: number,
    joinedBefore: boolean,
    joinedAfter: boolean,
  ): void {
    const turnRad = lengthM * curvaturePerM;
    const parts = Math.max(1, Math.ceil(Math.abs(turnRad) / (Math.PI / 2) - 1e-9));
    const signedRadius = curvaturePerM === 0 ? 0 : 1 / curvaturePerM;
    let from = start;
    for (let i = 0; i < parts; i++) {
      const to = alongArc(from, lengthM / parts, turnRad / parts);
      const [cos0, sin0] = [Math.cos(from.headingRad), Math.sin(from.headingRad)];
      const [cos1, sin1] = [Math.cos(to.headingRad), Math.sin(to.headingRad)];
      this.rows.push(from.xM, from.yM, cos0, sin0, to.xM, to.yM, cos1, sin1);
      this.rows.push(from.xM - signedRadius * sin0, from.yM + signedRadius * cos0, Math.abs(signedRadius));
      this.rows.push(Number(i > 0 || joinedBefore), Number(i < parts - 1 || joinedAfter), lengthM / parts);
      this.points.push(pointsAlong(from, lengthM / parts, turnRad / parts));
      from = to;
    }
  }

  /** All strips, F.size numbers each. */
  toTable(): Float64Array {
    return Float64Array.from(this.rows);
  }

  /** The grid that finds the strips within a distance of a point. */
  toGrid(reachM: number): Grid {
    return makeGrid(this.points, reachM + POINT_STEP_M / 2);
  }
}

function pointsAlong(from: Pose, lengthM: number, turnRad: number): Float64Array {
  const steps = Math.max(1, Math.ceil(lengthM / POINT_STEP_M));
  const points = new Float64Array(2 * steps + 2);
  for (let i = 0; i <= steps; i++) {
    const pose = alongArc(from, (lengthM * i) / steps, (turnRad * i) / steps);
    points[2 * i] = pose.xM;
    points[2 * i + 1] = pose.yM;
  }
  return points;
}

/** How much of a round spot is painted. */
export class Paint {
  private readonly halfWidthM: number;
  private readonly strips: Float64Array;
  private readonly grid: Grid;

  /**
   * @param table strips from a StripTable
   * @param widthM width of every strip, m
   */
  constructor(table: StripTable, widthM: number) {
    this.halfWidthM = widthM / 2;
    this.strips = table.toTable();
    this.grid = table.toGrid(this.halfWidthM + MAX_SPOT_RADIUS_M);
  }

  /**
   * Writes of each round spot the share that is painted, 0 to 1. Allocates nothing.
   *
   * All in one loop over plain arrays: numbers handed from function to function would each be put on the heap.
   *
   * @param spotsM x and y of each spot, m
   * @param spotRadiusM above 0 and at most MAX_SPOT_RADIUS_M
   */
  cover(spotsM: Float64Array, spotRadiusM: number, shares: Float64Array): void {
    const { grid, strips: s, halfWidthM: halfM } = this;
    const { left, bottom, perM, columns, rows, starts, items } = grid;
    const r = spotRadiusM;
    const reachM = halfM + r;
    for (let spot = 0; spot < shares.length; spot++) {
      const xM = spotsM[2 * spot]!;
      const yM = spotsM[2 * spot + 1]!;
      shares[spot] = 0;
      const column = Math.floor((xM - left) * perM);
      const row = Math.floor((yM - bottom) * perM);
      if (!(column >= 0 && column < columns && row >= 0 && row < rows)) continue;
      // whole numbers by |: as doubles they would be checked at every use
      const cell = (row * columns + column) | 0;
      const last = starts[cell + 1]!;
      let most = 0;
      for (let i = starts[cell]! | 0; i < last && most < 1; i++) {
        const at = items[i]! * F.size;
        const dx0 = xM - s[at + F.x0]!;
        const dy0 = yM - s[at + F.y0]!;
        const radius = s[at + F.radius]!;
        let sideM: number;
        if (radius === 0) {
          sideM = Math.abs(dy0 * s[at + F.tx0]! - dx0 * s[at + F.ty0]!);
          if (sideM >= reachM) continue;
        } else {
          const cx = xM - s[at + F.centreX]!;
          const cy = yM - s[at + F.centreY]!;
          const square = cx * cx + cy * cy;
          const outerM = radius + reachM;
          if (square >= outerM * outerM) continue;
          sideM = Math.abs(Math.sqrt(square) - radius);
          if (sideM >= reachM) continue;
        }
        const afterStart = dx0 * s[at + F.tx0]! + dy0 * s[at + F.ty0]!;
        const joined0 = s[at + F.joined0] === 1;
        if (afterStart < (joined0 ? -1e-9 : -r)) continue;
        const dx1 = s[at + F.x1]! - xM;
        const dy1 = s[at + F.y1]! - yM;
        const beforeEnd = dx1 * s[at + F.tx1]! + dy1 * s[at + F.ty1]!;
        const joined1 = s[at + F.joined1] === 1;
        if (beforeEnd < (joined1 ? -1e-9 : -r)) continue;
        let share = sideM <= halfM - r ? 1 : discShare((halfM - sideM) / r) - discShare((-halfM - sideM) / r);
        let along = 1;
        if (!joined0) along += discShare(afterStart / r) - 1;
        if (!joined1) along += discShare(beforeEnd / r) - 1;
        share *= along;
        if (share > most) most = share;
      }
      shares[spot] = most;
    }
  }
}
