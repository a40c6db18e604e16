/** The margins as they are drawn are the numbers of `derive --json`. */
import type { Element } from '@xmldom/xmldom';
import { describe, expect, it } from 'vitest';
import { LEAST_MARGINS } from '../../../src/design/tolerance-box.js';
import { designJson } from '../../../src/report/design-json.js';
import { bodeFigure } from '../../../src/report/figures/bode-figure.js';
import { drawnClasses } from '../../../src/report/figures/drawn-loops.js';
import { nyquistFigure } from '../../../src/report/figures/nyquist-figure.js';
import {
  type CartName,
  classed,
  designOf,
  elementsOf,
  numberOf,
  parsed,
  pointsOf,
  valueAt,
} from './drawn.js';

/** Nominal and worst numbers of each drawn class, as in the JSON. */
function numbersOf(cart: CartName) {
  const design = designOf(cart);
  const names = drawnClasses(design).map(({ name }) => name);
  const { classes } = designJson(design);
  return names.map((name) => classes.find((each) => each.name === name)!);
}

const STABLE: CartName[] = ['pid', 'rules', 'two sensors', 'too fast'];

function wordsOf(root: Element): string[] {
  return elementsOf(root, 'text').map((text) => text.textContent ?? '');
}

/** Ends of the bars of a kind in a plot, in its unit, in the order drawn. */
function barsOf(plot: Element, kind: string): [from: number, to: number][] {
  const value = valueAt(plot, 'y');
  return classed(plot, kind).map((bar) => {
    const [start, end] = pointsOf(bar);
    return [value(start![1]), value(end![1])];
  });
}

describe.each(STABLE)('Bode plot of %s', (cart) => {
  const root = parsed(bodeFigure(designOf(cart)));
  const numbers = numbersOf(cart);

  it('has gain margins from 0 dB to where the loop crosses -180 degrees', () => {
    const drawn = classed(root, 'magnitude').map((plot) => barsOf(plot, 'gain-margin'));
    expect(drawn).toHaveLength(numbers.length);
    numbers.forEach(({ margins, worstMargins }, i) => {
      const expected = [margins.gainMargin!, worstMargins.gainMargin!].map((gain) => -20 * Math.log10(gain));
      expect(drawn[i]!.map(([from]) => Math.round(Math.abs(from) * 10))).toEqual([0, 0]);
      // a tenth of a px is less than a tenth of a dB
      drawn[i]!.forEach(([, to], k) => expect(Math.abs(to - expected[k]!)).toBeLessThan(0.1));
    });
  });

  it('has phase margins from -180 degrees to where the loop crosses 0 dB', () => {
    const drawn = classed(root, 'phase').map((plot) => barsOf(plot, 'phase-margin'));
    numbers.forEach(({ margins, worstMargins }, i) => {
      const expected = [margins.phaseMarginDeg!, worstMargins.phaseMarginDeg!].map((deg) => deg - 180);
      drawn[i]!.forEach(([from], k) => {
        expect(Math.abs(from + 180), `${k}`).toBeLessThan(0.15);
      });
      expect(drawn[i]).toHaveLength(2);
      drawn[i]!.forEach(([, to], k) => expect(Math.abs(to - expected[k]!)).toBeLessThan(0.15));
    });
  });

  it('says them in words', () => {
    const words = wordsOf(root);
    for (const { margins, worstMargins } of numbers) {
      for (const [role, { gainMargin, phaseMarginDeg }] of [
        ['nominal', margins],
        ['worst', worstMargins],
      ] as const) {
        expect(words).toContain(`GM ${gainMargin!.toFixed(1)} ${role}`);
        expect(words).toContain(`PM ${phaseMarginDeg!.toFixed(0)}\u00b0 ${role}`);
      }
    }
  });
});

describe.each(STABLE)('Nyquist plot of %s', (cart) => {
  const root = parsed(nyquistFigure(designOf(cart)));
  const planes = classed(root, 'plane');

  it('has lines of the length 1 / Ms from -1 to the loop', () => {
    numbersOf(cart).forEach(({ margins, worstMargins }, i) => {
      const [re, im] = [valueAt(planes[i]!, 'x'), valueAt(planes[i]!, 'y')];
      const drawn = classed(planes[i]!, 'nearest').map((path) => {
        const [[x0, y0], [x1, y1]] = pointsOf(path) as [[number, number], [number, number]];
        expect(re(x0)).toBeCloseTo(-1, 2);
        expect(im(y0)).toBeCloseTo(0, 2);
        return Math.hypot(re(x1) - re(x0), im(y1) - im(y0));
      });
      const expected = [1 / margins.ms!, 1 / worstMargins.ms!];
      expect(drawn).toHaveLength(2);
      drawn.forEach((length, k) => expect(Math.abs(length - expected[k]!)).toBeLessThan(0.003));
    });
  });

  it('has the circle that the design demands around -1', () => {
    for (const plane of planes) {
      const [circle] = classed(plane, 'demanded');
      const re = valueAt(plane, 'x');
      const [cx, r] = [numberOf(circle!, 'cx'), numberOf(circle!, 'r')];
      expect(re(cx)).toBeCloseTo(-1, 2);
      expect(Math.abs(re(cx + r) - re(cx) - 1 / LEAST_MARGINS.ms)).toBeLessThan(0.002);
    }
  });
});

describe('a loop that is unstable', () => {
  const design = designOf('unstable gains');

  it('has no margins drawn, and is called so', () => {
    expect(design.classes[0]!.margins.ms).toBe(Infinity);
    const [bode, nyquist] = [parsed(bodeFigure(design)), parsed(nyquistFigure(design))];
    for (const kind of ['gain-margin', 'phase-margin', 'nearest']) {
      expect([...classed(bode, kind), ...classed(nyquist, kind)]).toEqual([]);
    }
    expect(wordsOf(bode)).toContain('nominal: unstable');
    expect(wordsOf(nyquist)).toContain('nominal: unstable');
  });
});
