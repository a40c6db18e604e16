/**
 * Bode plot: magnitude and phase of the open loop over frequency, with the gain and phase margin drawn in.
 *
 * A column for the class of the tightest bend and one for the fastest, on the same axes. The corner of the tolerance box with
 * the least gain margin and the one with the least phase margin stand beside the nominal vehicle.
 */
import type { Design, DesignedClass } from '../../design/design.js';
import { LEAST_MARGINS } from '../../design/tolerance-box.js';
import { MARGIN, WIDTH, WORDS, svgDocument } from '../svg-document.js';
import { element, textAt } from '../svg-text.js';
import { type BodeRange, bodeRange, decibels, magnitudePoints, phasePoints } from './bode-curves.js';
import { linearAxis, logAxis } from './axis.js';
import { type DrawnLoop, classHeading, classLoops, columnsInWords, drawnClasses } from './drawn-loops.js';
import { type KeyedLoop, keyedLoops } from './keyed-loops.js';
import { LabelPlacer } from './label-place.js';
import { KEY_ROW_PX, THIN, dot, keyRow, line, strokeOf, upright } from './line-style.js';
import { BELOW_PLOT, LEFT_OF_PLOT, type PlotArea, curveIn, plotFrame } from './plot-area.js';
import type { Point } from './polyline.js';

const FONT = 13;
const TOP = 112;
const MAGNITUDE_HEIGHT = 250;
const PHASE_HEIGHT = 230;
const BETWEEN = 16;
const COLUMN_GAP = 26;
const KEY_ROWS = 3;
const HEIGHT =
  TOP + MAGNITUDE_HEIGHT + BETWEEN + PHASE_HEIGHT + BELOW_PLOT + 24 + KEY_ROWS * KEY_ROW_PX + MARGIN;

interface Column {
  designed: DesignedClass;
  loops: KeyedLoop[];
}

/** The picture as an SVG document. */
export function bodeFigure(design: Design): string {
  const columns = drawnClasses(design).map((designed): Column => {
    return { designed, loops: keyedLoops(designed, classLoops(design, designed)) };
  });
  const range = bodeRange(columns.flatMap(({ loops }) => loops.map(({ loop }) => loop)));
  const { gainMargin, phaseMarginDeg } = LEAST_MARGINS;
  const demanded = `gain margin ${gainMargin} (${decibels(gainMargin).toFixed(1)} dB), phase margin ${phaseMarginDeg}\u00b0`;
  const width = (WIDTH - 2 * MARGIN - (columns.length - 1) * COLUMN_GAP) / columns.length;
  return svgDocument({
    title: `${design.vehicle.name}: open loop of the steering`,
    summary: `From lateral error through law and vehicle. Demanded in every corner: ${demanded}.`,
    description: columnsInWords(columns),
    height: HEIGHT,
    fontSize: FONT,
    parts: columns.map((column, i) => columnSvg(column, range, MARGIN + i * (width + COLUMN_GAP), width)),
  });
}

function columnSvg({ designed, loops }: Column, range: BodeRange, left: number, width: number): string {
  const x = left + LEFT_OF_PLOT;
  const inner = width - LEFT_OF_PLOT - 8;
  const xAxis = logAxis({ ...range.frequencyRadS, fromPx: x, toPx: x + inner });
  const areaAt = (y: number, height: number, { from, to }: { from: number; to: number }, step: number) => {
    const yAxis = linearAxis({ from, to, fromPx: y + height, toPx: y }, step);
    return { x, y, width: inner, height, xAxis, yAxis };
  };
  const magnitude = areaAt(TOP, MAGNITUDE_HEIGHT, range.decibels, 20);
  const phase = areaAt(TOP + MAGNITUDE_HEIGHT + BETWEEN, PHASE_HEIGHT, range.phaseDeg, 45);
  const keyTop = phase.y + phase.height + BELOW_PLOT + 28;
  return [
    textAt(x, TOP - 14, classHeading(designed), { 'font-weight': 'bold', fill: WORDS }),
    plot('magnitude', [plotFrame(magnitude, { y: 'magnitude, dB' }), magnitudeSvg(magnitude, loops)]),
    plot('phase', [plotFrame(phase, { x: 'frequency, rad/s', y: 'phase, degrees' }), phaseSvg(phase, loops)]),
    ...loops.map(({ style, words }, i) => keyRow(left + 8, keyTop + i * KEY_ROW_PX, style, words)),
  ].join('\n');
}

