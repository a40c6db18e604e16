import type { Element } from '@xmldom/xmldom';
import { describe, expect, it } from 'vitest';
import { deriveDesign } from '../../../src/design/derive.js';
import { designFigures } from '../../../src/report/figures/design-figures.js';
import { demoVehicle } from '../../design/demo-vehicle.js';
import { CART_NAMES, type CartName, designOf, elementsOf, numberOf, parsed } from './drawn.js';

const drawn = new Map(CART_NAMES.map((name) => [name, designFigures(designOf(name))]));
const everyFigure = [...drawn].flatMap(([cart, figures]) =>
  figures.map(({ name, svg }) => ({ cart, name, svg })),
);

/** Where a level text lies, px: at least so wide in any usual font. */
function boxOf(text: Element) {
  const size = Number(text.getAttribute('font-size') ?? '13');
  const width = 0.5 * size * (text.textContent ?? '').length;
  const anchor = text.getAttribute('text-anchor') ?? 'start';
  const left = numberOf(text, 'x') - width * { start: 0, middle: 0.5, end: 1 }[anchor]!;
  const bottom = numberOf(text, 'y');
  return { left, right: left + width, top: bottom - 0.72 * size, bottom, words: text.textContent };
}

describe.each(everyFigure)('$name of $cart', ({ svg }) => {
  const root = parsed(svg);

  it('is one SVG document that needs nothing beside it', () => {
    expect(root.tagName).toBe('svg');
    expect(root.getAttribute('xmlns')).toBe('http://www.w3.org/2000/svg');
    const names = new Set(elementsOf(root).map((each) => each.tagName));
    const allowed = ['title', 'desc', 'g', 'rect', 'path', 'circle', 'text'];
    expect([...names].filter((name) => !allowed.includes(name))).toEqual([]);
    expect(svg.match(/href|url\(|@import/)).toBeNull();
  });

  it('has no odd number in it', () => {
    expect(svg.match(/NaN|Infinity|undefined|null|-0[" ]|\de-?\d/)).toBeNull();
    expect(svg.match(/ (d|transform)="[^"]*\.\d\d/)).toBeNull();
  });

  it('has no word over another, and none beyond the edge', () => {
    const texts = elementsOf(root, 'text').filter((text) => text.getAttribute('transform') === null);
    const boxes = texts.map(boxOf);
    const over = boxes.flatMap((a, i) =>
      boxes
        .slice(i + 1)
        .filter((b) => a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom)
        .map((b) => [a.words, b.words]),
    );
    expect(over).toEqual([]);
    const [width, height] = [numberOf(root, 'width'), numberOf(root, 'height')];
    const beyond = boxes.filter(({ left, right, bottom }) => left < 0 || right > width || bottom > height);
    expect(beyond).toEqual([]);
  });

  it('tells nothing by colour: every ink is a grey to the eye', () => {
    const inks = elementsOf(root).flatMap((each) => [each.getAttribute('stroke'), each.getAttribute('fill')]);
    const colors = [...new Set(inks)].filter((ink) => ink !== null && ink !== 'none');
    for (const color of colors) {
      const parts = [1, 3, 5].map((at) => Number.parseInt(color!.slice(at, at + 2), 16));
      expect(Math.max(...parts) - Math.min(...parts), color!).toBeLessThanOrEqual(50);
    }
  });
});

describe('the figures of a design', () => {
  const namesOf = (cart: CartName) => drawn.get(cart)!.map(({ name }) => name);

  it('have fixed names; a rule table is drawn for rules only', () => {
    const always = ['bode.svg', 'nyquist.svg', 'bend-entry.svg', 'speed-radius.svg'];
    expect(namesOf('pid')).toEqual(always);
    expect(namesOf('rules')).toEqual([...always, 'rule-table.svg']);
  });

  it('are the same bytes for the same vehicle', () => {
    expect(designFigures(deriveDesign(demoVehicle()))).toEqual(drawn.get('pid'));
  });

  it('escape what a vehicle and its classes may be called', () => {
    const hostile = '</text><script>alert("&1")</script>\u0001\ud800]]>';
    const design = designOf('rules');
    const named = {
      ...design,
      vehicle: { ...design.vehicle, name: hostile },
      classes: design.classes.map((each) => ({ ...each, name: hostile })),
    };
    const readable = '</text><script>alert("&1")</script>]]>';
    for (const { name, svg } of designFigures(named)) {
      const root = parsed(svg);
      expect(elementsOf(root, 'script'), name).toEqual([]);
      expect(elementsOf(root, 'title')[0]?.textContent, name).toContain(readable);
    }
  });
});
