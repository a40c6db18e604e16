/** One rehearsed run as the plots need it, and the numbers along their axes. */
import type { Lane } from '../course/lane.js';
import { CROSSING_LENGTH_M } from '../course/lane-strips.js';
import type { Loss, Trace } from '../rehearsal/engine.js';

export interface DrivenRun {
  lane: Lane;
  trace: Trace;
  /** Where the run was lost; absent when it finished. */
  loss?: Loss;
}

/** Extent of a picture of the lane and the path beside it, m. */
export interface Extent {
  left: number;
  right: number;
  bottom: number;
  top: number;
}

/** The smallest rectangle around lane, crossings and path. */
export function extentOf({ lane, trace }: DrivenRun): Extent {
  const poses: { xM: number; yM: number }[] = lanePoses(lane, 0.02);
  for (const { xM, yM, headingRad } of lane.crossings) {
    for (const side of [-CROSSING_LENGTH_M / 2, CROSSING_LENGTH_M / 2]) {
      poses.push({ xM: xM - side * Math.sin(headingRad), yM: yM + side * Math.cos(headingRad) });
    }
  }
  const xs = [...poses.map((pose) => pose.xM), ...trace.xM];
  const ys = [...poses.map((pose) => pose.yM), ...trace.yM];
  return { left: least(xs), right: most(xs), bottom: least(ys), top: most(ys) };
}

/** Poses along the lane, about as far apart as asked, both ends included. */
export function lanePoses(lane: Lane, stepM: number): { xM: number; yM: number; headingRad: number }[] {
  const count = Math.max(2, Math.ceil(lane.lengthM / stepM));
  // The end of a closed lane is its start: a hair before it is still on the last piece.
  return Array.from({ length: count + 1 }, (_, i) => lane.poseAt((lane.lengthM * (1 - 1e-12) * i) / count));
}

/** Least and greatest of many numbers; spreading them as arguments would exhaust the stack. */
export function least(values: ArrayLike<number>): number {
  let found = Infinity;
  for (let i = 0; i < values.length; i++) found = Math.min(found, values[i]!);
  return found;
}

export function most(values: ArrayLike<number>): number {
  let found = -Infinity;
  for (let i = 0; i < values.length; i++) found = Math.max(found, values[i]!);
  return found;
}
