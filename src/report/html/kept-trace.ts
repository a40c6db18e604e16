/** The samples of a trace that the report keeps: every k-th and the last, with the smallest k that leaves MOST_SAMPLES at most. */
import type { Trace } from '../../rehearsal/engine.js';
import { mToMm } from '../../sheet/units.js';

export const MOST_SAMPLES = 1000;

export type KeptTrace = Omit<Trace, 'headingRad' | 'phase'>;

/** @returns the samples kept, and k */
export function keptTrace(trace: Trace): { kept: KeptTrace; every: number } {
  const { length } = trace.timeS;
  const every = Math.max(1, Math.ceil((length - 1) / (MOST_SAMPLES - 1)));
  const isKept = (_: number, i: number): boolean => i % every === 0 || i === length - 1;
  const { timeS, xM, yM, sM, lateralM, speedMps, dutyLeft, dutyRight, classIndex } = trace;
  return {
    every,
    kept: {
      timeS: timeS.filter(isKept),
      xM: xM.filter(isKept),
      yM: yM.filter(isKept),
      sM: sM.filter(isKept),
      lateralM: lateralM.filter(isKept),
      speedMps: speedMps.filter(isKept),
      dutyLeft: dutyLeft.filter(isKept),
      dutyRight: dutyRight.filter(isKept),
      classIndex: classIndex.filter(isKept),
    },
  };
}

/** Columns for the page's script, as integers: times in ms, places in mm, error in 0.1 mm, speed in mm/s, duties in percent. */
export function traceColumns(trace: KeptTrace): Record<string, number[]> {
  const whole = (values: Float64Array | Int16Array, factor: number): number[] =>
    Array.from(values, (value) => Math.round(value * factor) + 0);
  const mm = mToMm(1);
  return {
    t: whole(trace.timeS, 1000),
    x: whole(trace.xM, mm),
    y: whole(trace.yM, mm),
    s: whole(trace.sM, mm),
    e: whole(trace.lateralM, 10 * mm),
    v: whole(trace.speedMps, mm),
    l: whole(trace.dutyLeft, 100),
    r: whole(trace.dutyRight, 100),
    c: whole(trace.classIndex, 1),
  };
}
