import { describe, expect, it } from 'vitest';
import { compileCourse } from '../../src/course/lane.js';
import { countedLapsS, median } from '../../src/rehearsal/metrics.js';
import type { PlantParameters } from '../../src/rehearsal/plant-parameters.js';
import { TwinEngine, type ControlStep } from '../../src/rehearsal/twin-engine.js';
import { lapBound } from '../../src/course/bound.js';
import { example, open } from '../course/courses.js';
import { plainPlant, Pursuit } from './vehicles.js';

const TIMING = { samplePeriodS: 2e-3, delayS: 0.6e-3, pwmSteps: 255 };
const wide = compileCourse(example('wide'));

function pursuitEngine(plant: PlantParameters, speedMps: number): TwinEngine {
  return new TwinEngine(() => new Pursuit(plant, speedMps), TIMING);
}

describe('TwinEngine with a pursuit controller', () => {
  const plant = plainPlant({ startDuty: 0.1, noiseShare: 0.003, seed: 4, startLateralM: 0.004 });
  const setup = { plant, lane: wide, laps: 3, timeLimitS: 60, sampleTrace: true };
  const result = pursuitEngine(plant, 0.7).runNow(setup);

  it('laps the wide course at the speed it is set to', () => {
    expect(result.loss).toBeUndefined();
    expect(result.lapsS).toHaveLength(3);
    expect(median(countedLapsS(result))).toBeCloseTo(wide.lengthM / 0.7, 0);
    expect(result.maxLateralM).toBeLessThan(0.02);
    expect(result.rmsLateralM).toBeLessThan(0.01);
  });

  it('is slower from standing, and slower than physics allows', () => {
    const [first, second, third] = result.lapsS;
    expect(first).toBeGreaterThan(second! + 0.05);
    expect(Math.abs(second! - third!)).toBeLessThan(0.03);
    const bound = lapBound({ lane: wide, topSpeedMps: 1.5, lagS: 0.08, grip: 0.7, trackM: 0.12 });
    expect(second).toBeGreaterThan(bound.lapS);
  });

  it('ends as soon as the last lap is full', () => {
    const driven = result.lapsS.reduce((sum, lap) => sum + lap, 0);
    expect(result.timeS - driven).toBeGreaterThanOrEqual(0);
    expect(result.timeS - driven).toBeLessThan(0.01);
  });

  it('keeps a trace in even columns, through to the end', () => {
    const { trace } = result;
    const columns = Object.values(trace!) as ArrayLike<number>[];
    expect(new Set(columns.map((column) => column.length)).size).toBe(1);
    expect(trace!.timeS.at(-1)).toBe(result.timeS);
    expect(trace!.sM.at(-1)).toBeCloseTo(3 * wide.lengthM, 2);
    expect(trace!.timeS[100]! - trace!.timeS[99]!).toBeCloseTo(0.01, 2);
    expect(Math.max(...trace!.lateralM.map(Math.abs))).toBeLessThanOrEqual(result.maxLateralM);
    expect(trace!.speedMps[200]).toBeCloseTo(0.7, 1);
  });

  it('repeats to the last bit', () => {
    const again = pursuitEngine(plant, 0.7).runNow({ ...setup, sampleTrace: false });
    expect(again.lapsS).toEqual(result.lapsS);
    expect(again.rmsLateralM).toBe(result.rmsLateralM);
    expect(again.trace).toBeUndefined();
    const other = { ...plant, seed: 5 };
    expect(pursuitEngine(other, 0.7).runNow({ ...setup, plant: other }).rmsLateralM).not.toBe(
      result.rmsLateralM,
    );
  });

  it('loses the winding course when it is too fast, and says where', () => {
    const lane = compileCourse(example('winding'));
    const { loss, lapsS } = pursuitEngine(plant, 1.4).runNow({ ...setup, lane });
    expect(loss).toMatchObject({ reason: 'off-lane' });
    const near = lane.poseAt(loss!.sM);
    expect(Math.hypot(near.xM - loss!.xM, near.yM - loss!.yM)).toBeLessThan(0.1);
    expect(lapsS.length).toBeLessThan(3);
  });
});

/** A controller that gives duties by the number of the step, and keeps what it is told. */
class Scripted implements ControlStep {
  readonly classIndex = 2;
  readonly phase = 1;
  dutyLeft = 0;
  dutyRight = 0;
  steps = 0;
  last: number[] = [];

  constructor(
    private readonly duties: (step: number) => readonly [left: number, right: number],
    private readonly stopAfter = Infinity,
  ) {}

