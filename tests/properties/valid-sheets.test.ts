import fc from 'fast-check';
import { expect, test } from 'vitest';
import { checkSheet } from '../../src/sheet/check.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import { BOARD_IDS } from '../../src/vehicle/boards.js';
import { sheetCandidates, validSheets } from './valid-sheets.js';

const SEED = 20260;

test('four of five sheets as drawn are sound, so that the filter costs little', () => {
  const drawn = fc.sample(sheetCandidates, { numRuns: 1000, seed: SEED });
  const faults = drawn.flatMap((sheet) =>
    checkSheet(sheet).problems.map(({ pointer, message }) => `${pointer}: ${message}`),
  );
  const sound = drawn.filter((sheet) => checkSheet(sheet).sheet !== undefined);
  expect(sound.length, faults.slice(0, 20).join('\n')).toBeGreaterThanOrEqual(800);
});

test('they are of every board, kind, scheme, controller and length', () => {
  const sheets = fc.sample(validSheets, { numRuns: 1000, seed: SEED });
  const seen = (of: (sheet: (typeof sheets)[number]) => unknown): number => new Set(sheets.map(of)).size;
  expect(seen(({ target }) => target.board)).toBe(BOARD_IDS.length);
  // three kinds of bars and three schemes on each board
  expect(seen(({ target, sensors, drive }) => `${target.board} ${sensors.kind} ${drive.driver.scheme}`)).toBe(
    3 * 3 * BOARD_IDS.length,
  );
  expect(seen(({ sensors }) => sensors.count)).toBe(15);
  expect(seen(({ control, sensors }) => `${control.kind} ${sensors.kind}`)).toBe(6);
  expect(seen(({ sensors }) => sensors.calibration?.mode)).toBe(3);
  expect(seen(({ sensors }) => sensors.positionsMm === undefined)).toBe(2);
  expect(seen(({ encoders }) => encoders?.channels)).toBe(3);
  expect(seen(({ control }) => control.integral)).toBe(4);
  expect(seen(({ control }) => `${control.kind} ${control.overrides === undefined}`)).toBe(3);
  expect(seen(({ speeds }) => (speeds.classes === 'auto' ? 0 : speeds.classes.length))).toBe(6);
});

test('each makes a vehicle of finite positive numbers', () => {
  fc.assert(
    fc.property(validSheets, (given) => {
      const { sheet } = checkSheet(given);
      if (sheet === undefined) throw new Error('the filter let a faulty sheet through');
      const { bar, drive, line } = toVehicle(sheet);
      expect(bar.positionsM).toHaveLength(sheet.sensors.count);
      expect(bar.positionsM.every((x, i) => i === 0 || x < (bar.positionsM[i - 1] ?? 0))).toBe(true);
      expect(bar.calibration.ground).toHaveLength(sheet.sensors.count);
      for (const value of [drive.topSpeedMps, drive.lagS, drive.trackM, line.widthM, bar.aheadM]) {
        expect(Number.isFinite(value) && value > 0).toBe(true);
      }
    }),
    { numRuns: 300 },
  );
});

test('a sound sheet stays sound when written and read', () => {
  fc.assert(
    fc.property(validSheets, (sheet) => {
      expect(checkSheet(JSON.parse(JSON.stringify(sheet))).problems).toEqual([]);
    }),
    { numRuns: 100 },
  );
});
