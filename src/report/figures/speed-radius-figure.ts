/**
 * Speed against radius: the four limits as curves, the speed that is driven as a line with a point for each class, and below
 * them what binds where.
 */
import type { Design, DesignedClass, SpeedLimits } from '../../design/design.js';
import { drivenSpeedMps } from '../../design/driven-speed.js';
import { type LimitsAt, limitCurves } from '../../design/limit-curves.js';
import { mToMm } from '../../sheet/units.js';
import { niceStep } from '../axis-steps.js';
import { MARGIN, WIDTH, WORDS, svgDocument } from '../svg-document.js';
import { linearAxis, logAxis } from './axis.js';
import { apartPoints } from './apart-points.js';
import { BINDING_WORDS, bindingStrip } from './binding-strip.js';
import { LabelPlacer } from './label-place.js';
import {
  DASHED,
  DASH_DOT,
  DOTTED,
  KEY_ROW_PX,
  LONG_DASHED,
  type LineStyle,
  THIN,
  dot,
  keyRow,
  line,
  strokeOf,
} from './line-style.js';
import { BELOW_PLOT, LEFT_OF_PLOT, type PlotArea, curveIn, plotFrame } from './plot-area.js';
import type { Point } from './polyline.js';

const FONT = 13;
const TOP = 88;
const PLOT_HEIGHT = 360;
/** Radii shown beyond the tightest and the widest class, as factors. */
const TIGHTER = 0.8;
const WIDER = 1.6;
/** The widest radius shown is at least this multiple of the tightest. */
const LEAST_RANGE = 8;
const RADII = 48;
/** Speed shown above full wheel speed, as a factor. */
const HEADROOM = 1.12;
/** To both sides of a class's radius, as a share of it. */
const HAIR = 1e-3;
/** A broad grey band under the limits, so that the one that it lies along can be seen on it. */
const DRIVEN: LineStyle = { width: 8, dashes: '' };
const DRIVEN_GREY = '#c2bdb0';

const LIMITS: Readonly<Record<keyof SpeedLimits, { style: LineStyle; words: string }>> = {
  motor: { style: DASHED, words: 'motor: the outer wheel at full duty, 2 % kept for steering' },
  grip: { style: DASH_DOT, words: 'grip: sqrt(mu g R)' },
  view: {
    style: DOTTED,
    words: 'view: entering the bend, the bar keeps the line in every corner of the tolerances',
  },
  control: {
    style: LONG_DASHED,
    words: 'control: a steering law keeps its margins in every corner of the tolerances',
  },
};
const NAMES = ['motor', 'grip', 'view', 'control'] as const;

/** Radii at even ratios, with those of the classes among them, rising, m. */
function radiiOf(classes: readonly DesignedClass[]): number[] {
  const own = classes.map(({ minRadiusM }) => minRadiusM);
  const from = TIGHTER * Math.min(...own);
  const to = Math.max(WIDER * Math.max(...own), LEAST_RANGE * from);
  const even = Array.from({ length: RADII }, (_, i) => from * (to / from) ** (i / (RADII - 1)));
  return [...even, ...own].sort((a, b) => a - b);
}

/** The picture as an SVG document. */
export function speedRadiusFigure(design: Design): string {
  const { vehicle, classes } = design;
  const radii = radiiOf(classes);
  const topSpeedMps = vehicle.drive.topSpeedMps;
  const speeds = classes.map(({ speedMps }) => speedMps);
  const highest = HEADROOM * Math.max(topSpeedMps, ...speeds);
  const x = MARGIN + LEFT_OF_PLOT;
  const width = WIDTH - MARGIN - x - 8;
  const area: PlotArea = {
    x,
    y: TOP,
    width,
    height: PLOT_HEIGHT,
    xAxis: logAxis({ from: mToMm(radii[0]!), to: mToMm(radii.at(-1)!), fromPx: x, toPx: x + width }),
    yAxis: linearAxis({ from: 0, to: highest, fromPx: TOP + PLOT_HEIGHT, toPx: TOP }, niceStep(highest, 7)),
  };
  const curves = limitCurves(vehicle, radii);
  const strip = bindingStrip(classes, area, TOP + PLOT_HEIGHT + BELOW_PLOT + 14, FONT);
  const keyTop = TOP + PLOT_HEIGHT + BELOW_PLOT + 14 + strip.height + 34;
  const keys = [
    keyRow(
      x,
      keyTop,
      DRIVEN,
      'driven: a point for each class; the strip above tells what limits them',
      DRIVEN_GREY,
    ),
    ...NAMES.map((name, i) => {
      const { style, words } = LIMITS[name];
      const isShown = limitParts(curves, name, topSpeedMps).flatMap((part) => curveIn(area, part)).length > 0;
      return keyRow(
        x,
        keyTop + (i + 1) * KEY_ROW_PX,
        style,
        isShown ? words : `${words} (nowhere below full speed)`,
      );
    }),
  ];
  return svgDocument({
    title: `${vehicle.name}: speed against radius`,
    summary: `Limits at nominal voltage, searched up to full wheel speed, ${topSpeedMps.toFixed(2)} m/s; view and control limits end where they reach it.`,
    description: classes
      .map(({ name, minRadiusM, speedMps, limitedBy }) => {
        const from = `from ${mToMm(minRadiusM).toFixed(0)} mm`;
        return `${name}, ${from}: ${speedMps.toFixed(2)} m/s, limited by: ${BINDING_WORDS[limitedBy]}.`;
      })
      .join(' '),
    height: keyTop + NAMES.length * KEY_ROW_PX + MARGIN,
    fontSize: FONT,
    parts: [
      plotFrame(area, { x: 'radius of the bend, mm', y: 'speed, m/s' }),
      curvesSvg(design, area, curves),
      strip.svg,
      ...keys,
    ],
  });
}

