/**
 * What is painted on the floor for a lane: straights and arcs, lines across at crossings, mitres at corners.
 */
import { alongArc } from './arc.js';
import type { Layout } from './layout.js';
import { MAX_SPOT_RADIUS_M, StripTable } from './paint.js';

/** Length of the line that a crossing paints across the lane, half of it to either side, m. */
export const CROSSING_LENGTH_M = 0.3;

export function laneStrips(layout: Layout): StripTable {
  const table = new StripTable();
  const { pieces, corners, crossings, end, closed, lineWidthM } = layout;
  const last = pieces.length - 1;
  /** What a closed lane fails to close by is painted over. */
  const seamM = closed ? Math.hypot(end.xM, end.yM) : 0;
  const cornerBefore = (index: number): number => {
    const turnRad = corners
      .filter((corner) => corner.before === index)
      .reduce((sum, corner) => sum + corner.turnRad, 0);
    return mitre(turnRad, lineWidthM);
  };
  pieces.forEach((piece, i) => {
    if (piece.kind === 'gap') return;
    const previous = i === 0 && closed ? last : i - 1;
    const next = i === last && closed ? 0 : i + 1;
    const isPainted = (index: number): boolean => pieces[index] !== undefined && pieces[index].kind !== 'gap';
    const [joinedBefore, joinedAfter] = [isPainted(previous), isPainted(next)];
    table.add(piece, piece.lengthM, piece.curvaturePerM, joinedBefore, joinedAfter);

    const leadM = joinedBefore ? cornerBefore(i) : 0;
    if (leadM > 0) table.add(alongArc(piece, -leadM, 0), leadM, 0, false, true);
    const overSeamM = i === last && seamM > 1e-9 ? seamM + MAX_SPOT_RADIUS_M : 0;
    const trailM = joinedAfter ? Math.max(cornerBefore(next), overSeamM) : 0;
    const endPose = alongArc(piece, piece.lengthM, piece.lengthM * piece.curvaturePerM);
    if (trailM > 0) table.add(endPose, trailM, 0, true, false);
  });
  for (const crossing of crossings) {
    const across = { ...crossing, headingRad: crossing.headingRad + Math.PI / 2 };
    table.add(alongArc(across, -CROSSING_LENGTH_M / 2, 0), CROSSING_LENGTH_M, 0, false, false);
  }
  return table;
}

/** How far a line runs on past a corner until its outer edge meets that of the next: the mitre, cut off at one line width. */
function mitre(turnRad: number, lineWidthM: number): number {
  return Math.min(lineWidthM, (lineWidthM / 2) * Math.tan(Math.min(Math.abs(turnRad), 3) / 2));
}
