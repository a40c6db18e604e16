/** Where a course asks for more than the sheet says: what the vehicle was not designed for it may not master. */
import type { Lane } from '../course/lane.js';
import { mToMm, radToDeg } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';

/** Differences below this are rounding, m. */
const SLACK_M = 1e-6;
/** Line widths that differ by less than this read alike, m. */
const WIDTH_SLACK_M = 5e-4;

const mm = (m: number): string => `${mToMm(m).toFixed(m < 0.01 ? 1 : 0)} mm`;

/** Length of the longest stretch without line, m. */
function longestGapM(lane: Lane): number {
  let longest = 0;
  let current = 0;
  for (const { kind, lengthM } of lane.pieces) {
    current = kind === 'gap' ? current + lengthM : 0;
    longest = Math.max(longest, current);
  }
  return longest;
}

/** One sentence for each thing on the course that the sheet does not announce; none when it fits. */
export function courseNotes(vehicle: Vehicle, lane: Lane): string[] {
  const { line } = vehicle;
  const notes: string[] = [];
  const tightestM = 1 / Math.max(...lane.pieces.map((piece) => Math.abs(piece.curvaturePerM)));
  if (tightestM < line.tightestRadiusM - SLACK_M) {
    notes.push(
      `The course has a bend of ${mm(tightestM)}, the sheet's tightest (/line/tightestRadiusMm) is ${mm(line.tightestRadiusM)}.`,
    );
  }
  const gapM = longestGapM(lane);
  if (gapM > line.longestGapM + SLACK_M) {
    notes.push(
      `The course has a gap of ${mm(gapM)}, the sheet's longest (/line/longestGapMm) is ${mm(line.longestGapM)}.`,
    );
  }
  if (lane.crossings.length > 0 && !line.crossings) {
    notes.push('The course has a crossing, the sheet (/line/crossings) says there are none.');
  }
  if (Math.abs(lane.lineWidthM - line.widthM) > WIDTH_SLACK_M) {
    notes.push(
      `The line of the course is ${mm(lane.lineWidthM)} wide, that of the sheet (/line/widthMm) ${mm(line.widthM)}.`,
    );
  }
  const sharpest = Math.max(0, ...lane.corners.map((corner) => Math.abs(corner.turnRad)));
  if (sharpest > 0) {
    notes.push(
      `The course has a corner of ${radToDeg(sharpest).toFixed(0)} deg: it is taken by a search, not by following.`,
    );
  }
  return notes;
}
