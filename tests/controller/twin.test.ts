import { describe, expect, test } from 'vitest';
import {
  CLASS_SPEED_BITS,
  FULL_DUTY,
  PHASE,
  SPEED_MODEL_BITS,
  fullSpeedMps,
} from '../../src/controller/constants.js';
import { Twin } from '../../src/controller/twin.js';
import { deriveDesign } from '../../src/design/derive.js';
import { intermediateBounds, INT32_MAX } from '../../src/design/intervals.js';
import { Random } from '../../src/rehearsal/random.js';
import { demoVehicle } from '../design/demo-vehicle.js';

const { controller } = deriveDesign(demoVehicle());
const GROUND = Int32Array.from({ length: 6 }, () => 123);
const LINE = Int32Array.from({ length: 6 }, () => 839);
const CENTRE = Int32Array.from([123, 123, 839, 839, 123, 123]);
const LEFT = Int32Array.from([839, 839, 123, 123, 123, 123]);

/** Modelled speed, m/s. */
const speedMps = (twin: Twin) => (twin.speed / 2 ** SPEED_MODEL_BITS) * fullSpeedMps(controller);
/** Speed of a class, m/s. */
const classMps = (index: number) =>
  (controller.classes[index]!.speed / 2 ** CLASS_SPEED_BITS) * fullSpeedMps(controller);

function running(counts = CENTRE, samples = 1000): Twin {
  const twin = new Twin(controller);
  twin.start();
  for (let i = 0; i < samples; i++) twin.step(counts);
  return twin;
}

/** Samples until the twin is in a phase; fails after `most`. */
function samplesUntil(twin: Twin, counts: Int32Array, phase: number, most: number): number {
  for (let i = 1; i <= most; i++) {
    twin.step(counts);
    if (twin.phase === phase) return i;
  }
  throw new Error(`phase ${phase} not reached in ${most} samples`);
}

describe('on the line', () => {
  test('runs straight up to the speed of the fastest class', () => {
    const twin = running();
    expect(speedMps(twin)).toBeCloseTo(classMps(0), 2);
    expect(twin.dutyLeft).toBe(twin.dutyRight);
    expect(twin.classIndex).toBe(0);
  });

  test('turns towards the line, the inner wheel backward if need be', () => {
    const twin = running();
    twin.step(LEFT);
    expect(twin.curvature).toBeGreaterThan(0);
    expect(twin.dutyRight).toBeGreaterThan(twin.dutyLeft);
    expect(twin.dutyRight - twin.dutyLeft).toBeGreaterThan(FULL_DUTY / 2);
  });

  test('keeps the wheel difference when the outer wheel saturates', () => {
    const twin = running();
    for (let i = 0; i < 3; i++) twin.step(LEFT);
    expect(twin.dutyRight).toBe(FULL_DUTY);
    expect(twin.dutyLeft).toBeLessThan(0);
  });

  test('is slower in a bend and fast again one look-ahead after it', () => {
    const twin = running();
    const inBend = LEFT;
    for (let i = 0; i < 300; i++) twin.step(inBend);
    expect(twin.classIndex).toBeGreaterThan(1);
    const slow = speedMps(twin);
    expect(slow).toBeLessThan(0.9 * classMps(0));
    let drivenM = 0;
    while (speedMps(twin) <= slow * 1.02) {
      twin.step(CENTRE);
      drivenM += speedMps(twin) * 0.002;
      expect(drivenM).toBeLessThan(0.2);
    }
    expect(drivenM).toBeGreaterThan(0.03);
  });
});

describe('when the line vanishes', () => {
  test('from the middle it is a gap: course held, then a search, then a stop for good', () => {
    const twin = running();
    expect(samplesUntil(twin, GROUND, PHASE.gap, 1)).toBe(1);
    expect(Math.abs(twin.curvature)).toBeLessThan(50);
    const cruiseMps = speedMps(twin);
    const gapSamples = samplesUntil(twin, GROUND, PHASE.search, 500);
    // 40 mm of gap, 30 % reserve, spots' blur
    expect(gapSamples * 0.002 * cruiseMps).toBeCloseTo(0.07, 2);
    const searched = samplesUntil(twin, GROUND, PHASE.stopped, 2000);
    expect(searched).toBeLessThanOrEqual(controller.memory.searchSamples + 1);
    expect(twin).toMatchObject({ dutyLeft: 0, dutyRight: 0, stopped: true });
    for (let i = 0; i < 100; i++) twin.step(CENTRE);
    expect(twin).toMatchObject({ dutyLeft: 0, dutyRight: 0, stopped: true });
  });

  test('by the side it is searched on that side, and taken up again without a kick', () => {
    const twin = running();
    for (let i = 0; i < 5; i++) twin.step(LEFT);
    twin.step(Int32Array.from([839, 123, 123, 123, 123, 123]));
    twin.step(GROUND);
    expect(twin.phase).toBe(PHASE.search);
    expect(twin.curvature).toBe(controller.steering.searchCurvature);
    for (let i = 0; i < 100; i++) twin.step(GROUND);
    twin.step(CENTRE);
    expect(twin.phase).toBe(PHASE.follow);
    expect(Math.abs(twin.curvature)).toBeLessThan(10);
  });

  test('a crossing is passed straight on', () => {
    const twin = running();
    for (let i = 0; i < 10; i++) twin.step(LINE);
    expect(twin.phase).toBe(PHASE.crossing);
    twin.step(CENTRE);
    expect(twin.phase).toBe(PHASE.follow);
    expect(twin.dutyLeft).toBe(twin.dutyRight);
  });

  test('line everywhere ends in a stop as well', () => {
    const twin = running();
    const samples = samplesUntil(twin, LINE, PHASE.stopped, 3000);
    expect(samples).toBeLessThan(controller.memory.searchSamples + 200);
  });
});

describe.each(['pid', 'rules'] as const)('arithmetic, %s', (kind) => {
  const constants = deriveDesign(demoVehicle(kind)).controller;

  test('whatever the sensors read, every state stays a 32-bit integer and the duties in range', () => {
    const random = new Random(3, 1);
    const twin = new Twin(constants);
    twin.start();
    const counts = new Int32Array(6);
    const outside: string[] = [];
    for (let i = 0; i < 100_000; i++) {
      if (i % 7 === 0) for (let j = 0; j < 6; j++) counts[j] = Math.floor(random.uniform(0, 1024));
      if (twin.stopped) twin.start();
      twin.step(counts);
      if (Math.max(Math.abs(twin.dutyLeft), Math.abs(twin.dutyRight)) > FULL_DUTY) outside.push('duty');
      for (const [name, value] of [...Object.entries(twin), ...Object.entries(twin.memory)]) {
        if (typeof value === 'number' && value !== (value | 0)) outside.push(name);
      }
    }
    expect(outside).toEqual([]);
  });

  test('the interval analysis leaves head-room', () => {
    for (const { name, magnitude } of intermediateBounds(constants, 1023)) {
      expect(magnitude, name).toBeLessThanOrEqual(INT32_MAX);
    }
  });
});
