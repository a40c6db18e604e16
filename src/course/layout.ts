/**
 * The pieces of a course laid out on the floor.
 *
 * The first piece starts at the origin toward +x; y is to the left. Each piece has one curvature k (1/radius, positive to the
 * left, 0 on straights and gaps) and starts where and how the one before it ends; a corner turns the direction on the spot.
 */
import { degToRad, mmToM } from '../sheet/units.js';
import { alongArc, type Pose } from './arc.js';
import type { Course } from './course-types.js';

/** Width of the line where the course gives none, mm: the default of its schema. */
const DEFAULT_LINE_WIDTH_MM = 19;

/** A piece of the lane that has a length. */
export interface LanePiece extends Readonly<Pose> {
  readonly kind: 'straight' | 'arc' | 'gap';
  /** Arc length from the start of the lane to the start of the piece, m. */
  readonly startM: number;
  readonly lengthM: number;
  /** 1/m, positive to the left. */
  readonly curvaturePerM: number;
}

/** A line across the lane. */
export interface LaneCrossing extends Readonly<Pose> {
  readonly sM: number;
}

/** A sharp change of heading; the pose is the one before it. */
export interface LaneCorner extends Readonly<Pose> {
  readonly sM: number;
  /** rad, positive to the left. */
  readonly turnRad: number;
  /** Index of the piece that begins there; on the end of a closed lane 0, of an open one the number of pieces. */
  readonly before: number;
}

export interface Layout {
  readonly closed: boolean;
  readonly lineWidthM: number;
  readonly pieces: readonly LanePiece[];
  readonly crossings: readonly LaneCrossing[];
  readonly corners: readonly LaneCorner[];
  readonly lengthM: number;
  /** Pose behind the last piece. */
  readonly end: Readonly<Pose>;
}

/** Lays out a course that fits its schema. */
export function layOut(course: Course): Layout {
  const pieces: LanePiece[] = [];
  const crossings: LaneCrossing[] = [];
  const corners: LaneCorner[] = [];
  let pose: Pose = { xM: 0, yM: 0, headingRad: 0 };
  let sM = 0;
  const append = (kind: LanePiece['kind'], lengthM: number, curvaturePerM: number): void => {
    if (lengthM === 0) return;
    pieces.push({ ...pose, kind, startM: sM, lengthM, curvaturePerM });
    pose = alongArc(pose, lengthM, lengthM * curvaturePerM);
    sM += lengthM;
  };
  for (const piece of course.pieces) {
    if ('straightMm' in piece) append('straight', mmToM(piece.straightMm), 0);
    else if ('gapMm' in piece) append('gap', mmToM(piece.gapMm), 0);
    else if ('radiusMm' in piece) {
      const radiusM = mmToM(piece.radiusMm);
      const turnRad = degToRad(piece.turnDeg);
      append('arc', radiusM * Math.abs(turnRad), Math.sign(turnRad) / radiusM);
    } else if ('crossing' in piece) crossings.push({ ...pose, sM });
    else {
      const turnRad = degToRad(piece.cornerDeg);
      corners.push({ ...pose, sM, turnRad, before: pieces.length });
      pose = { ...pose, headingRad: pose.headingRad + turnRad };
    }
  }
  const closed = course.closed ?? false;
  return {
    closed,
    lineWidthM: mmToM(course.lineWidthMm ?? DEFAULT_LINE_WIDTH_MM),
    pieces,
    crossings,
    corners: corners.map((corner) =>
      closed && corner.before === pieces.length ? { ...corner, before: 0 } : corner,
    ),
    lengthM: sM,
    end: pose,
  };
}
