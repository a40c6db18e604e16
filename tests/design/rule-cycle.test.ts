import { describe, expect, test } from 'vitest';
import { FULL_DUTY } from '../../src/controller/constants.js';
import { Twin } from '../../src/controller/twin.js';
import { compileCourse } from '../../src/course/lane.js';
import { twinDelayS } from '../../src/design/delay.js';
import { unprovenDesign } from '../../src/design/derive.js';
import type { Design } from '../../src/design/design.js';
import { largestSwingM, predictCycles, staircase } from '../../src/design/rule-cycle.js';
import { LEAST_MARGINS } from '../../src/design/tolerance-box.js';
import { perturbedPlant } from '../../src/rehearsal/plant-parameters.js';
import { Plant } from '../../src/rehearsal/plant.js';
import { demoVehicle } from '../design/demo-vehicle.js';

const vehicle = demoVehicle('rules');
const { classes } = unprovenDesign(vehicle);

test('the staircase of the demo rises by the proportional gain over the view', () => {
  const steps = staircase(vehicle, 351);
  // the last state stands for 29.5 mm, the middle of 24.5 to 34.5 mm
  const sum = steps.reduce((total, { height }) => total + height, 0);
  expect(sum).toBeCloseTo(351 * 0.0295, 0);
  expect(steps[0]!.at).toBeCloseTo(0.0045, 4);
});

test('the margins that every law keeps rule a limit cycle out', () => {
  for (const { name, gainRatio, criticalRatio, cycles } of predictCycles(vehicle, classes)) {
    expect(gainRatio, name).toBeLessThan(LEAST_MARGINS.gainMargin);
    expect(gainRatio, name).toBeGreaterThan(0.9);
    expect(criticalRatio, name).toBeGreaterThan(LEAST_MARGINS.gainMargin);
    expect(cycles, name).toEqual([]);
  }
});

describe('cycles of laws without damping, against the twin on a straight', () => {
  const lane = compileCourse({
    courseVersion: 1,
    closed: false,
    lineWidthMm: 19,
    pieces: [{ straightMm: 20_000 }],
  });

  /** The middle of the bar beside the line, m, over the second half of 15 m, and the sample period. */
  function swing(design: Design): { offsetM: number[]; periodS: number } {
    const twin = new Twin(design.controller);
    twin.start();
    const nominal = perturbedPlant(design.vehicle, 0);
    const plant = new Plant({ ...nominal, noiseShare: 0, startLateralM: 0.006 }, lane);
    const counts = new Int32Array(plant.sensorCount);
    const { samplePeriodS: periodS } = design.vehicle.board;
    const delayS = twinDelayS(design.vehicle);
    const samples = Math.round(15 / design.classes[0]!.speedMps / periodS);
    const offsetM: number[] = [];
    let [left, right] = [0, 0];
    for (let i = 0; i < samples; i++) {
      plant.readCounts(counts);
      twin.step(counts);
      plant.step(left, right, delayS);
      [left, right] = [twin.dutyLeft / FULL_DUTY, twin.dutyRight / FULL_DUTY];
      plant.step(left, right, periodS - delayS);
      offsetM.push(plant.yM + design.vehicle.bar.aheadM * Math.sin(plant.headingRad));
    }
    return { offsetM: offsetM.slice(samples / 2), periodS };
  }

  const none = { motorGain: 0, lag: 0, grip: 0 };
  const designAt = (proportionalPerM2: number, speedMps: number) =>
    unprovenDesign({
      ...vehicle,
      tolerance: none,
      speeds: { ...vehicle.speeds, classes: [{ name: 'all', minRadiusM: 0.12, speedMps }] },
      control: { ...vehicle.control, gains: { proportionalPerM2, derivativeTimeS: 0, filterTimeS: 0.004 } },
    });
  const predictionAt = (gain: number, speedMps: number) => {
    const design = designAt(gain, speedMps);
    return predictCycles(design.vehicle, design.classes)[0]!;
  };

  /** Speed at which the loop bears 1.1 times the gain, m/s: less than the staircase's steepest. */
  function brinkMps(gain: number): number {
    let [low, high] = [0.5, 1];
    for (let i = 0; i < 20; i++) {
      const middle = (low + high) / 2;
      if (predictionAt(gain, middle).criticalRatio > 1.1) low = middle;
      else high = middle;
    }
    return low;
  }

  test.each([250, 356, 500, 700])('kp %d: amplitude within 30 %%, frequency within 12 %%', (gain) => {
    const speedMps = brinkMps(gain);
    const { cycles } = predictionAt(gain, speedMps);
    const { offsetM, periodS } = swing(designAt(gain, speedMps));
    const amplitude = (Math.max(...offsetM) - Math.min(...offsetM)) / 2;
    const rises = offsetM.filter((y, i) => y >= 0 && (offsetM[i - 1] ?? 0) < 0).length;
    const frequencyRadS = (2 * Math.PI * rises) / (offsetM.length * periodS);
    // a swing that grows from the start of a run settles at the first stable cycle
    expect(Math.abs(cycles[0]!.amplitude / amplitude - 1)).toBeLessThan(0.3);
    expect(Math.abs(cycles[0]!.frequencyRadS / frequencyRadS - 1)).toBeLessThan(0.12);
  });
});

test('a lag beyond look-ahead over speed is told to swing until the line is lost', () => {
  const design = unprovenDesign({
    ...vehicle,
    speeds: { ...vehicle.speeds, classes: [{ name: 'all', minRadiusM: 0.12, speedMps: 1.2 }] },
    control: {
      ...vehicle.control,
      gains: { proportionalPerM2: 356, derivativeTimeS: 0, filterTimeS: 0.004 },
    },
  });
  expect(predictCycles(design.vehicle, design.classes)).toMatchObject([
    { criticalRatio: 0, cycles: [], grows: true },
  ]);
  expect(largestSwingM(design.vehicle, design.classes[0]!, 356)).toBe(Infinity);
  expect(design.remarks.join(' ')).toMatch(/larger than the 10 mm of the sheet: all until the line is lost/);
});
