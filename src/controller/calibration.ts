/**
 * Calibration by sweep, in the firmware's integers: while the bar turns across the line, the least and the
 * largest reading of each sensor are kept; afterwards they give ground and gain.
 *
 * At the start the bar stands over the line, so that its outermost analog sensors see ground: what they read first,
 * beside what they read at most and at least, tells whether the line reads higher or lower than the ground.
 */
import { CALIBRATION_BITS, FULL_COVERAGE } from './constants.js';

/** Outcome of a sweep; `ok` is false when a sensor has seen too little contrast. */
export interface SweepOutcome {
  ok: boolean;
  /** Sensor with too little contrast, 0-based; -1 when all are well. */
  flatSensor: number;
  ground: Int32Array;
  gain: Int32Array;
}

export class SweepCalibration {
  private readonly least: Int32Array;
  private readonly most: Int32Array;
  private readonly initial: Int32Array;
  private samples = 0;

  /**
   * @param sensorCount number of sensors
   * @param minSpan least difference between line and ground that counts as contrast, counts
   * @param levels which sensors are digital: those read higher over the line, whatever the analog ones do
   */
  constructor(
    private readonly sensorCount: number,
    private readonly minSpan: number,
    private readonly levels: readonly boolean[] = [],
  ) {
    this.least = new Int32Array(sensorCount);
    this.most = new Int32Array(sensorCount);
    this.initial = new Int32Array(sensorCount);
  }

  /** Takes one set of readings, counts. */
  observe(counts: Int32Array): void {
    for (let i = 0; i < this.sensorCount; i++) {
      const count = counts[i] as number;
      if (this.samples === 0) this.initial[i] = this.least[i] = this.most[i] = count;
      if (count < (this.least[i] as number)) this.least[i] = count;
      if (count > (this.most[i] as number)) this.most[i] = count;
    }
    this.samples = 1;
  }

  /** Ground and gain of each sensor from what was seen. */
  finish(): SweepOutcome {
    const analog = Array.from({ length: this.sensorCount }, (_, i) => i).filter((i) => !this.levels[i]);
    const rise = this.riseOf(analog[0] as number) + this.riseOf(analog.at(-1) as number);
    const ground = new Int32Array(this.sensorCount);
    const gain = new Int32Array(this.sensorCount);
    let flatSensor = -1;
    for (let i = 0; i < this.sensorCount; i++) {
      const span = (this.most[i] as number) - (this.least[i] as number);
      if (span < this.minSpan) {
        if (flatSensor < 0) flatSensor = i;
        continue;
      }
      // up, so that the line itself is a full coverage
      const scale = Math.floor(((FULL_COVERAGE << CALIBRATION_BITS) + span - 1) / span);
      const higher = rise >= 0 || this.levels[i] === true;
      ground[i] = higher ? (this.least[i] as number) : (this.most[i] as number);
      gain[i] = higher ? scale : -scale;
    }
    return { ok: flatSensor < 0, flatSensor, ground, gain };
  }

  /** How much further a sensor's reading rose above its first value than it fell below it, counts. */
  private riseOf(i: number): number {
    return (this.most[i] as number) + (this.least[i] as number) - 2 * (this.initial[i] as number);
  }
}
