/** Magnitude in dB and phase in degrees of open loops, and the ranges that show them. */
import { radToDeg } from '../../sheet/units.js';
import type { DrawnLoop } from './drawn-loops.js';
import type { Point } from './polyline.js';

/** 20 log10 of a factor. */
export function decibels(factor: number): number {
  return 20 * Math.log10(factor);
}

/** [frequency in rad/s, magnitude in dB] */
export function magnitudePoints({ response, frequenciesRadS }: DrawnLoop): Point[] {
  return frequenciesRadS.map((w): Point => [w, decibels(Math.hypot(...response(w)))]);
}

/** [frequency in rad/s, phase in degrees], without jumps; it begins between -360 and 0. */
export function phasePoints({ response, frequenciesRadS }: DrawnLoop): Point[] {
  let before = -180;
  return frequenciesRadS.map((w): Point => {
    const [re, im] = response(w);
    const angle = radToDeg(Math.atan2(im, re));
    before = angle + 360 * Math.round((before - angle) / 360);
    return [w, before];
  });
}

export interface Ends {
  from: number;
  to: number;
}

export interface BodeRange {
  frequencyRadS: Ends;
  decibels: Ends;
  phaseDeg: Ends;
}

/** Range shown around the crossings: this share of the lowest and this multiple of the highest. */
const BELOW_CROSSOVER = 0.1;
const ABOVE_CROSSING = 2.5;
const MOST_DB = 60;
/** The end of the magnitude axis, unless a gain margin reaches below it. */
const LEAST_DB = -60;
const LEAST_PHASE_DEG = -360;

/** Ranges in which all the loops show their crossings, up to the Nyquist frequency at most. */
export function bodeRange(loops: readonly DrawnLoop[]): BodeRange {
  const crossings = loops.flatMap(({ marks }) =>
    [marks.gain, marks.phaseDeg, marks.ms].flatMap((m) => m ?? []),
  );
  const crossed = crossings.map(({ frequencyRadS }) => frequencyRadS);
  const lowest = Math.max(...loops.map(({ frequenciesRadS }) => frequenciesRadS[0]!));
  const nyquist = Math.min(...loops.map(({ frequenciesRadS }) => frequenciesRadS.at(-1)!));
  const frequencyRadS = {
    from: Math.max(lowest, BELOW_CROSSOVER * Math.min(...crossed)),
    to: Math.min(nyquist, ABOVE_CROSSING * Math.max(...crossed)),
  };
  const isShown = ([w]: Point) => w >= frequencyRadS.from && w <= frequencyRadS.to;
  const shown = (points: (loop: DrawnLoop) => Point[]) =>
    loops.flatMap((loop) =>
      points(loop)
        .filter(isShown)
        .map(([, value]) => value),
    );
  const rounded = (values: readonly number[], step: number, least: number, most: number): Ends => ({
    from: Math.max(least, step * Math.floor(Math.min(...values) / step)),
    to: Math.min(most, step * Math.ceil(Math.max(...values) / step)),
  });
  const gainMarks = loops.map(({ marks }) => -decibels(marks.gain?.margin ?? 1));
  const leastDb = Math.min(LEAST_DB, 20 * Math.floor(Math.min(...gainMarks) / 20));
  return {
    frequencyRadS,
    decibels: rounded([0, ...shown(magnitudePoints)], 20, leastDb, MOST_DB),
    phaseDeg: rounded([-180, ...shown(phasePoints)], 45, LEAST_PHASE_DEG, 0),
  };
}
