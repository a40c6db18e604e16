/** What is proposed for sheets that no design meets: it helps, and a little less does not. */
import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { advice, smallestChanges } from '../../src/design/smallest-change.js';
import { designFor } from '../../src/pipeline.js';
import { checkSheet } from '../../src/sheet/check.js';
import type { ResolvedSheet } from '../../src/sheet/defaults.js';
import { FairleadError, type SheetChange } from '../../src/sheet/problem.js';

const DEMO = readFileSync('examples/tray-cart/tray-cart.json', 'utf8');

function sheetWith(change: (sheet: ResolvedSheet) => void): ResolvedSheet {
  const sheet = checkSheet(JSON.parse(DEMO)).sheet!;
  change(sheet);
  return checkSheet(sheet).sheet!;
}

/** A copy in which the field of one change has a value; a cap holds for every speed. */
function withChange(sheet: ResolvedSheet, { pointer }: SheetChange, value: number): ResolvedSheet {
  const copy = structuredClone(sheet) as unknown as Record<string, unknown>;
  const keys = pointer.split('/').slice(1);
  let node: Record<string, unknown> = copy;
  for (const key of keys.slice(0, -1)) node = node[key] as Record<string, unknown>;
  const last = keys.at(-1)!;
  if (Array.isArray(node[last])) {
    for (const each of node[last] as { speedMps: number }[]) each.speedMps = Math.min(each.speedMps, value);
  } else node[last] = value;
  return copy as unknown as ResolvedSheet;
}

const fast = sheetWith((sheet) => {
  sheet.speeds.classes = [{ name: 'all', minRadiusMm: 120, speedMps: 1.4 }];
  sheet.drive.motor.timeConstantMs = 700;
});
const two = sheetWith((sheet) => {
  sheet.speeds.classes = [
    { name: 'fast', minRadiusMm: 900, speedMps: 1.4 },
    { name: 'tight', minRadiusMm: 120, speedMps: 0.8 },
  ];
  sheet.drive.motor.timeConstantMs = 700;
  sheet.sensors.aheadOfAxleMm = 30;
});

describe.each([
  ['one speed', fast, '/speeds/classes/0/speedMps'],
  ['two speeds', two, '/speeds/classes'],
])('a sheet without a design: %s', (_, sheet, slower) => {
  const changes = smallestChanges(sheet);

  it('is refused with the limit, the changes in the text and as data', () => {
    const attempt = () => designFor(sheet);
    expect(attempt).toThrow(FairleadError);
    try {
      attempt();
    } catch (error) {
      const { exitCode, problems } = error as FairleadError;
      expect(exitCode).toBe(3);
      expect(problems[0]?.allowed).toMatch(/control limit/);
      expect(problems.at(-1)?.changes).toEqual(changes.slice(0, 3));
      for (const { pointer, to } of changes.slice(0, 3)) {
        expect(problems.at(-1)?.fix).toContain(pointer);
        expect(problems.at(-1)?.fix).toContain(String(to));
      }
    }
  });

  it('has a lower speed and a bar further ahead or a quicker motor among its changes', () => {
    const pointers = changes.map(({ pointer }) => pointer);
    expect(pointers).toContain(slower);
    expect(pointers.some((each) => /aheadOfAxleMm|timeConstantMs/.test(each))).toBe(true);
  });

  it('has a design with each change, and none with nine tenths of it', () => {
    for (const change of changes) {
      expect(() => designFor(withChange(sheet, change, change.to)), change.pointer).not.toThrow();
      const less = change.from + 0.9 * (change.to - change.from);
      expect(() => designFor(withChange(sheet, change, less)), change.pointer).toThrow(FairleadError);
    }
  });

  it('lists the relatively smallest change first', () => {
    const sizes = changes.map(({ from, to }) => Math.abs(Math.log(to / from)));
    expect(sizes).toEqual(sizes.toSorted((a, b) => a - b));
  });
});

it('says so where no single change is enough', () => {
  const hopeless = sheetWith((sheet) => {
    sheet.speeds.classes = [
      { name: 'fast', minRadiusMm: 900, speedMps: 1.3 },
      { name: 'tight', minRadiusMm: 130, speedMps: 0.5 },
    ];
    sheet.line.tightestRadiusMm = 130;
    sheet.drive.motor.timeConstantMs = 1000;
    sheet.drive.motor.startDutyPercent = 30;
    sheet.sensors.aheadOfAxleMm = 15;
    sheet.sensors.pitchMm = 5;
    sheet.tolerances = { motorGainPercent: 30, timeConstantPercent: 60, gripPercent: 20 };
  });
  expect(() => designFor(hopeless)).toThrow(FairleadError);
  const { fix, changes } = advice(hopeless);
  expect(fix).toMatch(/^No change of one quantity/);
  expect(changes).toEqual([]);
});
