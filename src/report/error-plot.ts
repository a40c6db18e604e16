/** Lateral error over distance as SVG, with the lane's bends, gaps and crossings behind it. */
import type { Lane } from '../course/lane.js';
import { mToMm } from '../sheet/units.js';
import type { SvgPart } from './drive-map.js';
import { niceStep } from './axis-steps.js';
import { least, most, type DrivenRun } from './driven-run.js';
import { GRID, INK, LOST, MARK, SHADE, WORDS } from './svg-document.js';
import { coordinate, element, pathThrough, textAt } from './svg-text.js';

const LEFT = 62;
const RIGHT = 8;
const TOP = 30;
const PLOT_HEIGHT = 190;
const BOTTOM = 40;

/** @param width px */
export function errorPlot(run: DrivenRun, width: number): SvgPart {
  const { lane, trace, loss } = run;
  const endM = Math.max(most(trace.sM), 1e-3);
  const rangeMm = mToMm(Math.max(most(trace.lateralM), -least(trace.lateralM), 1e-3));
  const stepMm = niceStep(rangeMm, 2);
  const limitMm = Math.ceil(rangeMm / stepMm - 1e-9) * stepMm;
  const x = (sM: number): number => LEFT + (Math.max(0, sM) / endM) * (width - LEFT - RIGHT);
  const y = (mm: number): number => TOP + ((limitMm - mm) / (2 * limitMm)) * PLOT_HEIGHT;
  const points = Array.from(trace.sM, (sM, i): [number, number] => [x(sM), y(mToMm(trace.lateralM[i]!))]);

  const parts = [
    textAt(LEFT, 14, 'Lateral error of the axle over distance', { 'font-weight': 'bold', fill: WORDS }),
    ...background(lane, endM, x),
  ];
  for (let mm = -limitMm; mm <= limitMm + 1e-9; mm += stepMm) {
    const d = `M${LEFT} ${coordinate(y(mm))}H${coordinate(width - RIGHT)}`;
    const isZero = Math.abs(mm) < 1e-9;
    parts.push(element('path', { d, fill: 'none', stroke: isZero ? WORDS : GRID, 'stroke-width': 1 }));
    const label = `${mm > 1e-9 ? '+' : ''}${isZero ? 0 : Number(mm.toPrecision(6))}`;
    parts.push(textAt(LEFT - 7, y(mm) + 4, label, { 'text-anchor': 'end', fill: WORDS }));
  }
  parts.push(
    axisWords('left', y(limitMm / 2)),
    axisWords('right', y(-limitMm / 2)),
    ...distanceAxis(endM, x),
  );
  parts.push(element('path', { d: pathThrough(points), fill: 'none', stroke: INK, 'stroke-width': 1.4 }));
  if (loss !== undefined) {
    const at = x(Math.min(loss.sM, endM));
    parts.push(textAt(at - 4, TOP - 5, 'lost', { 'text-anchor': 'end', fill: LOST, 'font-weight': 'bold' }));
  }
  return { svg: parts.join('\n'), height: TOP + PLOT_HEIGHT + BOTTOM };
}

function axisWords(side: string, y: number): string {
  const transform = `translate(14 ${coordinate(y)}) rotate(-90)`;
  return textAt(0, 0, `mm ${side}`, { transform, 'text-anchor': 'middle', fill: WORDS });
}

/** Bends as shades, the darker the tighter; gaps and crossings as lines; the start line at each lap. */
function background(lane: Lane, endM: number, x: (sM: number) => number): string[] {
  const parts: string[] = [];
  const tightest = Math.max(...lane.pieces.map((piece) => Math.abs(piece.curvaturePerM)), 1e-9);
  const laps = lane.closed ? Math.max(1, Math.ceil(endM / lane.lengthM - 0.01)) : 1;
  for (let lap = 0; lap < laps; lap++) {
    const lapM = lap * lane.lengthM;
    for (const { startM, lengthM, curvaturePerM, kind } of lane.pieces) {
      const [from, to] = [lapM + startM, Math.min(endM, lapM + startM + lengthM)];
      if (from >= endM || kind === 'straight') continue;
      const box = { x: x(from), y: TOP, width: x(to) - x(from), height: PLOT_HEIGHT };
      const opacity = (0.75 * Math.abs(curvaturePerM)) / tightest;
      if (kind === 'arc')
        parts.push(element('rect', { ...box, fill: SHADE, 'fill-opacity': opacity.toFixed(2) }));
      else parts.push(element('rect', { ...box, fill: MARK, 'fill-opacity': '0.5' }));
    }
    for (const crossing of lane.crossings) {
      if (lapM + crossing.sM < endM) parts.push(upright(x(lapM + crossing.sM), MARK, '3 3'));
    }
    if (lap > 0) {
      parts.push(upright(x(lapM), WORDS, '1 4'));
      parts.push(textAt(x(lapM) + 4, TOP + 12, `lap ${lap + 1}`, { fill: WORDS }));
    }
  }
  return parts;
}

function upright(x: number, stroke: string, dashes: string): string {
  const d = `M${coordinate(x)} ${TOP}v${PLOT_HEIGHT}`;
  return element('path', { d, fill: 'none', stroke, 'stroke-width': 1.5, 'stroke-dasharray': dashes });
}

function distanceAxis(endM: number, x: (sM: number) => number): string[] {
  const step = niceStep(endM, 10);
  const parts: string[] = [];
  const digits = Math.max(0, Math.ceil(-Math.log10(step) - 1e-9));
  const bottom = TOP + PLOT_HEIGHT;
  for (let i = 0; i * step <= endM * (1 + 1e-9); i++) {
    parts.push(
      element('path', { d: `M${coordinate(x(i * step))} ${bottom}v5`, fill: 'none', stroke: WORDS }),
    );
    const label = `${(i * step).toFixed(digits)}${i === 0 ? ' m' : ''}`;
    parts.push(textAt(x(i * step), bottom + 18, label, { 'text-anchor': 'middle', fill: WORDS }));
  }
  const legend = 'shaded: bends, the darker the tighter \u00b7 blue: gap \u00b7 blue dashes: crossing';
  parts.push(textAt(LEFT, bottom + 36, legend, { fill: WORDS, 'font-size': '11' }));
  return parts;
}
