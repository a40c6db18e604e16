/** Finish rate and lap time against the scale of the class speeds: points with the interval of each rate, and the target. */
import type { CurvePoint } from '../../rehearsal/speed-curve.js';
import { niceStep } from '../axis-steps.js';
import { MARGIN, WIDTH, svgDocument } from '../svg-document.js';
import { linearAxis } from './axis.js';
import { DASHED, type LineStyle, THIN, dot, line } from './line-style.js';
import { BELOW_PLOT, LEFT_OF_PLOT, type PlotArea, curveIn, plotFrame } from './plot-area.js';
import type { Point } from './polyline.js';

const FONT = 13;
const TOP = 88;
const HEIGHT = 240;
const CURVE: LineStyle = { width: 2, dashes: '' };
/** Half the width of an interval's ends, px. */
const CAP = 4;

export interface CurveNames {
  title: string;
  targetPercent: number;
  boundLapS: number;
}

function areaOf(points: readonly CurvePoint[], top: number, from: number, to: number): PlotArea {
  const x = MARGIN + LEFT_OF_PLOT;
  const width = WIDTH - MARGIN - x - 8;
  const factors = points.map(({ factor }) => factor);
  return {
    x,
    y: top,
    width,
    height: HEIGHT,
    xAxis: linearAxis({
      from: Math.min(...factors) - 0.02,
      to: Math.max(...factors) + 0.02,
      fromPx: x,
      toPx: x + width,
    }),
    yAxis: linearAxis({ from, to, fromPx: top + HEIGHT, toPx: top }, niceStep(to - from, 5)),
  };
}

function across(area: PlotArea, value: number): string {
  const { from, to } = area.xAxis;
  return line(
    curveIn(area, [
      [from, value],
      [to, value],
    ]),
    DASHED,
  );
}

/** The picture as an SVG document. */
export function curveFigure(points: readonly CurvePoint[], names: CurveNames): string {
  const rates = areaOf(points, TOP, 0, 102);
  const lapsS = points.flatMap(({ lapS }) => lapS ?? []);
  const slowest = Math.max(names.boundLapS, ...lapsS) * 1.05;
  const laps = areaOf(points, TOP + HEIGHT + BELOW_PLOT + 28, 0.8 * names.boundLapS, slowest);
  const at = (area: PlotArea, { factor }: CurvePoint, value: number): Point => [
    area.xAxis.at(factor),
    area.yAxis.at(value),
  ];
  const whiskers = points.flatMap((point) => {
    const [low, high] = [at(rates, point, point.lowPercent), at(rates, point, point.highPercent)];
    const cap = ([x, y]: Point): Point[] => [
      [x - CAP, y],
      [x + CAP, y],
    ];
    return [line([[low, high]], THIN, { class: 'interval' }), line([cap(low), cap(high)], THIN)];
  });
  const ratePoints = points.map((point) => at(rates, point, point.finishedPercent));
  const lapPoints = points.flatMap((point) => (point.lapS === null ? [] : [at(laps, point, point.lapS)]));
  const runs = points[0]?.runs ?? 0;
  return svgDocument({
    title: names.title,
    summary: `${runs} drawn vehicles at each speed, 95 % intervals. Dashed: finish target ${names.targetPercent} %; physical bound of the lap ${names.boundLapS.toFixed(2)} s.`,
    description: points
      .map(
        (point) => `${point.factor.toFixed(2)} times the speeds: ${point.finished} of ${point.runs} finish.`,
      )
      .join(' '),
    height: laps.y + HEIGHT + BELOW_PLOT + MARGIN,
    fontSize: FONT,
    parts: [
      plotFrame(rates, { x: 'class speeds over those of the design', y: 'finished, %' }),
      across(rates, names.targetPercent),
      ...whiskers,
      line([ratePoints], CURVE),
      ...ratePoints.map((point) => dot(point, { class: 'rate' })),
      plotFrame(laps, { x: 'class speeds over those of the design', y: 'median lap, s' }),
      across(laps, names.boundLapS),
      ...(lapPoints.length > 1 ? [line([lapPoints], CURVE)] : []),
      ...lapPoints.map((point) => dot(point, { class: 'lap' })),
    ],
  });
}
