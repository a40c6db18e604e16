/** The area of a plot: its frame, grid and numbers, and curves cut at its edge. */
import { GRID, WORDS } from '../svg-document.js';
import { coordinate, element, textAt } from '../svg-text.js';
import type { Axis } from './axis.js';
import { clipped, thinned, type Box, type Point } from './polyline.js';

export interface PlotArea extends Box {
  xAxis: Axis;
  yAxis: Axis;
}

/** Words beside the axes; without those of the x axis its numbers are left out too. */
export interface AxisWords {
  x?: string;
  y: string;
}

/** Space that numbers and words of the axes take, px. */
export const LEFT_OF_PLOT = 64;
export const BELOW_PLOT = 42;

export function plotFrame({ x, y, width, height, xAxis, yAxis }: PlotArea, words: AxisWords): string {
  const bottom = y + height;
  const upright = xAxis.ticks.map(({ value }) => `M${coordinate(xAxis.at(value))} ${y}v${height}`);
  const level = yAxis.ticks.map(({ value }) => `M${x} ${coordinate(yAxis.at(value))}h${width}`);
  const parts = [
    element('path', {
      d: [...upright, ...level].join(''),
      fill: 'none',
      stroke: GRID,
      'stroke-width': 1,
    }),
    element('rect', { x, y, width, height, fill: 'none', stroke: WORDS, 'stroke-width': 1 }),
    ...yAxis.ticks.map(({ value, label }) =>
      textAt(x - 7, yAxis.at(value) + 4.5, label.replace('-', '\u2212'), {
        class: 'y-number',
        'text-anchor': 'end',
        fill: WORDS,
      }),
    ),
    textAt(0, 0, words.y, {
      transform: `translate(${coordinate(x - LEFT_OF_PLOT + 12)} ${coordinate(y + height / 2)}) rotate(-90)`,
      'text-anchor': 'middle',
      fill: WORDS,
    }),
  ];
  if (words.x !== undefined) {
    const numbers = xAxis.ticks.filter(({ label }) => label !== '');
    parts.push(
      ...numbers.map(({ value, label }) =>
        textAt(xAxis.at(value), bottom + 18, label.replace('-', '\u2212'), {
          class: 'x-number',
          'text-anchor': 'middle',
          fill: WORDS,
        }),
      ),
      textAt(x + width / 2, bottom + 36, words.x, { 'text-anchor': 'middle', fill: WORDS }),
    );
  }
  return parts.join('\n');
}

/** Points of a curve that lie nearer together are left out, px. */
const LEAST_STEP_PX = 1;

/** A curve in px, cut at the edge of the plot. */
export function curveIn(area: PlotArea, points: readonly Point[]): Point[][] {
  const { xAxis, yAxis } = area;
  const placed = points.map(([x, y]): Point => [xAxis.at(x), yAxis.at(y)]);
  return clipped(placed, area).map((part) => thinned(part, LEAST_STEP_PX));
}
