/**
 * Nyquist plot: the open loop in the complex plane, and the circle around -1 that it must stay out of.
 *
 * The distance of the loop from -1 is |1 + L|, whose least value is 1 / Ms; the design demands that it be at least 1 / Ms of the
 * required Ms in every corner of the tolerance box.
 */
import type { Design, DesignedClass } from '../../design/design.js';
import { LEAST_MARGINS } from '../../design/tolerance-box.js';
import { INK, MARGIN, SHADE, WIDTH, WORDS, svgDocument } from '../svg-document.js';
import { coordinate, element, textAt } from '../svg-text.js';
import { linearAxis } from './axis.js';
import {
  type DrawnLoop,
  classHeading,
  classLoops,
  columnsInWords,
  cornerWords,
  drawnClasses,
} from './drawn-loops.js';
import { LabelPlacer } from './label-place.js';
import {
  DASHED,
  DOTTED,
  KEY_ROW_PX,
  SOLID,
  THIN,
  type LineStyle,
  dot,
  keyRow,
  line,
  strokeOf,
} from './line-style.js';
import { BELOW_PLOT, LEFT_OF_PLOT, type PlotArea, curveIn, plotFrame } from './plot-area.js';
import type { Point } from './polyline.js';

const FONT = 13;
const TOP = 112;
const SIDE = 380;
const COLUMN_GAP = 26;
const KEY_ROWS = 2;
const HEIGHT = TOP + SIDE + BELOW_PLOT + 24 + KEY_ROWS * KEY_ROW_PX + MARGIN;
/** Part of the plane that is shown: as wide as high. */
const REAL = { from: -2.4, to: 0.8 };
const IMAGINARY = { from: -2.1, to: 1.1 };
const CIRCLE_PARTS = 180;

interface MsLoop {
  loop: DrawnLoop;
  style: LineStyle;
  ms: number;
  role: string;
  words: string;
}

function msLoops(design: Design, designed: DesignedClass): MsLoop[] {
  const { nominal, worstMs } = classLoops(design, designed);
  const entry = (loop: DrawnLoop, style: LineStyle, ms: number, role: string, name: string): MsLoop => {
    const words = `${name}: ${Number.isFinite(ms) ? `Ms ${ms.toFixed(2)}` : 'unstable'}`;
    return { loop, style, ms, role, words };
  };
  const found = [entry(nominal, SOLID, designed.margins.ms, 'nominal', 'nominal')];
  if (worstMs !== nominal) {
    const { ms } = designed.worstMargins;
    found.push(entry(worstMs, DASHED, ms, 'worst', cornerWords(worstMs.corner)));
  }
  return found;
}

/** The picture as an SVG document. */
export function nyquistFigure(design: Design): string {
  const columns = drawnClasses(design).map((designed) => ({ designed, loops: msLoops(design, designed) }));
  const width = (WIDTH - 2 * MARGIN - COLUMN_GAP) / 2;
  const demanded = LEAST_MARGINS.ms.toFixed(1);
  return svgDocument({
    title: `${design.vehicle.name}: how near the loop comes to \u22121`,
    summary: `Grey: the circle 1/Ms around \u22121 for Ms ${demanded}, the most that the design allows in any corner. The loop must stay outside it.`,
    description: columnsInWords(columns),
    height: HEIGHT,
    fontSize: FONT,
    parts: columns.map(({ designed, loops }, i) => {
      return columnSvg(designed, loops, MARGIN + i * (width + COLUMN_GAP));
    }),
  });
}

function columnSvg(designed: DesignedClass, loops: readonly MsLoop[], left: number): string {
  const x = left + LEFT_OF_PLOT;
  const area: PlotArea = {
    x,
    y: TOP,
    width: SIDE,
    height: SIDE,
    xAxis: linearAxis({ ...REAL, fromPx: x, toPx: x + SIDE }, 0.5),
    yAxis: linearAxis({ ...IMAGINARY, fromPx: TOP + SIDE, toPx: TOP }, 0.5),
  };
  const keyTop = TOP + SIDE + BELOW_PLOT + 28;
  return [
    textAt(x, TOP - 14, classHeading(designed), { 'font-weight': 'bold', fill: WORDS }),
    element('g', { class: 'plane' }, `\n${planeSvg(area, loops)}\n`),
    ...loops.map(({ style, words }, i) => keyRow(left + 8, keyTop + i * KEY_ROW_PX, style, words)),
  ].join('\n');
}

/** A circle in the plane, as points. */
function circle(centre: number, radius: number): Point[] {
  return Array.from({ length: CIRCLE_PARTS + 1 }, (_, i): Point => {
    const angle = (2 * Math.PI * i) / CIRCLE_PARTS;
    return [centre + radius * Math.cos(angle), radius * Math.sin(angle)];
  });
}

function planeSvg(area: PlotArea, loops: readonly MsLoop[]): string {
  const { xAxis, yAxis } = area;
  const place = ([re, im]: Point): Point => [xAxis.at(re), yAxis.at(im)];
  const placer = new LabelPlacer(area, FONT);
  const demanded = 1 / LEAST_MARGINS.ms;
  const [cx, cy] = place([-1, 0]);
  const disc = element('circle', {
    class: 'demanded',
    cx,
    cy,
    r: xAxis.at(demanded) - xAxis.at(0),
    fill: SHADE,
    stroke: WORDS,
    'stroke-width': 1.2,
  });
  const unit = curveIn(area, circle(0, 1));
  const axes = [
    curveIn(area, [
      [REAL.from, 0],
      [REAL.to, 0],
    ]),
    curveIn(area, [
      [0, IMAGINARY.from],
      [0, IMAGINARY.to],
    ]),
  ].flat();
  placer.avoid(...unit, ...axes, circle(-1, demanded).map(place), [
    [cx - 6, cy],
    [cx + 6, cy],
  ]);
  const curves = loops.map(({ loop, style }) => {
    const parts = curveIn(
      area,
      loop.frequenciesRadS.map((w): Point => loop.response(w)),
    );
    placer.avoid(...parts);
    return line(parts, style);
  });
  const nearest = loops
    .filter(({ ms }) => Number.isFinite(ms))
    .map(({ loop, ms, role }) => {
      const point = place(loop.response(loop.marks.ms.frequencyRadS));
      placer.avoid([[cx, cy], point]);
      const svg = `${line([[[cx, cy], point]], THIN, { class: 'nearest' })}\n${dot(point)}`;
      return { svg, point, label: `Ms ${ms.toFixed(2)} ${role}` };
    });
  const labels = [
    placer.place('\u22121', [[cx, cy]]),
    ...nearest.map(({ label, point }) => placer.place(label, [point])),
    placer.place(
      '|L| = 1',
      [30, 36, 150, 144, 80, 100].map((i) => place(circle(0, 1)[i]!)),
    ),
  ];
  const cross = element('path', {
    d: `M${coordinate(cx - 6)} ${coordinate(cy)}h12M${coordinate(cx)} ${coordinate(cy - 6)}v12`,
    ...strokeOf(SOLID, INK),
  });
  return [
    disc,
    plotFrame(area, { x: 'real part of L', y: 'imaginary part of L' }),
    line(axes, THIN, strokeOf(THIN, WORDS)),
    line(unit, DOTTED, strokeOf({ ...DOTTED, width: 1.2 }, WORDS)),
    ...curves,
    ...nearest.map(({ svg }) => svg),
    cross,
    ...labels,
  ].join('\n');
}
