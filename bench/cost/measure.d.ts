export interface StepCosts {
  /** Measured steps. */
  steps: number;
  /** How deep the stack came, by what is left of the paint above the static use. */
  stackBytes: number;
  /** From the first conversion of a scan to the last write to the motors, cycles; one entry a step, as in all lists. */
  stepCycles: number[];
  /** Spent in interrupts since the step before. */
  interruptCycles: number[];
  /** From all sensors sampled to the last write to the motors. */
  pwmCycles: number[];
  /** From the first conversion to the end of the last. */
  scanCycles: number[];
}

export function measureSteps(
  program: Uint8Array,
  reading: (channel: number, timeS: number) => number,
  span: { sensorCount: number; fromS: number; toS: number },
  staticBytes?: number,
): StepCosts;

export function harshReadings(sensorCount: number): (channel: number, timeS: number) => number;

export function wanderingLine(sensorCount: number): (channel: number, timeS: number) => number;

export function meanAndMax(values: readonly number[]): { mean: number; max: number };
