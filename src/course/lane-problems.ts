/**
 * What a schema cannot say about a course: that it has line, that its bends can be painted, that a closed lane closes.
 */
import { degToRad, mToMm, mmToM, radToDeg } from '../sheet/units.js';
import type { Problem } from '../sheet/problem.js';
import { wrapAngle } from './arc.js';
import type { Course } from './course-types.js';
import { layOut } from './layout.js';

/** How far the end of a closed lane may lie from its start; what remains is bridged with paint. */
const CLOSING_MM = 10;
const CLOSING_DEG = 2;

/** Longest lane, so that a slip of a digit does not fill the memory, m. */
const LONGEST_M = 2000;

/** Every problem of a course that fits its schema; empty when there is none. */
export function laneProblems(course: Course): Problem[] {
  const problems: Problem[] = [];
  const layout = layOut(course);
  const narrowestMm = mToMm(layout.lineWidthM) / 2;
  course.pieces.forEach((piece, i) => {
    if (!('radiusMm' in piece)) return;
    if (piece.turnDeg === 0) {
      problems.push({
        pointer: `/pieces/${i}/turnDeg`,
        message: 'A bend must turn.',
        got: '0 deg',
        allowed: 'any other angle, positive to the left',
        fix: 'Give the change of heading, or use a straight.',
      });
    }
    if (piece.radiusMm < narrowestMm) {
      problems.push({
        pointer: `/pieces/${i}/radiusMm`,
        message: 'The bend is tighter than the line is wide.',
        got: `${piece.radiusMm} mm`,
        allowed: `at least ${narrowestMm} mm, half the line width`,
        fix: 'Enlarge the radius, or use a corner.',
      });
    }
  });
  if (!layout.pieces.some((piece) => piece.kind !== 'gap')) {
    problems.push({
      pointer: '/pieces',
      message: 'The lane has no line to follow.',
      got: 'no straight and no bend',
      allowed: 'at least one',
      fix: 'Add a piece such as { "straightMm": 500 }.',
    });
    return problems;
  }
  if (layout.lengthM > LONGEST_M) {
    problems.push({
      pointer: '/pieces',
      message: 'The lane is too long to rehearse.',
      got: `${layout.lengthM.toFixed(0)} m`,
      allowed: `at most ${LONGEST_M} m`,
      fix: 'Lengths are in millimetres; rehearse a shorter stretch.',
    });
  }
  if (layout.closed) {
    const { xM, yM, headingRad } = layout.end;
    const apartM = Math.hypot(xM, yM);
    const twistRad = wrapAngle(headingRad);
    if (apartM > mmToM(CLOSING_MM) || Math.abs(twistRad) > degToRad(CLOSING_DEG)) {
      problems.push({
        pointer: '/closed',
        message: 'The end of the closed lane does not meet its start.',
        got:
          `end at x ${mToMm(xM).toFixed(1)} mm, y ${mToMm(yM).toFixed(1)} mm, ` +
          `heading ${radToDeg(twistRad).toFixed(2)} deg off`,
        allowed: `within ${CLOSING_MM} mm of x 0, y 0 and ${CLOSING_DEG} deg of heading 0`,
        fix: 'Change straights and turns until the chain returns to its start, or set "closed" to false.',
      });
    }
  }
  return problems;
}
