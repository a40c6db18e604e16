import type { Element } from '@xmldom/xmldom';
import { describe, expect, it } from 'vitest';
import { designJson } from '../../../src/report/design-json.js';
import { ruleTableFigure } from '../../../src/report/figures/rule-table-figure.js';
import { type CartName, classed, designOf, elementsOf, numberOf, parsed, pointsOf } from './drawn.js';

function drawnOf(cart: CartName) {
  const design = designOf(cart);
  const root = parsed(ruleTableFigure(design)!);
  const rules = new Map(designJson(design).rules.map((rule) => [rule.state, rule]));
  const rows = classed(root, 'rule').map((row) => {
    const words = elementsOf(row, 'text').map((text) => text.textContent ?? '');
    return { row, words, state: Number(words[0]) };
  });
  return { design, rules, rows };
}

/** Length of a wheel's arrow from shaft to tip, px, forward positive. */
function arrowPx(row: Element, wheel: string): number {
  const shaft = classed(row, 'wheel').find((each) => each.getAttribute('class')!.endsWith(wheel))!;
  const head = pointsOf(shaft.nextSibling!.nextSibling as Element);
  return head[0]![0] - pointsOf(shaft)[0]![0];
}

describe.each(['rules', 'two sensors', 'eight sensors'] as const)('rule table of %s', (cart) => {
  const { design, rules, rows } = drawnOf(cart);
  const count = design.vehicle.bar.positionsM.length;

  it('has all states of up to six sensors, of more those that a line causes', () => {
    const wanted = [...rules.values()].filter(({ kind }) => count <= 6 || kind === 'line');
    const states = rows.map(({ state }) => state);
    expect(states.toSorted((a, b) => a - b)).toEqual(wanted.map(({ state }) => state));
  });

  it('fills the spots that see the line, to scale from left to right', () => {
    for (const { row, state } of rows) {
      const spots = elementsOf(row, 'circle');
      const bits = spots.map((spot) => (spot.getAttribute('class') === 'on' ? '1' : '0')).join('');
      expect(bits).toBe(state.toString(2).padStart(count, '0'));
      const places = spots.map((spot) => numberOf(spot, 'cx'));
      const perM = (places.at(-1)! - places[0]!) / (2 * design.vehicle.bar.positionsM[0]!);
      design.vehicle.bar.positionsM.forEach((positionM, i) => {
        const middle = (places.at(-1)! + places[0]!) / 2;
        expect(Math.abs(places[i]! - middle + positionM * perM)).toBeLessThan(0.11);
      });
    }
  });

  it('has arrows as long as the wheels are fast', () => {
    const lengths = rows.flatMap(({ row, state }) => {
      const { left, right } = rules.get(state)!;
      return [
        { px: arrowPx(row, 'left'), fraction: left },
        { px: arrowPx(row, 'right'), fraction: right },
      ];
    });
    const base = lengths.find(({ fraction }) => fraction === 1)!.px;
    for (const { px, fraction } of lengths) expect(Math.abs(px - fraction * base)).toBeLessThan(0.5);
  });

  it('says numbers, kind and offsets', () => {
    for (const { words, state } of rows) {
      const rule = rules.get(state)!;
      const [, left, right, kind] = words.map((text) => text.replaceAll('\u2212', '-'));
      expect([left, right]).toEqual([rule.left.toFixed(2), rule.right.toFixed(2)]);
      const { fromMm, toMm } = rule as { fromMm?: number; toMm?: number };
      if (fromMm === undefined || toMm === undefined) expect(kind).toBe(rule.kind);
      else expect(kind).toBe(`line ${fromMm.toFixed(1)} to ${toMm.toFixed(1)}`);
    }
  });
});

it('a wheel that turns backward has an arrow to the left, one that stands a point', () => {
  const design = designOf('rules');
  const { controller } = design;
  const rules = controller.rules!;
  const left = rules.left.map((_, i) => (i % 2 === 0 ? -32 : 0));
  const changed = { ...design, controller: { ...controller, rules: { ...rules, left } } };
  const rows = classed(parsed(ruleTableFigure(changed)!), 'rule');
  const wheels = rows.map((row) => classed(row, 'left')[0]!);
  const backward = rows.filter((_, i) => wheels[i]!.tagName === 'path').map((row) => arrowPx(row, 'left'));
  expect(wheels.some((wheel) => wheel.tagName === 'circle')).toBe(true);
  expect(backward.some((px) => px < -10)).toBe(true);
});

it('there is none for a controller without rules', () => {
  expect(ruleTableFigure(designOf('pid'))).toBeUndefined();
});
