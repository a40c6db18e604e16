import { describe, expect, it } from 'vitest';
import { checkSheet } from '../../src/sheet/check.js';
import { sheetFromAnswers } from '../../src/survey/answers-file.js';
import type { JsonObject } from '../../src/survey/json-tree.js';

function sheetOf(answers: unknown, base: JsonObject = {}): JsonObject {
  const made = sheetFromAnswers(answers, base);
  if ('problems' in made) throw new Error(JSON.stringify(made.problems));
  return made.sheet;
}

function problemsOf(answers: unknown, base: JsonObject = {}) {
  const made = sheetFromAnswers(answers, base);
  return 'problems' in made ? made.problems : [];
}

describe('sheetFromAnswers', () => {
  it('makes a sound sheet of nothing but defaults', () => {
    const sheet = sheetOf({});
    expect(checkSheet(sheet).problems).toEqual([]);
    expect(sheet).toMatchObject({ $schema: './sheet.schema.json', sheetVersion: 1, name: 'tray-cart' });
  });

  it('takes pointers, parts of a sheet, and text with units', () => {
    const sheet = sheetOf({
      '/name': 'bench-cart',
      '/line/widthMm': '2.5 cm',
      '/sensors/calibration/ground': '150',
      sensors: { count: '4', pitchMm: '0,5 in' },
      drive: { massKg: '600 g', motor: { timeConstantMs: '0.06 s' } },
      speeds: { classes: 'wide 400 mm 0.9 m/s; tight 120 mm 0.5 m/s' },
    });
    expect(sheet).toMatchObject({
      name: 'bench-cart',
      line: { widthMm: 25 },
      sensors: { count: 4, pitchMm: 12.7, calibration: { ground: [150, 150, 150, 150] } },
      drive: { massKg: 0.6, motor: { timeConstantMs: 60 } },
      speeds: {
        classes: [
          { name: 'wide', minRadiusMm: 400, speedMps: 0.9 },
          { name: 'tight', minRadiusMm: 120, speedMps: 0.5 },
        ],
      },
    });
    expect(checkSheet(sheet).problems).toEqual([]);
  });

  it('takes a whole sheet as it is', () => {
    const whole = sheetOf({
      '/target/board': 'esp32',
      '/sensors/positionsMm': '25 15 5 -5 -15 -25',
      '/tolerances/gripPercent': 30,
    });
    expect(sheetOf(whole)).toEqual(whole);
    expect(whole['target']).toEqual({ board: 'esp32', language: 'micropython' });
  });

  it('changes a sheet at hand and keeps its details', () => {
    const base = sheetOf({ '/tolerances/gripPercent': 30, '/drive/driver/left/inverted': true });
    expect(sheetOf({ '/line/widthMm': 30 }, base)).toEqual({
      ...base,
      line: { ...(base['line'] as JsonObject), widthMm: 30 },
    });
  });

  it('takes single pins and proposes the others', () => {
    const sheet = sheetOf({ '/start/buttonPin': 3, '/sensors/pins/0': 'A0' });
    expect(sheet).toMatchObject({ start: { buttonPin: 3 } });
    expect(checkSheet(sheet).problems).toEqual([]);
  });

  it('turns a spaced row into positions and back', () => {
    const base = sheetOf({ '/sensors/positionsMm': [25, 15, 5, -5, -15, -25] });
    expect(base['sensors']).not.toHaveProperty('pitchMm');
    expect(sheetOf({ '/sensors/pitchMm': 9 }, base)['sensors']).not.toHaveProperty('positionsMm');
  });
});

describe('what is wrong with answers', () => {
  it('is told all at once, with pointer, limits and remedy', () => {
    const problems = problemsOf({
      '/sensors/pitchMm': '95',
      '/line/widthMm': 'wide',
      drive: { wheelDiametrMm: 40 },
      power: { emptyV: 7 },
    });
    expect(problems.map(({ pointer }) => pointer)).toEqual([
      '/line/widthMm',
      '/drive/wheelDiametrMm',
      '/sensors/pitchMm',
    ]);
    expect(problems[1]?.fix).toBe('Did you mean "wheelDiameterMm"?');
    expect(problems[2]).toMatchObject({ got: '95 mm', allowed: '3 to 30 mm' });
  });

  it('includes rules across fields', () => {
    expect(problemsOf({ '/power/emptyV': 7 })).toMatchObject([{ pointer: '/power/emptyV', got: '7 V' }]);
  });

  it('includes a board with too few pins, once', () => {
    expect(problemsOf({ '/target/board': 'pico' })).toMatchObject([
      {
        pointer: '/sensors/count',
        message: 'Pico has 3 analog pins (GP26 to GP28), too few for 6 analog sensors.',
      },
    ]);
  });

  it.each([
    ['/sensors/lineLevel', 'low'],
    ['/target/language', 'micropython'],
    ['/drive/driver/left/dir', 4],
    ['/sensors/pins/9', 'A5'],
    ['/drive', 5],
  ])('includes a value that the other answers rule out: %s', (pointer, value) => {
    expect(problemsOf({ [pointer]: value })).toMatchObject([
      { pointer, message: expect.stringContaining('has no effect here') as string },
    ]);
  });

  it('includes lists of the wrong length', () => {
    expect(problemsOf({ '/sensors/calibration/ground': [1, 2] })).toMatchObject([
      {
        pointer: '/sensors/calibration/ground',
        message: expect.stringContaining('2 readings for 6') as string,
      },
    ]);
  });

  it.each([[[1, 2]], ['text'], [null], [7]])('includes a file that holds %j', (data) => {
    expect(problemsOf(data)).toMatchObject([{ pointer: '', fix: expect.any(String) as string }]);
  });

  it.each([1e9, -1, 2.5, NaN])('includes %d sensors, and does not try to lay them out', (count) => {
    expect(problemsOf({ '/sensors/count': count }).map(({ pointer }) => pointer)).toContain('/sensors/count');
  });

  it('never is a throw, whatever the keys', () => {
    for (const key of [
      '__proto__',
      'constructor',
      '/__proto__/x',
      '/',
      '//',
      '/sensors/pins/x',
      '/line/widthMm/y',
    ]) {
      expect(problemsOf(JSON.parse(`{ ${JSON.stringify(key)}: { "a": 1 } }`)).length).toBeGreaterThan(0);
    }
  });
});
