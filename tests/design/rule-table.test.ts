import { describe, expect, test } from 'vitest';
import { runIndex } from '../../src/controller/run-index.js';
import { unprovenDesign } from '../../src/design/derive.js';
import { switchingDistanceM } from '../../src/design/bar-view.js';
import { coveredShare } from '../../src/vehicle/sensor-bar.js';
import { runInterval } from '../../src/design/rule-runs.js';
import { runsOf, stateTable } from '../../src/design/state-table.js';
import { demoVehicle } from './demo-vehicle.js';

const vehicle = demoVehicle('rules');
const { controller } = unprovenDesign(vehicle);
const table = stateTable(vehicle, controller);
const count = vehicle.bar.positionsM.length;

function mirrored(state: number): number {
  const bits = state.toString(2).padStart(count, '0');
  return parseInt(Array.from(bits).reverse().join(''), 2);
}

/** State that a line whose middle is at `offsetM` causes. */
function stateAt(offsetM: number): number {
  const bits = vehicle.bar.positionsM.map((p) =>
    coveredShare(p - offsetM, vehicle.line.widthM, vehicle.bar.spotRadiusM) >= 0.5 ? '1' : '0',
  );
  return parseInt(bits.join(''), 2);
}

describe('the table of all states', () => {
  test('holds each state once', () => {
    expect(table.map((row) => row.state)).toEqual(Array.from({ length: 64 }, (_, i) => i));
  });

  test('mirror images have mirrored kinds and actions', () => {
    for (const row of table) {
      const image = table[mirrored(row.state)]!;
      expect({ kind: image.kind, left: image.right, right: image.left }).toEqual({
        kind: row.kind,
        left: row.left,
        right: row.right,
      });
    }
  });

  test('every state that a line causes is of kind line, and its interval holds the offset', () => {
    for (let offsetMm = -34; offsetMm <= 34; offsetMm += 0.37) {
      const row = table[stateAt(offsetMm / 1000)]!;
      expect(row.kind).toBe('line');
      expect(offsetMm / 1000).toBeGreaterThanOrEqual(row.fromM! - 1e-9);
      expect(offsetMm / 1000).toBeLessThanOrEqual(row.toM! + 1e-9);
    }
  });

  test('the further left the line, the more the vehicle turns left', () => {
    const lines = table.filter((row) => row.kind === 'line').toSorted((a, b) => a.fromM! - b.fromM!);
    const turns = lines.map((row) => row.right - row.left);
    expect(turns).toEqual(turns.toSorted((a, b) => a - b));
    expect(new Set(turns).size).toBe(turns.length);
  });

  test('states of equal outer sensors go straight on', () => {
    expect(table[0b100001]).toMatchObject({ kind: 'split', left: 1, right: 1 });
    expect(table[0]).toMatchObject({ kind: 'none', left: 1, right: 1 });
    expect(table[0b111111]).toMatchObject({ kind: 'wide', left: 1, right: 1 });
  });
});

test('intervals of runs touch without overlap', () => {
  const intervals = [];
  for (let first = 0; first < count; first++) {
    for (let last = first; last < count; last++) {
      const found = runInterval(vehicle, first, last);
      if (found) intervals.push(found);
    }
  }
  intervals.sort((a, b) => a[0] - b[0]);
  for (let i = 1; i < intervals.length; i++) expect(intervals[i]![0]).toBeCloseTo(intervals[i - 1]![1], 9);
  const reach = 0.025 + switchingDistanceM(vehicle);
  expect(intervals[0]![0]).toBeCloseTo(-reach, 9);
  expect(intervals.at(-1)![1]).toBeCloseTo(reach, 9);
});

test('runs are numbered without gap or repetition', () => {
  for (const n of [2, 5, 8, 16]) {
    const seen = [];
    for (let first = 0; first < n; first++)
      for (let last = first; last < n; last++) seen.push(runIndex(first, last, n));
    expect(seen).toEqual(Array.from({ length: (n * (n + 1)) / 2 }, (_, i) => i));
  }
});

// identity: words of n bits with k runs of ones number C(n+1, 2k)
test.each([
  [3, [1, 6, 1]],
  [5, [1, 15, 15, 1]],
  [8, [1, 36, 126, 84, 9]],
])('states of %d sensors by their number of runs', (n, want) => {
  const found = want.map(() => 0);
  for (let state = 0; state < 2 ** n; state++) found[runsOf(state, n).length]!++;
  expect(found).toEqual(want);
});
