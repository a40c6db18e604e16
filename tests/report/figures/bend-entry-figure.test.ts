import { describe, expect, it } from 'vitest';
import { viewM } from '../../../src/design/bar-view.js';
import { classForBend } from '../../../src/design/class-for-bend.js';
import { entryPeakM } from '../../../src/design/entry.js';
import { toleranceCorners } from '../../../src/design/tolerance-box.js';
import { bendEntryFigure } from '../../../src/report/figures/bend-entry-figure.js';
import { type CartName, classed, designOf, elementsOf, parsed, pointsOf, valueAt } from './drawn.js';

function drawnOf(cart: CartName) {
  const design = designOf(cart);
  const root = parsed(bendEntryFigure(design));
  const { vehicle, classes } = design;
  const radiusM = vehicle.line.tightestRadiusM;
  const { gains, speedMps } = classForBend(classes, radiusM);
  const peaksMm = toleranceCorners(vehicle).map((corner) => {
    return 1000 * entryPeakM(vehicle, gains, speedMps, radiusM, corner);
  });
  const words = elementsOf(root, 'text').map((text) => text.textContent ?? '');
  return { root, vehicle, peaksMm, words, curves: classed(root, 'entry').map(pointsOf) };
}

describe.each(['pid', 'two sensors', 'classes by hand'] as const)('bend entry of %s', (cart) => {
  const { root, vehicle, peaksMm, words, curves } = drawnOf(cart);
  const [mm, driven] = [valueAt(root, 'y'), valueAt(root, 'x')];

  it('has a curve for each corner, as high as the simulation says', () => {
    expect(curves).toHaveLength(5);
    curves.forEach((points, i) => {
      const highest = Math.max(...points.map(([, y]) => mm(y)));
      // curves are drawn to the px
      expect(Math.abs(highest - peaksMm[i]!)).toBeLessThan(0.004 * 1000 * viewM(vehicle));
      expect(words.some((text) => text.endsWith(`: peak ${peaksMm[i]!.toFixed(1)} mm`))).toBe(true);
    });
  });

  it('goes on until the bend is driven, and begins on the line', () => {
    for (const points of curves) {
      expect(Math.abs(mm(points[0]![1]))).toBeLessThan(0.1);
      expect(driven(points.at(-1)![0])).toBeGreaterThan(1600 * vehicle.line.tightestRadiusM);
    }
  });

  it('shows where the bar loses the line', () => {
    const limit = classed(root, 'view-limit').map(pointsOf)[0]!;
    expect(Math.abs(mm(limit[0]![1]) - 1000 * viewM(vehicle))).toBeLessThan(0.1);
    expect(words).toContain(`the bar loses the line: ${(1000 * viewM(vehicle)).toFixed(1)} mm`);
  });
});

describe('bend entry at a speed that loses the line', () => {
  it('ends the curve at the limit of the view and says so', () => {
    const { root, vehicle, peaksMm, words, curves } = drawnOf('too fast');
    expect(peaksMm.map(Number.isFinite)).toEqual([true, true, true, true, false]);
    const mm = valueAt(root, 'y');
    const last = curves.at(-1)!.at(-1)!;
    expect(mm(last[1])).toBeGreaterThanOrEqual(1000 * viewM(vehicle) - 0.1);
    expect(words).toContain('fast, long lag: lost');
    expect(words).toContain('fast, long lag (speed \u00d71.18, lag \u00d71.35): the bar loses the line');
  });
});
