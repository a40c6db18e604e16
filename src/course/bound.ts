/**
 * The least lap time that physics allows: a point that keeps to the centre line, limited by grip and motors.
 *
 * Limits at speed v on curvature k, with grip mu g:
 *   lateral      v^2 |k| <= mu g
 *   outer wheel  v (1 + |k| b/2) <= top speed, b the track width
 *   speeding up  a <= sqrt((mu g)^2 - (v^2 k)^2)  and  a <= (top - v)/lag
 *   braking     -a <= sqrt((mu g)^2 - (v^2 k)^2)  and -a <= (top + v)/lag     (motor of first order, reverse duty)
 * The fastest speed profile follows by a forward pass (speeding up) and a backward pass (braking) over a fine grid, common
 * practice in racing-line computation. With w = v^2 the step is dw/ds = 2 a, taken by the midpoint rule.
 * A closed lane is taken flying: both passes go round twice, so that the end speed is the start speed. An open lane, or a lap
 * from standing, starts at rest and ends at any speed.
 *
 * A corner has no speed at which a point could pass it: the point stops there and turns on the spot. Both wheels then run the
 * distance D = |turn| b/2, from rest to rest at full duty and full reverse duty; with v' = (+-top - v)/lag that takes
 *   D/top + 2 lag ln(1 + sqrt(1 - exp(-D/(top lag)))).
 */
import { STANDARD_GRAVITY_MPS2 } from '../vehicle/gravity.js';
import type { Lane } from './lane.js';

/** Longest distance between two grid points, m. */
const GRID_M = 0.001;

/** Times that the grid is halved towards a stop, where speed grows like the root of distance. */
const HALVINGS = 10;

export interface BoundSetup {
  lane: Lane;
  /** Wheel surface speed at full duty, m/s. */
  topSpeedMps: number;
  /** Motor time constant, s. */
  lagS: number;
  /** Friction coefficient. */
  grip: number;
  /** Track width, m. */
  trackM: number;
  /** Start at rest; by default only on an open lane. */
  standing?: boolean;
  /** Arc length at which the lap ends, m; by default the lane's length. */
  endM?: number;
}

export interface Bound {
  lapS: number;
  /** Arc lengths of the grid, m. */
  sM: Float64Array;
  /** Speed there, m/s. */
  speedMps: Float64Array;
}

/** The bound on one lap's time, and the speed profile that reaches it. */
export function lapBound(setup: BoundSetup): Bound {
  const { lane, topSpeedMps, lagS, trackM } = setup;
  const standing = setup.standing ?? !lane.closed;
  const gripMps2 = setup.grip * STANDARD_GRAVITY_MPS2;
  const grid = makeGrid(lane, setup.endM ?? lane.lengthM);
  const cells = grid.curvature.length;
  const cellM = (i: number): number => grid.sM[i + 1]! - grid.sM[i]!;

  const limit = new Float64Array(cells + 1).fill(topSpeedMps ** 2);
  grid.curvature.forEach((k, i) => {
    const most = Math.min(gripMps2 / Math.max(k, 1e-12), (topSpeedMps / (1 + (k * trackM) / 2)) ** 2);
    limit[i] = Math.min(limit[i]!, most);
    limit[i + 1] = Math.min(limit[i + 1]!, most);
  });
  for (const node of grid.stops) limit[node] = 0;
  if (standing) limit[0] = 0;
  else limit[0] = limit[cells] = Math.min(limit[0]!, limit[cells]!);

  const gripLeft = (square: number, k: number): number =>
    Math.sqrt(Math.max(0, gripMps2 ** 2 - (square * k) ** 2));
  const speedUp = (square: number, k: number): number =>
    Math.min(gripLeft(square, k), Math.max(0, topSpeedMps - Math.sqrt(square)) / lagS);
  const brake = (square: number, k: number): number =>
    Math.min(gripLeft(square, k), (topSpeedMps + Math.sqrt(square)) / lagS);

  const square = Float64Array.from(limit);
  for (let lap = 0; lap < (standing ? 1 : 2); lap++) {
    if (lap > 0) square[0] = Math.min(square[0]!, square[cells]!);
    for (let i = 0; i < cells; i++) {
      square[i + 1] = Math.min(square[i + 1]!, step(square[i]!, grid.curvature[i]!, cellM(i), speedUp));
    }
  }
  for (let lap = 0; lap < (standing ? 1 : 2); lap++) {
    if (lap > 0) square[cells] = Math.min(square[0]!, square[cells]!);
    for (let i = cells - 1; i >= 0; i--) {
      square[i] = Math.min(square[i]!, step(square[i + 1]!, grid.curvature[i]!, cellM(i), brake));
    }
  }

  const speedMps = square.map(Math.sqrt);
  let lapS = grid.turnsRad.reduce((sum, turnRad) => sum + turnOnSpotS(turnRad, setup), 0);
  for (let i = 0; i < cells; i++) lapS += (2 * cellM(i)) / (speedMps[i]! + speedMps[i + 1]!);
  return { lapS, sM: grid.sM, speedMps };
}

