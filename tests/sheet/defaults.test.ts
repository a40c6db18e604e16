import { expect, test } from 'vitest';
import { withDefaults } from '../../src/sheet/defaults.js';
import { SCHEMAS, resolved, type SchemaNode } from '../../src/sheet/schema.js';
import { schemaProblems } from '../../src/sheet/schema-problems.js';
import { changedSheet } from './example-sheet.js';

/** The demo sheet without anything that may be left out. */
function bareSheet(): ReturnType<typeof changedSheet> {
  return strip(SCHEMAS.sheet, changedSheet()) as ReturnType<typeof changedSheet>;
}

function strip(node: SchemaNode, value: unknown): unknown {
  const { properties, required } = resolved(SCHEMAS.sheet, node);
  if (!properties || typeof value !== 'object' || value === null) return value;
  const kept = Object.entries(value).filter(
    ([key]) => required?.includes(key) || ['in1', 'in2', 'pwm', 'pitchMm'].includes(key),
  );
  return Object.fromEntries(kept.map(([key, child]) => [key, strip(properties[key] ?? {}, child)]));
}

/** Pointers of fields that have a default in the schema and no value. */
function unfilled(node: SchemaNode, value: unknown, pointer = ''): string[] {
  const { properties } = resolved(SCHEMAS.sheet, node);
  if (!properties || typeof value !== 'object' || value === null) return [];
  return Object.entries(properties).flatMap(([key, child]) => {
    const field = resolved(SCHEMAS.sheet, child);
    const found = (value as Record<string, unknown>)[key];
    const here = field.default !== undefined && found === undefined ? [`${pointer}/${key}`] : [];
    return [...here, ...unfilled(field, found, `${pointer}/${key}`)];
  });
}

test('fills every default of the schema', () => {
  const bare = bareSheet();
  expect(schemaProblems('sheet', bare)).toEqual([]);
  expect(unfilled(SCHEMAS.sheet, bare).length).toBeGreaterThan(10);
  expect(unfilled(SCHEMAS.sheet, withDefaults(bare))).toEqual([]);
});

test('takes the values from the schema', () => {
  expect(withDefaults(bareSheet())).toMatchObject({
    $schema: './sheet.schema.json',
    line: { longestGapMm: 0, crossings: true },
    sensors: { spotRadiusMm: 4, lineLevel: 'high', calibration: { mode: 'sweep' } },
    drive: {
      massKg: 0.6,
      motor: { startDutyPercent: 10, stallCurrentA: 1.2 },
      driver: { left: { inverted: false }, right: { inverted: false } },
      trim: { leftPercent: 100, rightPercent: 100 },
    },
    speeds: { finishTargetPercent: 99.5 },
    start: { countdownS: 0.5, runLimitS: 120 },
    telemetry: { mode: 'off' },
    tolerances: { motorGainPercent: 7, timeConstantPercent: 35, gripPercent: 20 },
  });
});

test('keeps what is given, part of an object too', () => {
  const sheet = withDefaults(
    changedSheet({ '/tolerances': { gripPercent: 5 }, '/drive/trim': { leftPercent: 90 } }),
  );
  expect(sheet.tolerances).toEqual({ motorGainPercent: 7, timeConstantPercent: 35, gripPercent: 5 });
  expect(sheet.drive.trim).toEqual({ leftPercent: 90, rightPercent: 100 });
});

test('assumes no spacing, neither beside positions nor alone', () => {
  const positions = [25, 15, 5, -5, -15, -25];
  expect(withDefaults(changedSheet({ '/sensors/pitchMm': undefined })).sensors).not.toHaveProperty('pitchMm');
  const uneven = withDefaults(
    changedSheet({ '/sensors/pitchMm': undefined, '/sensors/positionsMm': positions }),
  );
  expect(uneven.sensors.positionsMm).toEqual(positions);
  expect(uneven.sensors).not.toHaveProperty('pitchMm');
});

test('changes nothing of the sheet given, and shares nothing with it or the schema', () => {
  const sheet = bareSheet();
  const before = structuredClone(sheet);
  const filled = withDefaults(sheet);
  filled.sensors.pins.push(13);
  filled.tolerances.gripPercent = 1;
  filled.sensors.calibration.mode = 'stored';
  expect(sheet).toEqual(before);
  expect(withDefaults(sheet).tolerances.gripPercent).toBe(20);
  expect(withDefaults(sheet).sensors.calibration.mode).toBe('sweep');
});

test('a filled sheet fits the schema and fills to itself', () => {
  const filled = withDefaults(bareSheet());
  expect(schemaProblems('sheet', filled)).toEqual([]);
  expect(withDefaults(filled)).toEqual(filled);
});
