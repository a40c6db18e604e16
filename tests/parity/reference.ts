/** The twin on a trace: the input that a C++ harness gets, and the output that it must give. */
import { SweepCalibration } from '../../src/controller/calibration.js';
import { Twin } from '../../src/controller/twin.js';
import type { FirmwareDesign } from '../../src/firmware/render.js';
import { EdgeTrace } from './edge-trace.js';
import { BarTrace } from './traces.js';

/** What is compared in each step. */
export const FIELDS = [
  'phase',
  'class',
  'offset',
  'curvature',
  'speed',
  'dutyLeft',
  'dutyRight',
  'blocked',
] as const;

const RESTART_EVERY = 1500;
const SWEEP_SAMPLES = 400;

export interface Reference {
  input: Int32Array;
  expected: Int32Array;
  /** Numbers before the first step. */
  preamble: number;
}

/**
 * @param steps control steps
 * @param seed of the trace
 */
export function reference(design: FirmwareDesign, steps: number, seed: number): Reference {
  const { vehicle, controller } = design;
  const trace = new BarTrace(vehicle, seed);
  const input: number[] = [];
  const expected: number[] = [];
  let constants = controller;
  if (controller.sweep !== undefined) {
    const calibration = new SweepCalibration(
      controller.sensing.sensorCount,
      controller.sweep.minSpan,
      controller.sensing.levels,
    );
    input.push(SWEEP_SAMPLES);
    for (const counts of trace.sweep(SWEEP_SAMPLES)) {
      calibration.observe(counts);
      input.push(...counts);
    }
    const { flatSensor, ground, gain } = calibration.finish();
    expected.push(flatSensor + 1, ...ground, ...gain);
    constants = { ...controller, sensing: { ...controller.sensing, ground: [...ground], gain: [...gain] } };
  }
  const preamble = expected.length;
  input.push(steps, RESTART_EVERY);
  const twin = new Twin(constants);
  const edges = new EdgeTrace(controller, seed);
  const counts = new Int32Array(controller.sensing.sensorCount);
  for (let i = 0; i < steps; i++) {
    if (i % RESTART_EVERY === 0) twin.start();
    trace.next(counts);
    input.push(...counts);
    if (twin.wheels) {
      const [left, right] = edges.next(twin);
      input.push(left, right);
      twin.wheels.count(left, right);
    }
    twin.step(counts);
    expected.push(twin.phase, twin.classIndex, twin.sensing.offset, twin.curvature, twin.speed);
    expected.push(twin.dutyLeft, twin.dutyRight, Number(twin.wheels?.blocked ?? false));
  }
  return { input: Int32Array.from(input), expected: Int32Array.from(expected), preamble };
}

/** Where two outputs first differ, in words; undefined when they are equal. */
export function firstDifference({ expected, preamble }: Reference, got: Int32Array): string | undefined {
  const at = expected.findIndex((value, i) => value !== got[i]);
  if (at < 0)
    return got.length === expected.length ? undefined : `${got.length} numbers, not ${expected.length}`;
  const values = `${got[at]} instead of ${expected[at]}`;
  if (at < preamble) return `calibration, number ${at}: ${values}`;
  const step = Math.floor((at - preamble) / FIELDS.length);
  return `step ${step}, ${FIELDS[(at - preamble) % FIELDS.length]}: ${values}`;
}
