/**
 * Lateral error over the lane as a band over many runs: for each stretch of the lane the least and greatest error that any run had
 * there, and the root mean square of all. Traces are added one at a time and not kept.
 */
import type { Trace } from '../../rehearsal/engine.js';

/** Stretches that the lane is cut into. */
export const STRETCHES = 240;

/** One entry a stretch; NaN where no run came. */
export interface ErrorBand {
  runs: number;
  /** Middle of each stretch from the start of the lane, m. */
  atM: Float64Array;
  leastM: Float64Array;
  mostM: Float64Array;
  rmsM: Float64Array;
}

export class ErrorBandSum {
  private runs = 0;
  private readonly leastM = new Float64Array(STRETCHES).fill(Infinity);
  private readonly mostM = new Float64Array(STRETCHES).fill(-Infinity);
  private readonly squares = new Float64Array(STRETCHES);
  private readonly samples = new Float64Array(STRETCHES);

  constructor(private readonly laneM: number) {}

  /** Adds a run, all its laps. */
  add({ sM, lateralM }: Trace): void {
    this.runs++;
    for (let i = 0; i < sM.length; i++) {
      const share = sM[i]! / this.laneM;
      const stretch = Math.min(STRETCHES - 1, Math.floor((share - Math.floor(share)) * STRETCHES));
      const error = lateralM[i]!;
      this.leastM[stretch] = Math.min(this.leastM[stretch]!, error);
      this.mostM[stretch] = Math.max(this.mostM[stretch]!, error);
      this.squares[stretch]! += error * error;
      this.samples[stretch]!++;
    }
  }

  band(): ErrorBand {
    const seen = (values: Float64Array): Float64Array =>
      values.map((value, i) => (this.samples[i] === 0 ? NaN : value));
    return {
      runs: this.runs,
      atM: Float64Array.from({ length: STRETCHES }, (_, i) => ((i + 0.5) * this.laneM) / STRETCHES),
      leastM: seen(this.leastM),
      mostM: seen(this.mostM),
      rmsM: seen(this.squares.map((square, i) => Math.sqrt(square / this.samples[i]!))),
    };
  }
}
