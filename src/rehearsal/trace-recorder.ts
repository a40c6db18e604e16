/** Keeps a run's trace: a sample every few milliseconds of simulated time, in typed arrays that grow by doubling. */
import type { Trace } from './engine.js';
import type { Plant } from './plant.js';

/** Time between two samples, s. */
export const TRACE_PERIOD_S = 0.01;

/** What the controller was doing; -1 for class or phase where an engine cannot tell. */
export interface ControlState {
  /** -1 to 1. */
  dutyLeft: number;
  dutyRight: number;
  classIndex: number;
  phase: number;
}

export class TraceRecorder {
  private length = 0;
  private nextS = 0;
  private trace: Trace = makeTrace(1024);

  /** Takes a sample if one is due, or if told to. */
  record(plant: Plant, state: ControlState, force = false): void {
    if (plant.timeS < this.nextS && !force) return;
    this.nextS += TRACE_PERIOD_S;
    if (this.length === this.trace.timeS.length) this.grow();
    const { trace, length } = this;
    trace.timeS[length] = plant.timeS;
    trace.xM[length] = plant.xM;
    trace.yM[length] = plant.yM;
    trace.headingRad[length] = plant.headingRad;
    trace.sM[length] = plant.place.sM;
    trace.lateralM[length] = plant.place.lateralM;
    trace.speedMps[length] = plant.speedMps;
    trace.dutyLeft[length] = state.dutyLeft;
    trace.dutyRight[length] = state.dutyRight;
    trace.classIndex[length] = state.classIndex;
    trace.phase[length] = state.phase;
    this.length++;
  }

  /** The trace so far, in arrays of just its length. */
  finish(): Trace {
    return resized(this.trace, this.length);
  }

  private grow(): void {
    this.trace = resized(this.trace, 2 * this.length);
  }
}

function makeTrace(length: number): Trace {
  return {
    timeS: new Float64Array(length),
    xM: new Float64Array(length),
    yM: new Float64Array(length),
    headingRad: new Float64Array(length),
    sM: new Float64Array(length),
    lateralM: new Float64Array(length),
    speedMps: new Float64Array(length),
    dutyLeft: new Float64Array(length),
    dutyRight: new Float64Array(length),
    classIndex: new Int16Array(length),
    phase: new Int16Array(length),
  };
}

/** A copy cut or lengthened to a number of samples. */
function resized(trace: Trace, length: number): Trace {
  const copy = makeTrace(length);
  for (const column of Object.keys(copy) as (keyof Trace)[]) {
    copy[column].set(trace[column].subarray(0, length));
  }
  return copy;
}
