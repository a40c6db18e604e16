/** What holds for the design of any sound sheet. Fifty sheets with a fixed seed, both controllers among them. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { INT32_MAX, intermediateBounds } from '../../src/design/intervals.js';
import { closedLoopRadius } from '../../src/design/closed-loop.js';
import { deriveDesign } from '../../src/design/derive.js';
import type { Design } from '../../src/design/design.js';
import { samplePlant } from '../../src/design/lane-plant.js';
import { controllerOf, loopMargins } from '../../src/design/steering-loop.js';
import { keeps, lanePlantOf, toleranceCorners } from '../../src/design/tolerance-box.js';
import { Random } from '../../src/rehearsal/random.js';
import { checkSheet } from '../../src/sheet/check.js';
import { FairleadError } from '../../src/sheet/problem.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { validSheets } from './valid-sheets.js';

const SHEETS = 50;
/** Points of the tolerance box for each sheet, spread over its classes. */
const POINTS = 200;

const vehicles = fc.sample(validSheets, { numRuns: SHEETS, seed: 7 }).map((sheet) => {
  const { sheet: sound } = checkSheet(sheet);
  return toVehicle(sound!);
});

/** Designs, or the refusal where nothing meets the sheet. */
function attempt(vehicle: Vehicle): Design | FairleadError {
  try {
    return deriveDesign(vehicle);
  } catch (error) {
    if (error instanceof FairleadError) return error;
    throw error;
  }
}

const outcomes = vehicles.map(attempt);
const designs = outcomes.filter((outcome): outcome is Design => !(outcome instanceof FairleadError));

/** The vehicle as seen in a mirror. */
function mirrored(vehicle: Vehicle): Vehicle {
  const { bar, drive } = vehicle;
  const { ground, line } = bar.calibration;
  return {
    ...vehicle,
    bar: {
      ...bar,
      positionsM: bar.positionsM.map((p) => -p).toReversed(),
      pins: bar.pins.toReversed(),
      calibration: { ...bar.calibration, ground: ground.toReversed(), line: line.toReversed() },
    },
    drive: {
      ...drive,
      left: drive.right,
      right: drive.left,
      trimLeft: drive.trimRight,
      trimRight: drive.trimLeft,
    },
  };
}

test('nearly every sheet that leaves the speeds to us has a design; a refusal says why', () => {
  const refusals = outcomes.filter((outcome) => outcome instanceof FairleadError);
  const unasked = outcomes.filter(
    (outcome, i) => outcome instanceof FairleadError && vehicles[i]!.speeds.classes === 'auto',
  );
  expect(unasked.length).toBeLessThan(SHEETS / 10);
  for (const { exitCode, problems } of refusals) {
    expect(exitCode).toBe(3);
    expect(problems[0]?.fix).toMatch(/\.$/);
  }
  expect(new Set(designs.map(({ controller }) => controller.kind)).size).toBe(2);
});

test('margins and stability hold at random points of the tolerance box', () => {
  const random = new Random(5, 1);
  for (const { vehicle, classes, controller } of designs) {
    // speeds written into the sheet are judged, not changed: their margins are told
    if (vehicle.speeds.classes !== 'auto' || vehicle.control.gains) continue;
    const [, ...corners] = toleranceCorners(vehicle);
    const gains = corners.map((corner) => corner.gain);
    const { lag } = vehicle.tolerance;
    for (let i = 0; i < POINTS; i++) {
      const each = classes[i % classes.length]!;
      const corner = {
        gain: random.uniform(Math.min(...gains), Math.max(...gains)),
        lag: random.uniform(1 - lag, 1 + lag),
      };
      const plant = lanePlantOf(vehicle, each.speedMps, corner);
      const law = controllerOf(each.gains, plant.speedMps, plant.samplePeriodS);
      const place = `${vehicle.name} ${controller.kind} ${each.name} ${JSON.stringify(corner)}`;
      expect(keeps(loopMargins(plant, law)), place).toBe(true);
      if (i < classes.length) expect(closedLoopRadius(samplePlant(plant), law), place).toBeLessThan(1);
    }
  }
}, 120_000);

test('a mirrored vehicle has the mirrored design', () => {
  const mirrors = designs.slice(0, 20);
  for (const design of mirrors) {
    const other = deriveDesign(mirrored(design.vehicle));
    expect(other.classes.map((each) => each.limits)).toEqual(design.classes.map((each) => each.limits));
    other.classes.forEach((each, i) => {
      const before = design.classes[i]!;
      expect(each.gains.derivativeTimeS).toBeCloseTo(before.gains.derivativeTimeS, 9);
    });
    const { rules, sensing } = design.controller;
    if (!rules) continue;
    const count = sensing.sensorCount;
    const at = (first: number, last: number) => first * count - (first * (first - 1)) / 2 + last - first;
    for (let first = 0; first < count; first++)
      for (let last = first; last < count; last++) {
        const here = at(first, last);
        const there = at(count - 1 - last, count - 1 - first);
        expect(other.controller.rules!.left[there]).toBe(rules.right[here]);
        expect(other.controller.rules!.right[there]).toBe(rules.left[here]);
      }
  }
}, 120_000);

describe('numbers', () => {
  test('class speeds are positive and never above full wheel speed', () => {
    for (const { vehicle, classes } of designs)
      for (const { speedMps } of classes) {
        expect(speedMps).toBeGreaterThan(0);
        expect(speedMps).toBeLessThanOrEqual(vehicle.drive.topSpeedMps);
      }
  });

  test('no intermediate of the control law leaves 32 bits', () => {
    for (const { vehicle, controller } of designs)
      for (const { name, magnitude } of intermediateBounds(controller, vehicle.board.adcMaxCount))
        expect(magnitude, name).toBeLessThanOrEqual(INT32_MAX);
  });

  test('every number of the controller is a whole one', () => {
    const fractions: string[] = [];
    const look = (value: unknown, path: string): void => {
      if (typeof value === 'number' && !Number.isInteger(value)) fractions.push(`${path} = ${value}`);
      else if (typeof value === 'object' && value !== null)
        for (const [key, child] of Object.entries(value)) look(child, `${path}/${key}`);
    };
    for (const { controller } of designs) look(controller, '');
    expect(fractions).toEqual([]);
  });
});
