/**
 * Rule tables of random sound sheets, for each number of sensors from 2 to 16: every one of the 2^n states has exactly one action, and the
 * firmware's short table of runs gives the one that the rules as words demand. The words are carried out here on strings of 0 and 1,
 * without the controller's code.
 */
import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type ControllerConstants, FRACTION_BITS, FULL_COVERAGE } from '../../src/controller/constants.js';
import { Sensing } from '../../src/controller/sensing.js';
import { runIndex } from '../../src/controller/run-index.js';
import { switchingDistanceM } from '../../src/design/bar-view.js';
import { stateTable } from '../../src/design/state-table.js';
import { checkSheet } from '../../src/sheet/check.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { quickDesign } from '../firmware/cart.js';
import { validSheets } from './valid-sheets.js';

/** Sheets for each number of sensors; fewer where a table has tens of thousands of states. */
const SHEETS = 6;
const SHEETS_OF_LONG_BARS = 2;
const LONG_BAR = 13;

const COUNTS = Array.from({ length: 15 }, (_, i) => i + 2);

function vehiclesWith(count: number): Vehicle[] {
  const fitting = validSheets.filter(
    ({ control, sensors }) => control.kind === 'rules' && sensors.count === count,
  );
  const numRuns = count < LONG_BAR ? SHEETS : SHEETS_OF_LONG_BARS;
  return fc.sample(fitting, { numRuns, seed: 100 + count }).map((sheet) => {
    const { sheet: sound } = checkSheet(sheet);
    return toVehicle(sound!);
  });
}

type Reduced = 'wide' | 'none' | { first: number; last: number };

/** As the rules say: enough sensors for a crossing; else the widest run; of several equally wide ones all from the first to the last. */
function reduced(bits: string, wideSensors: number): Reduced {
  const runs = Array.from(bits.matchAll(/1+/g), ({ 0: ones, index }) => ({ length: ones.length, index }));
  const lit = runs.reduce((sum, { length }) => sum + length, 0);
  if (lit >= wideSensors) return 'wide';
  const widest = runs.filter(({ length }) => runs.every((other) => other.length <= length));
  const [leftmost, rightmost] = [widest[0], widest.at(-1)];
  if (!leftmost || !rightmost) return 'none';
  return { first: leftmost.index, last: rightmost.index + rightmost.length - 1 };
}

/** States that a single line causes, by moving it across the bar: between two places where a sensor switches nothing changes. */
function statesOfALine(vehicle: Vehicle): Set<string> {
  const { positionsM } = vehicle.bar;
  const reachM = switchingDistanceM(vehicle);
  const switches = positionsM.flatMap((p) => [p - reachM, p + reachM]).toSorted((a, b) => a - b);
  const states = new Set<string>();
  for (const [i, to] of switches.entries()) {
    const from = switches[i - 1] ?? to;
    // two sensors that switch at the same place leave a stretch of the size of a rounding error
    if (to - from < 1e-9) continue;
    const middleM = (from + to) / 2;
    states.add(positionsM.map((p) => (Math.abs(p - middleM) <= reachM ? '1' : '0')).join(''));
  }
  return states;
}

/** What the vehicle's own sensors read in a state: counts over line or ground, or the level of the pin. */
function readings(vehicle: Vehicle, { sensing }: ControllerConstants, bits: string): Int32Array {
  const { ground, line } = vehicle.bar.calibration;
  return Int32Array.from(bits, (bit, i) => {
    if (sensing.digital) return (bit === '1') === sensing.lineLevelHigh ? 1 : 0;
    return bit === '1' ? line[i]! : ground[i]!;
  });
}

describe.each(COUNTS)('rule tables of %d sensors', (count) => {
  const designs = vehiclesWith(count).map((vehicle) => quickDesign(vehicle));
  const all = Array.from({ length: 2 ** count }, (_, state) => state.toString(2).padStart(count, '0'));

  test('have each state once, with one action', () => {
    for (const { vehicle, controller } of designs) {
      const table = stateTable(vehicle, controller);
      expect(table.length).toBe(2 ** count);
      const wrong = table.filter(({ state, left, right }, i) => {
        return state !== i || !Number.isFinite(left) || !Number.isFinite(right);
      });
      expect(wrong).toEqual([]);
    }
  });

  test('act in each state as the rules say, from the short table', () => {
    for (const { vehicle, controller } of designs) {
      const rules = controller.rules!;
      const wideSensors = controller.sensing.wideCoverage / FULL_COVERAGE;
      const table = stateTable(vehicle, controller);
      const unit = 1 << FRACTION_BITS;
      const wrong = all.filter((bits, state) => {
        const { kind, left, right } = table[state]!;
        const wanted = reduced(bits, wideSensors);
        if (typeof wanted === 'string') return kind !== wanted || left !== 1 || right !== 1;
        const place = runIndex(wanted.first, wanted.last, count);
        return left !== rules.left[place]! / unit || right !== rules.right[place]! / unit;
      });
      expect(wrong).toEqual([]);
    }
  });

  test('are reached from what the sensors read', () => {
    for (const { vehicle, controller } of designs) {
      const sensing = new Sensing(controller.sensing, true);
      const wideSensors = controller.sensing.wideCoverage / FULL_COVERAGE;
      const wrong = all.filter((bits) => {
        sensing.read(readings(vehicle, controller, bits));
        const { wide, found, first, last } = sensing;
        const got = wide ? 'wide' : found ? `${first}..${last}` : 'none';
        const wanted = reduced(bits, wideSensors);
        return got !== (typeof wanted === 'string' ? wanted : `${wanted.first}..${wanted.last}`);
      });
      expect(wrong).toEqual([]);
    }
  });

  test('name the states that a line causes, and no others', () => {
    for (const { vehicle, controller } of designs) {
      const caused = statesOfALine(vehicle);
      const table = stateTable(vehicle, controller);
      const wrong = all.filter((bits, state) => {
        const { kind } = table[state]!;
        if (kind === 'wide' || kind === 'none') return false;
        return (kind === 'line') !== caused.has(bits);
      });
      expect(wrong).toEqual([]);
    }
  });
});
