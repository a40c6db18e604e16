/**
 * A lane, compiled for rehearsal: where it lies, what a sensor sees of it, and how far along it and beside it a point is.
 */
import { FairleadError } from '../sheet/problem.js';
import { alongArc, type Pose } from './arc.js';
import type { Course } from './course-types.js';
import { laneProblems } from './lane-problems.js';
import { laneStrips } from './lane-strips.js';
import { layOut, type LaneCorner, type LaneCrossing, type LanePiece } from './layout.js';
import { Paint } from './paint.js';
import { Projector, type Projection } from './projection.js';

export class Lane {
  readonly closed: boolean;
  readonly lineWidthM: number;
  /** The pieces that have a length, one behind the other; at least one. */
  readonly pieces: readonly LanePiece[];
  readonly crossings: readonly LaneCrossing[];
  readonly corners: readonly LaneCorner[];
  /** Length from start to end, gaps included, m. */
  readonly lengthM: number;
  private readonly paint: Paint;
  private readonly projector: Projector;

  /** @param course one that laneProblems has nothing to say against */
  constructor(course: Course) {
    const layout = layOut(course);
    this.closed = layout.closed;
    this.lineWidthM = layout.lineWidthM;
    this.pieces = layout.pieces;
    this.crossings = layout.crossings;
    this.corners = layout.corners;
    this.lengthM = layout.lengthM;
    this.paint = new Paint(laneStrips(layout), this.lineWidthM);
    this.projector = new Projector(this.pieces, this.lengthM, this.closed);
  }

  /** The centre line at an arc length (m), which wraps round on a closed lane and is held to the ends of an open one. */
  poseAt(sM: number): Pose & { curvaturePerM: number } {
    const lapM = Math.floor(sM / this.lengthM) * this.lengthM;
    const s = this.closed ? sM - lapM : Math.min(this.lengthM, Math.max(0, sM));
    const piece = this.pieces.findLast((candidate) => candidate.startM <= s) ?? this.pieces[0]!;
    const along = s - piece.startM;
    return { ...alongArc(piece, along, along * piece.curvaturePerM), curvaturePerM: piece.curvaturePerM };
  }

  /**
   * Share of a round sensor spot that is painted, 0 to 1; paint.ts has the equations.
   *
   * @param spotRadiusM above 0 and at most MAX_SPOT_RADIUS_M
   */
  coverage(xM: number, yM: number, spotRadiusM: number): number {
    const share = new Float64Array(1);
    this.paint.cover(Float64Array.of(xM, yM), spotRadiusM, share);
    return share[0]!;
  }

  /** The same for many spots at once, allocating nothing: x and y of each, m; writes one share each. */
  cover(spotsM: Float64Array, spotRadiusM: number, shares: Float64Array): void {
    this.paint.cover(spotsM, spotRadiusM, shares);
  }

  /**
   * Writes the place on the lane nearest to a point into `out`; projection.ts has the equations. Allocates nothing.
   *
   * @param nearM arc length around which to look, WINDOW_M to either side, m
   */
  project(xM: number, yM: number, nearM: number, out: Projection): void {
    this.projector.project(xM, yM, nearM, out);
  }
}

/**
 * Compiles a course that fits its schema.
 *
 * @throws FairleadError with every problem of its geometry
 */
export function compileCourse(course: Course, file?: string): Lane {
  const problems = laneProblems(course);
  if (problems.length > 0) {
    throw new FairleadError('The course cannot be laid out.', {
      problems,
      ...(file === undefined ? {} : { file }),
    });
  }
  return new Lane(course);
}
