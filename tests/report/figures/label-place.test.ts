import { describe, expect, it } from 'vitest';
import { LabelPlacer, textWidth } from '../../../src/report/figures/label-place.js';
import { apartPoints } from '../../../src/report/figures/apart-points.js';
import type { Point } from '../../../src/report/figures/polyline.js';
import { elementsOf, numberOf, parsed, pointsOf } from './drawn.js';

const BOUNDS = { x: 0, y: 0, width: 300, height: 200 };
const FONT = 10;

function boxOf(svg: string) {
  const [text] = elementsOf(parsed(`<svg>${svg}</svg>`), 'text');
  const half = textWidth(text!.textContent ?? '', FONT) / 2;
  const [x, y] = [numberOf(text!, 'x'), numberOf(text!, 'y')];
  return { left: x - half, right: x + half, top: y - FONT + 2.5, bottom: y + 2.5 };
}

describe('labels', () => {
  it('keep off curves and off each other', () => {
    const placer = new LabelPlacer(BOUNDS, FONT);
    const curve: Point[] = [
      [0, 100],
      [300, 100],
    ];
    placer.avoid(curve);
    const boxes = ['one', 'two', 'three', 'four', 'five', 'six'].map((text) =>
      boxOf(placer.place(text, [[150, 100]])),
    );
    for (const [i, a] of boxes.entries()) {
      expect(a.top > 100 || a.bottom < 100).toBe(true);
      for (const b of boxes.slice(i + 1)) {
        expect(a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom).toBe(false);
      }
    }
  });

  it('stay inside the plot, also at its corner', () => {
    const box = boxOf(new LabelPlacer(BOUNDS, FONT).place('at the corner', [[300, 0]]));
    expect(box.left).toBeGreaterThanOrEqual(0);
    expect(box.right).toBeLessThanOrEqual(300);
    expect(box.top).toBeGreaterThanOrEqual(0);
  });

  it('take another anchor where the first is crowded', () => {
    const placer = new LabelPlacer(BOUNDS, FONT);
    for (let y = 0; y <= 100; y += 3)
      placer.avoid([
        [0, y],
        [120, y],
      ]);
    expect(
      boxOf(
        placer.place('word', [
          [60, 50],
          [200, 50],
        ]),
      ).left,
    ).toBeGreaterThan(120);
  });

  it('have a leader that ends on the anchor', () => {
    const svg = new LabelPlacer(BOUNDS, FONT).place('word', [[100, 100]], true);
    const [path] = elementsOf(parsed(`<svg>${svg}</svg>`), 'path');
    expect(pointsOf(path!)[0]).toEqual([100, 100]);
  });

  it('need an anchor', () => {
    expect(() => new LabelPlacer(BOUNDS, FONT).place('word', [])).toThrow('A label needs an anchor.');
  });
});

describe('points apart', () => {
  const level = (y: number): Point[][] => [
    [
      [0, y],
      [300, y],
    ],
  ];

  it('are where a curve is farthest from the others', () => {
    const rising: Point[][] = [
      [
        [0, 100],
        [300, 40],
      ],
    ];
    const [first] = apartPoints([level(100), rising], 0);
    expect(first![0]).toBeGreaterThan(250);
  });

  it('are none where a curve lies along another', () => {
    expect(apartPoints([level(100), level(103)], 0)).toEqual([]);
  });
});
