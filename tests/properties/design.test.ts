/** What holds for the design of any sound sheet. Fifty designs of random sheets with a fixed seed, both controllers among them. */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { ClassConstants } from '../../src/controller/constants.js';
import { INT32_MAX, intermediateBounds } from '../../src/design/intervals.js';
import { closedLoopRadius } from '../../src/design/closed-loop.js';
import { unprovenDesign } from '../../src/design/derive.js';
import type { Design } from '../../src/design/design.js';
import { samplePlant } from '../../src/design/lane-plant.js';
import { controllerOf, loopMargins } from '../../src/design/steering-loop.js';
import { keeps, lanePlantOf, toleranceCorners } from '../../src/design/tolerance-box.js';
import { Random } from '../../src/rehearsal/random.js';
import { checkSheet } from '../../src/sheet/check.js';
import { FairleadError } from '../../src/sheet/problem.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { mirroredVehicle } from '../../src/vehicle/mirror.js';
import { mirroredRules } from './mirror.js';
import { validSheets } from './valid-sheets.js';

/** Sheets drawn, and how many of them must have a design; speeds written into a sheet are often too fast for its vehicle. */
const SHEETS = 80;
const DESIGNS = 50;
/** Points of the tolerance box for each design, spread over its classes. */
const POINTS = 200;
/** Designs whose mirror image is designed too. */
const MIRRORED = 12;

const vehicles = fc.sample(validSheets, { numRuns: SHEETS, seed: 7 }).map((sheet) => {
  const { sheet: sound } = checkSheet(sheet);
  return toVehicle(sound!);
});

/** Designs, or the refusal where nothing meets the sheet. */
function attempt(vehicle: Vehicle): Design | FairleadError {
  try {
    return unprovenDesign(vehicle);
  } catch (error) {
    if (error instanceof FairleadError) return error;
    throw error;
  }
}

const designs: Design[] = [];
const refused: { vehicle: Vehicle; error: FairleadError }[] = [];
for (const vehicle of vehicles) {
  const outcome = attempt(vehicle);
  if (outcome instanceof FairleadError) refused.push({ vehicle, error: outcome });
  else designs.push(outcome);
  if (designs.length === DESIGNS) break;
}

test('nearly every sheet that leaves the speeds to us has a design; a refusal says why', () => {
  expect(designs.length).toBe(DESIGNS);
  const unasked = refused.filter(({ vehicle }) => vehicle.speeds.classes === 'auto');
  expect(unasked.length).toBeLessThan(DESIGNS / 10);
  for (const { error } of refused) {
    expect(error.exitCode).toBe(3);
    const [problem] = error.problems;
    expect(problem?.message).toMatch(/no steering law keeps the required margins|the line leaves the bar/);
    expect(problem?.allowed).toMatch(/^(control|view) limit \d+\.\d\d m\/s$/);
  }
  expect(new Set(designs.map(({ controller }) => controller.kind)).size).toBe(2);
});

test(`margins and stability hold at ${POINTS} random points of the tolerance box of each`, () => {
  const random = new Random(5, 1);
  for (const { vehicle, classes, controller } of designs) {
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
      const law = controllerOf(each.gains, plant.speedMps, plant.samplePeriodS, each.speedMps);
      const place = `${vehicle.name} ${controller.kind} ${each.name} ${JSON.stringify(corner)}`;
      expect(keeps(loopMargins(plant, law)), place).toBe(true);
      expect(closedLoopRadius(samplePlant(plant), law), place).toBeLessThan(1);
    }
  }
}, 120_000);

/** Speeds depend on the proof, whose random draws are not mirrored with the vehicle. */
const withoutSpeed = (classes: readonly ClassConstants[]) =>
  classes.map((each) => ({ ...each, speed: 0, speedSlope: 0 }));

describe('a mirrored vehicle', () => {
  const pairs = designs.slice(0, MIRRORED).map((design) => {
    return { design, image: unprovenDesign(mirroredVehicle(design.vehicle)) };
  });

  test('has the same limits, laws and margins', () => {
    for (const { design, image } of pairs) {
      const of = ({ classes }: Design) =>
        classes.map(({ name, limits, wantedGains, gains }) => ({ name, limits, wantedGains, gains }));
      expect(of(image)).toEqual(of(design));
    }
  });

  test('has the mirrored integers', () => {
    for (const { design, image } of pairs) {
      const { sensing, drive, steering, classes, memory } = design.controller;
      const other = image.controller;
      expect(other.sensing).toEqual({
        ...sensing,
        ground: sensing.ground.toReversed(),
        gain: sensing.gain.toReversed(),
        levels: sensing.levels.toReversed(),
        gapMiddle: sensing.gapMiddle.toReversed().map((x) => 0 - x),
        gapHalf: sensing.gapHalf.toReversed(),
      });
      expect(other.drive).toEqual({
        ...drive,
        startDutyLeft: drive.startDutyRight,
        startDutyRight: drive.startDutyLeft,
        slopeLeft: drive.slopeRight,
        slopeRight: drive.slopeLeft,
      });
      expect(other.memory).toEqual(memory);
      expect(other.steering).toEqual(steering);
      expect(withoutSpeed(other.classes)).toEqual(withoutSpeed(classes));
      expect(other.rules).toEqual(mirroredRules(design.controller));
    }
  });

  test('is about as fast: the draws of the proof meet its other side', () => {
    for (const { design, image } of pairs)
      image.classes.forEach(({ speedMps, limitedBy, name }, i) => {
        const before = design.classes[i]!;
        const proven = limitedBy === 'finish' || before.limitedBy === 'finish';
        if (!proven) expect(speedMps).toBe(before.speedMps);
        expect(Math.abs(speedMps / before.speedMps - 1), `${design.vehicle.name} ${name}`).toBeLessThan(0.15);
      });
  });
});

describe('numbers', () => {
  test('class speeds are positive and never above full wheel speed', () => {
    for (const { vehicle, classes } of designs) {
      for (const { speedMps } of classes) {
        expect(speedMps).toBeGreaterThan(0);
        expect(speedMps).toBeLessThanOrEqual(vehicle.drive.topSpeedMps);
      }
    }
  });

  test('a computed class is never slower than a tighter one', () => {
    for (const { vehicle, classes } of designs) {
      const speeds = classes.map((each) => each.speedMps);
      if (vehicle.speeds.classes === 'auto') expect(speeds).toEqual(speeds.toSorted((a, b) => b - a));
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