/** A plot as a group that can be told from the others. */
function plot(kind: string, parts: readonly string[]): string {
  return element('g', { class: kind }, `\n${parts.join('\n')}\n`);
}

/** A level line across a plot: 0 dB, or -180 degrees. */
function levelLine({ x, width, yAxis }: PlotArea, value: number): { svg: string; points: Point[] } {
  const y = yAxis.at(value);
  const points: Point[] = [
    [x, y],
    [x + width, y],
  ];
  return { svg: line([points], THIN, strokeOf(THIN, WORDS)), points };
}

/** One margin of one loop, as it is drawn. */
interface Mark {
  kind: 'gain-margin' | 'phase-margin';
  frequencyRadS: number;
  from: number;
  to: number;
  label: string;
}

function plotSvg(
  area: PlotArea,
  level: number,
  loops: readonly KeyedLoop[],
  points: (loop: DrawnLoop) => Point[],
  markOf: (loop: KeyedLoop) => Mark | undefined,
): string {
  const zero = levelLine(area, level);
  const placer = new LabelPlacer(area, FONT);
  placer.avoid(zero.points);
  const curves = loops.map((keyed) => {
    const parts = curveIn(area, points(keyed.loop));
    placer.avoid(...parts);
    return line(parts, keyed.style);
  });
  const marks = loops.flatMap((keyed) => markOf(keyed) ?? []);
  const drawn = marks.map(({ kind, frequencyRadS, from, to }) => {
    const [x, y0, y1] = [area.xAxis.at(frequencyRadS), area.yAxis.at(from), area.yAxis.at(to)];
    placer.avoid([
      [x, y0],
      [x, y1],
    ]);
    return `${upright(x, y0, y1, { class: kind })}\n${dot([x, y1])}`;
  });
  const labels = marks.map(({ frequencyRadS, from, to, label }) => {
    const x = area.xAxis.at(frequencyRadS);
    const anchors = [1, 0.8, 0.6, 0.4, 0.2].map((share): Point => {
      return [x, area.yAxis.at(from + share * (to - from))];
    });
    return placer.place(label, anchors);
  });
  return [zero.svg, ...curves, ...drawn, ...labels].join('\n');
}

function magnitudeSvg(area: PlotArea, loops: readonly KeyedLoop[]): string {
  return plotSvg(area, 0, loops, magnitudePoints, ({ loop, gainLabel }): Mark | undefined => {
    const mark = loop.marks.gain;
    if (gainLabel === undefined || mark === undefined) return undefined;
    const { frequencyRadS, margin } = mark;
    return { kind: 'gain-margin', frequencyRadS, from: 0, to: -decibels(margin), label: gainLabel };
  });
}

function phaseSvg(area: PlotArea, loops: readonly KeyedLoop[]): string {
  return plotSvg(area, -180, loops, phasePoints, ({ loop, phaseLabel }): Mark | undefined => {
    const mark = loop.marks.phaseDeg;
    if (phaseLabel === undefined || mark === undefined) return undefined;
    const { frequencyRadS } = mark;
    const [re, im] = loop.response(frequencyRadS);
    const margin = Math.sign(Math.atan2(-im, -re)) * mark.margin;
    return { kind: 'phase-margin', frequencyRadS, from: -180, to: margin - 180, label: phaseLabel };
  });
}