/** Squared speed at the end of one grid cell of constant curvature. */
function step(
  square: number,
  k: number,
  lengthM: number,
  most: (square: number, k: number) => number,
): number {
  const first = most(square, k);
  // Half way may be past a limit already, where no acceleration is left; the grid point's own limit then ends the step.
  const second = most(square + first * lengthM, k);
  return square + 2 * (second > 0 ? second : first) * lengthM;
}

/** Time to turn on the spot, from rest to rest, s. */
export function turnOnSpotS(
  turnRad: number,
  motor: Pick<BoundSetup, 'topSpeedMps' | 'lagS' | 'trackM'>,
): number {
  const distanceM = (Math.abs(turnRad) * motor.trackM) / 2;
  const { topSpeedMps, lagS } = motor;
  return (
    distanceM / topSpeedMps + 2 * lagS * Math.log1p(Math.sqrt(-Math.expm1(-distanceM / (topSpeedMps * lagS))))
  );
}

interface BoundGrid {
  /** Arc lengths of the grid points, one more than there are cells. */
  sM: Float64Array;
  /** |k| of each cell, 1/m. */
  curvature: Float64Array;
  /** Grid points at which the lane turns on the spot. */
  stops: number[];
  turnsRad: number[];
}

function makeGrid(lane: Lane, endM: number): BoundGrid {
  const corners = lane.corners.filter((corner) => corner.sM < endM || (lane.closed && corner.before === 0));
  const sM = [0];
  const curvature: number[] = [];
  const starts: number[] = [];
  for (const piece of lane.pieces) {
    starts.push(curvature.length);
    const pieceM = Math.min(piece.lengthM, endM - piece.startM);
    if (pieceM <= 0) continue;
    for (const along of gridAlong(pieceM)) {
      sM.push(piece.startM + along);
      curvature.push(Math.abs(piece.curvaturePerM));
    }
  }
  return {
    sM: Float64Array.from(sM),
    curvature: Float64Array.from(curvature),
    stops: corners.map((corner) => starts[corner.before] ?? curvature.length),
    turnsRad: corners.map((corner) => corner.turnRad),
  };
}

/** Grid points on a piece, its start left out: even, and finer and finer towards both ends. */
function gridAlong(lengthM: number): number[] {
  const cells = Math.max(2, Math.ceil(lengthM / GRID_M));
  const cellM = lengthM / cells;
  const fine = Array.from({ length: HALVINGS }, (_, i) => cellM / 2 ** (HALVINGS - i));
  const even = Array.from({ length: cells - 1 }, (_, i) => cellM * (i + 1));
  return [...fine, ...even, ...fine.map((x) => lengthM - x).reverse(), lengthM];
}
