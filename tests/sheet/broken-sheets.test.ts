import fc from 'fast-check';
import { expect, test } from 'vitest';
import { BOARD_IDS } from '../../src/vehicle/boards.js';
import { checkSheet } from '../../src/sheet/check.js';
import type { Problem } from '../../src/sheet/problem.js';
import { changedSheet, type Changes } from './example-sheet.js';

/** Pointers of everything in a sheet, containers too. */
function pointersOf(value: unknown, pointer = ''): string[] {
  if (typeof value !== 'object' || value === null) return [pointer];
  return [
    pointer,
    ...Object.entries(value).flatMap(([key, child]) => pointersOf(child, `${pointer}/${key}`)),
  ];
}

const POINTERS = pointersOf(changedSheet()).filter((pointer) => pointer !== '');

/** What people and machines write into the wrong place. */
const anything = fc.oneof(
  fc.constantFrom<unknown>(undefined, null, true, '', [], {}, NaN, Infinity, -0, 1e300, '__proto__', '10 mm'),
  fc.integer(),
  fc.double(),
  fc.string({ unit: 'binary' }),
  fc.jsonValue(),
);

/** Values that often fit a field, so that the rules across fields are reached. */
const plausible = fc.oneof(
  fc.integer({ min: 0, max: 40 }),
  fc.double({ min: -50, max: 200, noNaN: true }),
  fc.constantFrom<unknown>('A0', 'A6', 'GP26', 'IO33', 13, ...BOARD_IDS, 'micropython', 'digital'),
  fc.constantFrom<unknown>('rules', 'sweep', 'dual-pwm', 'pwm-dir', 'dark-on-light', 'low', 'auto', false),
  fc.array(fc.integer({ min: 0, max: 1023 }), { minLength: 2, maxLength: 16 }),
);

const change = (value: fc.Arbitrary<unknown>): fc.Arbitrary<[string, unknown]> =>
  fc.tuple(fc.constantFrom(...POINTERS), value);

function expectReadable(problem: Problem): void {
  expect(problem.pointer).toMatch(/^(\/|$)/);
  expect(problem.message).toMatch(/\.$/);
  expect(problem.message).not.toMatch(/undefined|\[object/);
}

function applied(changes: readonly (readonly [string, unknown])[]): unknown {
  // A change below something that an earlier change removed has no place any more.
  return changes.reduce<unknown>((sheet, [pointer, value]) => {
    const holder = pointer
      .split('/')
      .slice(1, -1)
      .reduce<unknown>((place, key) => {
        return typeof place === 'object' && place !== null ? (place as Changes)[key] : undefined;
      }, sheet);
    const key = pointer.split('/').at(-1) ?? '';
    if (typeof holder !== 'object' || holder === null) return sheet;
    // JSON lists have no holes; elsewhere `undefined` removes the key.
    if (Array.isArray(holder) && (value === undefined || Number(key) >= holder.length)) return sheet;
    if (value === undefined) Reflect.deleteProperty(holder, key);
    else Reflect.set(holder, key, structuredClone(value));
    return sheet;
  }, changedSheet());
}

test.each([
  ['anything', anything, 1500],
  ['plausible values', plausible, 3000],
] as const)('a sheet broken by %s gets problems or is sound, and never a throw', (_, value, numRuns) => {
  const changes = fc.array(change(value), { minLength: 1, maxLength: 6 });
  let sound = 0;
  let beyondSchema = 0;
  fc.assert(
    fc.property(changes, (list) => {
      const { sheet, problems, notes } = checkSheet(applied(list));
      [...problems, ...notes].forEach(expectReadable);
      expect(sheet === undefined).toBe(problems.length > 0);
      if (sheet) sound += 1;
      else if (notes.length > 0) beyondSchema += 1;
    }),
    { numRuns },
  );
  // Both ends are reached often (some 40 times each), or the property would say little.
  if (value === plausible) expect(Math.min(sound, beyondSchema)).toBeGreaterThan(5);
});

test('any JSON value at all is answered', () => {
  fc.assert(
    fc.property(fc.jsonValue(), (data) => {
      const { sheet, problems } = checkSheet(data);
      expect(sheet).toBe(undefined);
      problems.forEach(expectReadable);
    }),
  );
});

test('many contradictions are told at once', () => {
  const { problems } = checkSheet(
    changedSheet({
      '/target/language': 'micropython',
      '/sensors/count': 5,
      '/sensors/aheadOfAxleMm': 118,
      '/start/buttonPin': 'A0',
      '/power/fullV': 5,
      '/drive/driver/scheme': 'dual-pwm',
    }),
  );
  const pointers = new Set(problems.map(({ pointer }) => pointer));
  for (const pointer of [
    '/target/language',
    '/sensors/pins',
    '/line/tightestRadiusMm',
    '/start/buttonPin',
    '/power/fullV',
    '/drive/driver/left/pwm',
  ]) {
    expect(pointers).toContain(pointer);
  }
});