  get stopped(): boolean {
    return this.steps > this.stopAfter;
  }

  step(counts: Int32Array): void {
    this.steps++;
    this.last = [...counts];
    [this.dutyLeft, this.dutyRight] = this.duties(this.steps);
  }
}

function fixed(duty: number, stopAfter?: number): Scripted {
  return new Scripted(() => [duty, duty], stopAfter);
}

describe('timing', () => {
  const lane = compileCourse(open({ straightMm: 2000 }));
  const plant = plainPlant({ grip: 1e6, lagS: 1e-9 });

  it('puts new duties in force after the delay, not before', () => {
    // Without lag the vehicle covers exactly (time - delay) times speed; the first period's delay is lost.
    const control = fixed(2048, 99);
    const engine = new TwinEngine(() => control, { samplePeriodS: 4e-3, delayS: 1.5e-3, pwmSteps: 65535 });
    const { loss } = engine.runNow({ plant, lane, laps: 1, timeLimitS: 10, sampleTrace: false });
    expect(loss).toMatchObject({ reason: 'stopped' });
    expect(loss!.timeS).toBeCloseTo(100 * 4e-3, 9);
    expect(loss!.xM).toBeCloseTo(0.75 * (32768 / 65535 / 0.5) * (loss!.timeS - 1.5e-3), 6);
    expect(control.last).toEqual([100, 100, 900, 900, 100, 100]);
  });

  it.each([
    [1000, 62 / 255],
    [-1000, -62 / 255],
    [4096, 1],
    [7, 0],
  ])('rounds duty %i to the steps of the PWM', (duty, expected) => {
    const engine = new TwinEngine(() => fixed(duty, 3), TIMING);
    const { trace } = engine.runNow({ plant, lane, laps: 1, timeLimitS: 10, sampleTrace: true });
    expect(trace!.dutyLeft.at(-1)).toBe(expected);
    expect(trace!.classIndex.at(-1)).toBe(2);
    expect(trace!.phase.at(-1)).toBe(1);
  });

  it('refuses a delay that does not fit', () => {
    expect(() => new TwinEngine(() => fixed(0), { ...TIMING, delayS: 2e-3 })).toThrow(
      'A delay of 0.002 s does not fit into a sample period of 0.002 s.',
    );
  });
});

describe('verdicts', () => {
  const lane = compileCourse(open({ straightMm: 1000 }));

  function run(control: ControlStep, timeLimitS = 60): ReturnType<TwinEngine['runNow']> {
    const setup = { plant: plainPlant(), lane, laps: 1, timeLimitS, sampleTrace: false };
    return new TwinEngine(() => control, TIMING).runNow(setup);
  }

  it('finish an open lane when the bar reaches its end', () => {
    const { loss, lapsS, timeS } = run(fixed(2048));
    expect(loss).toBeUndefined();
    // x(t) = 0.75 (t - lag (1 - exp(-t/lag))), some 10 ms more for grip at the start.
    expect(lapsS[0]).toBeCloseTo((1 - 0.075) / 0.75 + 0.08, 1);
    expect(timeS).toBeCloseTo(lapsS[0]!, 1);
  });

  it('do not wait for a vehicle that never starts', () => {
    expect(run(fixed(0)).loss).toMatchObject({ reason: 'no-progress', sM: 0 });
    expect(run(fixed(0)).timeS).toBeCloseTo(15, 1);
  });

  it('let a vehicle turn on the spot before it sets off', () => {
    const [turn, drive] = [250, 2048];
    const dance = new Scripted((step) =>
      step < 500 ? [-turn, turn] : step < 1000 ? [turn, -turn] : [drive, drive],
    );
    const { loss, lapsS, timeS } = run(dance);
    expect(loss).toBeUndefined();
    expect(timeS - lapsS[0]!).toBeCloseTo(2, 1);
  });

  it('notice a vehicle that stands still on the way', () => {
    const { loss } = run(new Scripted((step) => (step < 250 ? [2048, 2048] : [0, 0])));
    expect(loss?.reason).toBe('no-progress');
    expect(loss?.sM).toBeGreaterThan(0.1);
    expect(loss?.sM).toBeLessThan(0.9);
    expect(loss?.timeS).toBeGreaterThan(3);
    expect(loss?.timeS).toBeLessThan(4.5);
  });

  it('hold to the time limit', () => {
    expect(run(fixed(100), 2).loss).toMatchObject({ reason: 'time-limit' });
  });
});
