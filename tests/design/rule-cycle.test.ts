import { expect, test } from 'vitest';
import { deriveDesign } from '../../src/design/derive.js';
import { predictCycles, staircase } from '../../src/design/rule-cycle.js';
import { LEAST_MARGINS } from '../../src/design/tolerance-box.js';
import { demoVehicle } from '../design/demo-vehicle.js';

const vehicle = demoVehicle('rules');
const { classes } = deriveDesign(vehicle);

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

test('a law at the edge of stability is told to cycle, with amplitude and frequency', () => {
  const [first] = classes;
  const edge = { ...first!, margins: { ...first!.margins, gainMargin: 1.05 } };
  const [prediction] = predictCycles(vehicle, [edge]);
  expect(prediction!.cycles.length).toBeGreaterThan(0);
  for (const { amplitude, frequencyRadS } of prediction!.cycles) {
    expect(amplitude).toBeGreaterThan(0.004);
    expect(amplitude).toBeLessThan(0.0345);
    expect(frequencyRadS).toBeGreaterThan(10);
  }
});
