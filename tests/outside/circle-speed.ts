import { lapBound } from '../../src/course/bound.js';
import { compileCourse } from '../../src/course/lane.js';
import { closed } from '../course/courses.js';

/** Lanes longer than this are scaled down; a speed limited by grip goes with the root of the radius. */
const LARGEST_M = 10;

/** Vehicle that nothing but grip limits. */
export const FREE = { topSpeedMps: 1e3, lagS: 1e-9, trackM: 1e-9 };

/** Speed at which the bound on the lap time goes round a circle, m/s. */
export function circleSpeedMps(grip: number, radiusM: number): number {
  const scale = Math.max(1, radiusM / LARGEST_M);
  const lane = compileCourse(closed({ radiusMm: (1000 * radiusM) / scale, turnDeg: 360 }));
  const { lapS } = lapBound({ ...FREE, lane, grip });
  return (Math.sqrt(scale) * 2 * Math.PI * (radiusM / scale)) / lapS;
}
