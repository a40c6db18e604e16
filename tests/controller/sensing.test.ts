import { describe, expect, test } from 'vitest';
import { OFFSET_PER_M, type SensingConstants } from '../../src/controller/constants.js';
import { Sensing, edgeShift } from '../../src/controller/sensing.js';
import { viewM } from '../../src/design/bar-view.js';
import { coveredShare } from '../../src/vehicle/sensor-bar.js';
import { sensingConstants } from '../../src/design/sensing-constants.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { demoVehicle } from '../design/demo-vehicle.js';

/** Readings of the bar over a line whose middle is at `offsetM`. */
function readings(vehicle: Vehicle, offsetM: number): Int32Array {
  const { bar, line } = vehicle;
  return Int32Array.from(bar.positionsM, (position, i) => {
    const share = coveredShare(Math.abs(position - offsetM), line.widthM, bar.spotRadiusM);
    return Math.round(
      bar.calibration.ground[i]! + share * (bar.calibration.line[i]! - bar.calibration.ground[i]!),
    );
  });
}

function offsetMm(sensing: Sensing): number {
  return (sensing.offset / OFFSET_PER_M) * 1000;
}

const vehicle = demoVehicle();
const constants = sensingConstants(vehicle);

describe('offset of the line at the bar', () => {
  test('is right to 1.3 mm anywhere in view, and to 0.5 mm on average', () => {
    const sensing = new Sensing(constants, false);
    let sum = 0;
    let points = 0;
    const view = viewM(vehicle) * 1000 - 0.5;
    for (let at = -view; at <= view; at += 0.1) {
      sensing.read(readings(vehicle, at / 1000));
      expect(sensing.found, `${at} mm`).toBe(true);
      const error = Math.abs(offsetMm(sensing) - at);
      expect(error, `${at} mm`).toBeLessThan(1.3);
      sum += error;
      points++;
    }
    expect(sum / points).toBeLessThan(0.5);
  });

  test('rises with the line, with a step of at most 1 mm for each 0.1 mm', () => {
    const sensing = new Sensing(constants, false);
    let before = -Infinity;
    for (let at = -33; at <= 33; at += 0.1) {
      sensing.read(readings(vehicle, at / 1000));
      const found = offsetMm(sensing);
      expect(found).toBeGreaterThan(before - 0.05);
      if (before > -Infinity) expect(found - before).toBeLessThan(1);
      before = found;
    }
  });

  test('with inverted readings is the same', () => {
    const inverted: Vehicle = {
      ...vehicle,
      bar: {
        ...vehicle.bar,
        calibration: {
          mode: 'stored',
          ground: constants.ground.map(() => 839),
          line: constants.ground.map(() => 123),
        },
      },
    };
    const straight = new Sensing(constants, false);
    const other = new Sensing(sensingConstants(inverted), false);
    for (let at = -30; at <= 30; at += 1.7) {
      straight.read(readings(vehicle, at / 1000));
      other.read(readings(inverted, at / 1000));
      expect(Math.abs(offsetMm(other) - offsetMm(straight))).toBeLessThan(0.1);
    }
  });

  test('of two lines the one nearer to the last offset counts', () => {
    const sensing = new Sensing(constants, false);
    sensing.read(readings(vehicle, 0.02));
    const both = readings(vehicle, 0.027).map((count, i) => Math.max(count, readings(vehicle, -0.027)[i]!));
    sensing.read(both);
    expect(offsetMm(sensing)).toBeCloseTo(27, 0);
  });
});

describe('what is no line', () => {
  const sensing = new Sensing(constants, false);

  test('bare ground: nothing found, the last offset is remembered', () => {
    sensing.read(readings(vehicle, 0.015));
    const before = sensing.offset;
    sensing.read(readings(vehicle, 1));
    expect(sensing.found).toBe(false);
    expect(sensing.offset).toBe(before);
  });

  test('all sensors on the line: a crossing', () => {
    sensing.read(Int32Array.from(constants.ground, () => 839));
    expect(sensing).toMatchObject({ wide: true, found: false });
  });

  test('a line that runs out of the bar on one side is told as a corner of that side', () => {
    sensing.reset();
    sensing.read(Int32Array.from([839, 839, 839, 123, 123, 123]));
    expect(sensing.reach).toBe(0);
    const wide: SensingConstants = { ...constants, wideCoverage: 9999 };
    const patient = new Sensing(wide, false);
    patient.read(Int32Array.from([839, 839, 839, 839, 839, 123]));
    expect(patient.reach).toBe(1);
    patient.read(Int32Array.from([123, 839, 839, 839, 839, 839]));
    expect(patient.reach).toBe(-1);
  });

  test('readings beyond both ends of the calibration are clamped', () => {
    sensing.read(Int32Array.from([0, 0, 1023, 1023, 0, 0]));
    expect([...sensing.coverage]).toEqual([0, 0, 255, 255, 0, 0]);
  });
});

test('a digital bar finds the line to half the spacing', () => {
  const bar = { ...vehicle.bar, kind: 'digital' as const };
  const digital = new Sensing(sensingConstants({ ...vehicle, bar }), false);
  for (let at = -30; at <= 30; at += 0.3) {
    const levels = bar.positionsM.map((p) =>
      coveredShare(Math.abs(p - at / 1000), 0.019, 0.004) >= 0.5 ? 1 : 0,
    );
    digital.read(Int32Array.from(levels));
    expect(digital.found).toBe(true);
    expect(Math.abs(offsetMm(digital) - at)).toBeLessThan(5.01);
  }
});

test('the edge table is odd about the middle of the gap', () => {
  const half = constants.gapHalf[1]!;
  for (let sum = 0; sum <= 510; sum += 3) {
    const both = edgeShift(constants, half, sum) + edgeShift(constants, half, 510 - sum);
    expect(both).toBeGreaterThanOrEqual(-2);
    expect(both).toBeLessThanOrEqual(0);
  }
});
