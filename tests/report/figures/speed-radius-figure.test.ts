import { describe, expect, it } from 'vitest';
import { limitCurves } from '../../../src/design/limit-curves.js';
import { speedRadiusFigure } from '../../../src/report/figures/speed-radius-figure.js';
import { classed, designOf, elementsOf, numberOf, parsed, pointsOf, valueAt } from './drawn.js';

describe.each(['pid', 'classes by hand'] as const)('speed against radius of %s', (cart) => {
  const design = designOf(cart);
  const root = parsed(speedRadiusFigure(design));
  const words = elementsOf(root, 'text').map((text) => text.textContent ?? '');
  const speed = valueAt(root, 'y');
  const radiusMm = (px: number) => 10 ** valueAt(root, 'x', Math.log10)(px);

  it('has a point for each class at its radius and speed', () => {
    const points = classed(root, 'class-point');
    expect(points).toHaveLength(design.classes.length);
    design.classes.forEach(({ name, minRadiusM, speedMps }, i) => {
      expect(radiusMm(numberOf(points[i]!, 'cx')) / (1000 * minRadiusM)).toBeCloseTo(1, 2);
      expect(Math.abs(speed(numberOf(points[i]!, 'cy')) - speedMps)).toBeLessThan(0.002);
      expect(words).toContain(`${name} ${speedMps.toFixed(2)}`);
    });
  });

  it('has the motor and grip limits where the design computes them', () => {
    for (const name of ['motor', 'grip'] as const) {
      const points = classed(root, name).flatMap(pointsOf);
      const some = points.filter((_, i) => i % 7 === 0);
      const limits = limitCurves(
        design.vehicle,
        some.map(([x]) => radiusMm(x) / 1000),
      );
      // between two radii the curve is straight
      some.forEach(([, y], i) => {
        expect(Math.abs(speed(y) / limits[i]!.limits[name] - 1)).toBeLessThan(0.01);
      });
      expect(points.length).toBeGreaterThan(10);
    }
  });

  it('drives no faster in a tighter bend', () => {
    const speeds = classed(root, 'driven')
      .flatMap(pointsOf)
      .map(([, y]) => -y);
    expect(speeds).toEqual(speeds.toSorted((a, b) => a - b));
  });
});

it('names what binds, once for neighbouring classes', () => {
  const { classes, ...rest } = designOf('pid');
  const binding = ['finish', 'finish', 'finish', 'motor', 'motor', 'grip', 'grip'] as const;
  const bound = { ...rest, classes: classes.map((each, i) => ({ ...each, limitedBy: binding[i]! })) };
  const wordsOf = (design: typeof bound) =>
    elementsOf(parsed(speedRadiusFigure(design)), 'text').map((text) => text.textContent);
  const words = wordsOf(bound);
  expect(words.filter((text) => text === 'perturbed rehearsals')).toHaveLength(1);
  expect(words.filter((text) => text === 'given in the sheet')).toEqual([]);
  const byHand = wordsOf(designOf('classes by hand') as typeof bound);
  expect(byHand.filter((text) => text === 'given in the sheet')).toHaveLength(1);
});

it('steps where the sheet gives the classes', () => {
  const root = parsed(speedRadiusFigure(designOf('classes by hand')));
  const speed = valueAt(root, 'y');
  const driven = classed(root, 'driven')
    .flatMap(pointsOf)
    .map(([, y]) => Math.round(100 * speed(y)) / 100);
  expect([...new Set(driven)]).toEqual([0.5, 0.8, 1.1]);
});
