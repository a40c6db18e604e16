import { expect, test } from 'vitest';
import { biasOffsetM, biasRemarks } from '../../src/design/bias.js';
import { deriveDesign } from '../../src/design/derive.js';
import { quantisedConstants, worstQuantised } from '../../src/design/quantisation.js';
import { perturbedPlant } from '../../src/rehearsal/plant-parameters.js';
import { twinEngine } from '../../src/rehearsal/twin-maker.js';
import { compileCourse } from '../../src/course/lane.js';
import { demoVehicle } from './demo-vehicle.js';

const vehicle = demoVehicle();
const design = deriveDesign(vehicle);

test('each rounded constant is within 0.5 % of the wanted one', () => {
  const rows = quantisedConstants(design);
  expect(rows.length).toBe(6 + 6 + 4 * 7);
  for (const { name, relativeError } of rows) expect(Math.abs(relativeError), name).toBeLessThan(0.005);
  const worst = worstQuantised(rows)!;
  expect(rows.every((row) => Math.abs(row.relativeError) <= Math.abs(worst.relativeError))).toBe(true);
});

test('unequal motors hold the line 2 g/(b kp) beside the middle', () => {
  const weakest = Math.min(...design.classes.map((each) => each.gains.proportionalPerM2));
  expect(biasOffsetM(design)).toBeCloseTo((2 * 0.07) / (0.12 * weakest), 9);
  expect(biasRemarks(design)).toEqual([]);
  const loose = { ...vehicle, tolerance: { ...vehicle.tolerance, motorGain: 0.3 } };
  expect(biasRemarks({ vehicle: loose, classes: design.classes }).join()).toMatch(
    /hold the line \d+ % of the view/,
  );
});

test('the rehearsed vehicle settles where the formula says', () => {
  const plant = { ...perturbedPlant(vehicle, 0), startLateralM: 0 };
  const unequal = { ...plant, topLeftMps: plant.topLeftMps * 0.93, topRightMps: plant.topRightMps * 1.07 };
  const lane = compileCourse({ courseVersion: 1, pieces: [{ straightMm: 6000 }] });
  const setup = { plant: unequal, lane, laps: 1, timeLimitS: 20, sampleTrace: true };
  const { trace, loss } = twinEngine(vehicle, design.controller).runNow(setup);
  expect(loss).toBe(undefined);
  const settled = trace!.lateralM[trace!.lateralM.length - 1]!;
  // the faster right wheel turns the vehicle left; it settles left of the line, straight along it
  const kp = design.classes[0]!.gains.proportionalPerM2;
  expect(settled).toBeCloseTo((2 * 0.07) / (0.12 * kp), 3);
});
