/** Courses that the tests of several modules share. */
import { readFileSync } from 'node:fs';
import type { Course } from '../../src/course/course-types.js';

type Pieces = Course['pieces'];

export function open(...pieces: Pieces): Course {
  return { courseVersion: 1, closed: false, lineWidthMm: 19, pieces };
}

export function closed(...pieces: Pieces): Course {
  return { courseVersion: 1, closed: true, lineWidthMm: 19, pieces };
}

/** The same course seen in a mirror: every left turn to the right. */
export function mirrored(course: Course): Course {
  const pieces = course.pieces.map((piece) => {
    if ('turnDeg' in piece) return { ...piece, turnDeg: -piece.turnDeg };
    if ('cornerDeg' in piece) return { cornerDeg: -piece.cornerDeg };
    return piece;
  });
  return { ...course, pieces };
}

/** An oval of two straights and two half circles. */
export function oval(straightMm: number, radiusMm: number): Course {
  const half = { radiusMm, turnDeg: 180 };
  return closed({ straightMm }, half, { straightMm }, half);
}

export const EXAMPLES = {
  nursery: 'tray-cart/nursery-lane.json',
  wide: 'courses/wide.json',
  winding: 'courses/winding.json',
  hard: 'courses/hard.json',
} as const;

export function example(name: keyof typeof EXAMPLES): Course {
  const path = new URL(`../../examples/${EXAMPLES[name]}`, import.meta.url);
  return JSON.parse(readFileSync(path, 'utf8')) as Course;
}