/** A limit over the radius, in parts; where a search ended at full wheel speed there is nothing to draw. */
function limitParts(curves: readonly LimitsAt[], name: keyof SpeedLimits, topSpeedMps: number): Point[][] {
  const isSearched = name === 'view' || name === 'control';
  const parts: Point[][] = [[]];
  for (const { radiusM, limits } of curves) {
    if (isSearched && limits[name] >= topSpeedMps) parts.push([]);
    else parts.at(-1)!.push([mToMm(radiusM), limits[name]]);
  }
  return parts.filter((part) => part.length > 1);
}

function curvesSvg(design: Design, area: PlotArea, curves: readonly LimitsAt[]): string {
  const { vehicle, classes } = design;
  const { topSpeedMps } = vehicle.drive;
  const { xAxis, yAxis } = area;
  const placer = new LabelPlacer(area, FONT);
  const full = curveIn(area, [
    [xAxis.from, topSpeedMps],
    [xAxis.to, topSpeedMps],
  ]);
  placer.avoid(...full);
  const limits = NAMES.map((name) => {
    const drawn = limitParts(curves, name, topSpeedMps).flatMap((part) => curveIn(area, part));
    placer.avoid(...drawn);
    return { name, drawn, svg: line(drawn, LIMITS[name].style, { class: `limit ${name}` }) };
  });
  const driven = curveIn(area, drivenPoints(design, curves));
  placer.avoid(...driven);
  const lines = [...limits.map(({ drawn }) => drawn), driven, full];
  const points = classes.map(({ minRadiusM, speedMps, name }) => {
    const at: Point = [xAxis.at(mToMm(minRadiusM)), yAxis.at(speedMps)];
    placer.avoid([at]);
    return { at, label: `${name} ${speedMps.toFixed(2)}` };
  });
  const labels = [
    ...points.map(({ at, label }) => placer.place(label, [at], true)),
    placer.place(`full wheel speed ${topSpeedMps.toFixed(2)}`, [
      [area.x + area.width / 3, yAxis.at(topSpeedMps)],
    ]),
    ...limits.flatMap(({ name }, i) => {
      const anchors = apartPoints(lines, i);
      return anchors.length > 0 ? [placer.place(name, anchors, true)] : [];
    }),
  ];
  return [
    line(full, THIN, strokeOf(THIN, WORDS)),
    line(driven, DRIVEN, { ...strokeOf(DRIVEN, DRIVEN_GREY), class: 'driven' }),
    ...limits.map(({ svg }) => svg),
    ...points.map(({ at }) => dot(at, { class: 'class-point' })),
    ...labels,
  ].join('\n');
}

/** [radius in mm, speed in m/s] that the controller drives, with both sides of each step. */
function drivenPoints({ classes, controller }: Design, curves: readonly LimitsAt[]): Point[] {
  const ends = classes.flatMap(({ minRadiusM }) => [minRadiusM * (1 - HAIR), minRadiusM * (1 + HAIR)]);
  const radii = [...curves.map(({ radiusM }) => radiusM), ...ends].sort((a, b) => a - b);
  return radii.map((radiusM): Point => [mToMm(radiusM), drivenSpeedMps(controller, radiusM)]);
}
