/** The loops that the pictures of margins show: of the tightest bend's class and of the fastest, nominal and in the worst corners. */
import { classForBend } from '../../design/class-for-bend.js';
import type { Design, DesignedClass } from '../../design/design.js';
import { samplePlant } from '../../design/lane-plant.js';
import { type LoopMarks, frequencyGrid, loopMarks, worstCorners } from '../../design/loop-marks.js';
import type { Response } from '../../design/margins.js';
import { type Corner, lanePlantOf } from '../../design/tolerance-box.js';
import { controllerOf, openLoop } from '../../design/steering-loop.js';
import { mToMm } from '../../sheet/units.js';

/** The class of the tightest bend, then the fastest one where it is another. */
export function drawnClasses({ vehicle, classes }: Design): DesignedClass[] {
  const tight = classForBend(classes, vehicle.line.tightestRadiusM);
  const fastest = classes.reduce((found, each) => (each.speedMps > found.speedMps ? each : found));
  return tight === fastest ? [tight] : [tight, fastest];
}

/** Name, speed and radius of a class, for the head of a plot. */
export function classHeading({ name, speedMps, minRadiusM }: DesignedClass): string {
  return `${name}: ${speedMps.toFixed(2)} m/s, bends from ${mToMm(minRadiusM).toFixed(0)} mm`;
}

/** What the columns of a picture show, a sentence for each class and each loop, for who cannot see it. */
export function columnsInWords(
  columns: readonly { designed: DesignedClass; loops: readonly { words: string }[] }[],
): string {
  return columns
    .map(
      ({ designed, loops }) =>
        `${classHeading(designed)}. ${loops.map(({ words }) => `${words}.`).join(' ')}`,
    )
    .join(' ');
}

/** What sets a corner of the tolerance box apart. */
export function cornerWords({ gain, lag }: Corner): string {
  return `speed \u00d7${gain.toFixed(2)}, lag \u00d7${lag.toFixed(2)}`;
}

const GRID_POINTS = 600;
/** Far below any crossover, as a share of 1 / lag. */
const LOWEST_SHARE = 0.01;

/** An open loop in one corner. */
export interface DrawnLoop {
  corner: Corner;
  response: Response;
  /** Where the loop was looked at, rad/s; the last one is the Nyquist frequency. */
  frequenciesRadS: readonly number[];
  marks: LoopMarks;
}

function drawnLoop({ vehicle }: Design, { speedMps, gains }: DesignedClass, corner: Corner): DrawnLoop {
  const plant = lanePlantOf(vehicle, speedMps, corner);
  const response = openLoop(samplePlant(plant), controllerOf(gains, plant.speedMps, plant.samplePeriodS));
  const nyquist = Math.PI / plant.samplePeriodS;
  const frequenciesRadS = frequencyGrid(LOWEST_SHARE / plant.lagS, nyquist, GRID_POINTS);
  return { corner, response, frequenciesRadS, marks: loopMarks(response, frequenciesRadS) };
}

/** The loops of a class; two of them are the same object where the same corner is the worst for both. */
export interface ClassLoops {
  nominal: DrawnLoop;
  worstGain: DrawnLoop;
  worstPhase: DrawnLoop;
  worstMs: DrawnLoop;
}

export function classLoops(design: Design, designed: DesignedClass): ClassLoops {
  const nominal = drawnLoop(design, designed, { gain: 1, lag: 1 });
  const found = [nominal];
  const loopIn = (corner: Corner): DrawnLoop => {
    const known = found.find((each) => each.corner.gain === corner.gain && each.corner.lag === corner.lag);
    if (known) return known;
    const loop = drawnLoop(design, designed, corner);
    found.push(loop);
    return loop;
  };
  const worst = worstCorners(design.vehicle, designed.speedMps, designed.gains);
  return {
    nominal,
    worstGain: loopIn(worst.gain),
    worstPhase: loopIn(worst.phase),
    worstMs: loopIn(worst.ms),
  };
}

/** Margins as they are written in pictures. */
export const marginWords = {
  gain: (factor: number): string => (Number.isFinite(factor) ? factor.toFixed(1) : 'without limit'),
  phase: (deg: number): string => (Number.isFinite(deg) ? `${deg.toFixed(0)}\u00b0` : 'without limit'),
};
