import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { linearAxis, logAxis } from '../../../src/report/figures/axis.js';

/** Two values in rising order, a millionth of their size apart or more. */
function rising(least: number, most: number): fc.Arbitrary<[number, number]> {
  const value = fc.double({ min: least, max: most, noNaN: true });
  return fc
    .tuple(value, value)
    .map(([a, b]): [number, number] => (a < b ? [a, b] : [b, a]))
    .filter(([a, b]) => b - a > 1e-6 * Math.max(Math.abs(a), Math.abs(b), 1e-3));
}

const px = fc.tuple(fc.integer({ min: 0, max: 500 }), fc.integer({ min: 501, max: 1000 }));

describe.each([
  { name: 'linear', axis: linearAxis, values: rising(-1e6, 1e6) },
  { name: 'logarithmic', axis: logAxis, values: rising(1e-3, 1e6) },
])('$name axis', ({ axis, values }) => {
  it('is monotone, upward and downward, and ends where it should', () => {
    fc.assert(
      fc.property(
        values,
        px,
        fc.boolean(),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (ends, places, isDown, share) => {
          const [from, to] = ends;
          const [fromPx, toPx] = isDown ? places.toReversed() : places;
          const made = axis({ from, to, fromPx: fromPx!, toPx: toPx! });
          expect(made.at(from)).toBeCloseTo(fromPx!, 6);
          expect(made.at(to)).toBeCloseTo(toPx!, 6);
          const between = from + share * (to - from);
          const sign = isDown ? -1 : 1;
          expect(sign * (made.at(between) - made.at(from))).toBeGreaterThanOrEqual(-1e-9);
          expect(sign * (made.at(to) - made.at(between))).toBeGreaterThanOrEqual(-1e-9);
          const ticks = made.ticks.map(({ value }) => sign * made.at(value));
          expect(ticks).toEqual(ticks.toSorted((a, b) => a - b));
          for (const tick of ticks) {
            expect(sign * tick).toBeGreaterThan(places[0] - 1e-3);
            expect(sign * tick).toBeLessThan(places[1] + 1e-3);
          }
        },
      ),
    );
  });
});

const labels = (axis: ReturnType<typeof linearAxis>) => axis.ticks.map(({ label }) => label).filter(Boolean);

it.each([
  [0, 1.68, ['0', '0.5', '1', '1.5']],
  [-10, 38.6, ['-10', '0', '10', '20', '30']],
  [0.1, 0.32, ['0.1', '0.15', '0.2', '0.25', '0.3']],
])('a linear axis from %f to %f has round numbers', (from, to, expected) => {
  expect(labels(linearAxis({ from, to, fromPx: 0, toPx: 600 }))).toEqual(expected);
});

it.each([
  [
    800,
    1,
    100_000,
    [
      '1',
      '2',
      '5',
      '10',
      '20',
      '50',
      '100',
      '200',
      '500',
      '1000',
      '2000',
      '5000',
      '10000',
      '20000',
      '50000',
      '100000',
    ],
  ],
  [300, 3, 3000, ['10', '100', '1000']],
  [800, 95, 420, ['100', '200', '300', '400']],
])('a logarithmic axis of %i px from %f to %f is numbered as there is room', (width, from, to, expected) => {
  expect(labels(logAxis({ from, to, fromPx: 0, toPx: width }))).toEqual(expected);
});

it('a logarithmic axis does not begin at 0', () => {
  const ends = { from: 0, to: 1, fromPx: 0, toPx: 1 };
  expect(() => logAxis(ends)).toThrow('A logarithmic axis runs from above 0 upward.');
});
