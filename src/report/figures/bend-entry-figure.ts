/**
 * Entering the tightest bend: the line's offset at the bar over the distance driven, nominal and in every corner of the
 * tolerance box, with the offset at which the bar loses the line.
 */
import { viewM } from '../../design/bar-view.js';
import { classForBend } from '../../design/class-for-bend.js';
import type { Design, DesignedClass } from '../../design/design.js';
import { type EntryTrace, entryTraces } from '../../design/entry.js';
import type { Corner } from '../../design/tolerance-box.js';
import { mToMm } from '../../sheet/units.js';
import { niceStep } from '../axis-steps.js';
import { MARGIN, WIDTH, WORDS, svgDocument } from '../svg-document.js';
import { coordinate, element } from '../svg-text.js';
import { linearAxis } from './axis.js';
import { apartPoints } from './apart-points.js';
import { cornerWords } from './drawn-loops.js';
import { LabelPlacer } from './label-place.js';
import {
  DASHED,
  DASH_DOT,
  DOTTED,
  KEY_ROW_PX,
  LONG_DASHED,
  type LineStyle,
  SOLID,
  THIN,
  keyRow,
  line,
  strokeOf,
} from './line-style.js';
import { BELOW_PLOT, LEFT_OF_PLOT, type PlotArea, curveIn, plotFrame } from './plot-area.js';
import type { Point } from './polyline.js';

const FONT = 13;
const TOP = 88;
const PLOT_HEIGHT = 360;
const STYLES: readonly LineStyle[] = [SOLID, DOTTED, DASH_DOT, DASHED, LONG_DASHED];
/** Space above the limit of the view, as a share of it. */
const HEADROOM = 0.12;

interface Entry {
  trace: EntryTrace;
  style: LineStyle;
  /** Beside the curve. */
  label: string;
  /** In the key. */
  words: string;
  pointsMm: Point[];
}

/** Short name of a corner, for the word beside its curve. */
function cornerName({ gain, lag }: Corner): string {
  if (gain === 1 && lag === 1) return 'nominal';
  return `${gain > 1 ? 'fast' : 'slow'}, ${lag > 1 ? 'long lag' : 'short lag'}`;
}

function entriesOf(design: Design, { gains, speedMps }: DesignedClass): Entry[] {
  const traces = entryTraces(design.vehicle, gains, speedMps, design.vehicle.line.tightestRadiusM);
  return traces.map((trace, i) => {
    const { corner, distanceM, offsetM, peakM } = trace;
    const label = cornerName(corner);
    const name = i === 0 ? label : `${label} (${cornerWords(corner)})`;
    const isLost = !Number.isFinite(peakM);
    return {
      trace,
      style: STYLES[i % STYLES.length]!,
      label: isLost ? `${label}: lost` : label,
      words: `${name}: ${isLost ? 'the bar loses the line' : `peak ${mToMm(peakM).toFixed(1)} mm`}`,
      pointsMm: distanceM.map((distance, k): Point => [mToMm(distance), mToMm(offsetM[k]!)]),
    };
  });
}

/** The picture as an SVG document. */
export function bendEntryFigure(design: Design): string {
  const { vehicle, classes } = design;
  const radiusMm = mToMm(vehicle.line.tightestRadiusM);
  const designed = classForBend(classes, vehicle.line.tightestRadiusM);
  const entries = entriesOf(design, designed);
  const limitMm = mToMm(viewM(vehicle));
  const x = MARGIN + LEFT_OF_PLOT;
  const width = WIDTH - MARGIN - x - 8;
  const offsets = entries.flatMap(({ pointsMm }) => pointsMm.map(([, offset]) => offset));
  const distances = entries.flatMap(({ pointsMm }) => pointsMm.map(([distance]) => distance));
  const top = limitMm * (1 + HEADROOM);
  const step = niceStep(limitMm, 5);
  const bottom = step * Math.floor(Math.max(Math.min(0, ...offsets), -top) / step + 1e-9);
  const area: PlotArea = {
    x,
    y: TOP,
    width,
    height: PLOT_HEIGHT,
    xAxis: linearAxis({
      from: Math.min(...distances),
      to: Math.max(...distances),
      fromPx: x,
      toPx: x + width,
    }),
    yAxis: linearAxis({ from: bottom, to: top, fromPx: TOP + PLOT_HEIGHT, toPx: TOP }, step),
  };
  const keyTop = TOP + PLOT_HEIGHT + BELOW_PLOT + 28;
  return svgDocument({
    title: `${vehicle.name}: into the tightest bend, ${radiusMm.toFixed(0)} mm, at ${designed.speedMps.toFixed(2)} m/s`,
    summary: `Class ${designed.name}. The line's offset at the bar, to the inner side, for a straight that turns into the bend at once.`,
    description: `${entries.map(({ words }) => `${words}.`).join(' ')} The bar loses the line at ${limitMm.toFixed(1)} mm.`,
    height: keyTop + (entries.length - 1) * KEY_ROW_PX + MARGIN,
    fontSize: FONT,
    parts: [
      plotFrame(area, {
        x: 'distance driven since the bar reached the bend, mm',
        y: 'offset at the bar, mm',
      }),
      entrySvg(area, entries, limitMm, mToMm(vehicle.bar.aheadM)),
      ...entries.map(({ style, words }, i) => keyRow(x, keyTop + i * KEY_ROW_PX, style, words)),
    ],
  });
}

function entrySvg(area: PlotArea, entries: readonly Entry[], limitMm: number, aheadMm: number): string {
  const { xAxis, yAxis } = area;
  const placer = new LabelPlacer(area, FONT);
  const level = (mm: number): Point[][] =>
    curveIn(area, [
      [xAxis.from, mm],
      [xAxis.to, mm],
    ]);
  const at = (mm: number): Point[][] =>
    curveIn(area, [
      [mm, yAxis.from],
      [mm, yAxis.to],
    ]);
  const limits = [limitMm, -limitMm].flatMap(level);
  const axleAt = at(aheadMm);
  const parts = [
    line([...at(0), ...level(0)], THIN, strokeOf(THIN, WORDS)),
    line(axleAt, DOTTED, strokeOf({ ...DOTTED, width: 1.2 }, WORDS)),
    line(limits, SOLID, { ...strokeOf({ ...SOLID, width: 3.2 }, WORDS), class: 'view-limit' }),
  ];
  placer.avoid(...at(0), ...level(0), ...axleAt, ...limits);
  const curves = entries.map(({ pointsMm, style, trace }) => {
    const drawn = curveIn(area, pointsMm);
    placer.avoid(...drawn);
    const end = drawn.at(-1)?.at(-1);
    const cross = Number.isFinite(trace.peakM) || end === undefined ? '' : `\n${lossMark(end)}`;
    return { drawn, svg: `${line(drawn, style, { class: 'entry' })}${cross}` };
  });
  const lines = curves.map(({ drawn }) => drawn);
  const y = yAxis.at(limitMm);
  const labels = [
    placer.place(`the bar loses the line: ${limitMm.toFixed(1)} mm`, [[area.x + area.width - 120, y]]),
    placer.place('axle reaches the bend', [[xAxis.at(aheadMm), area.y + area.height - 14]]),
    ...entries.flatMap(({ label }, i) => {
      const anchors = apartPoints(lines, i);
      return anchors.length > 0 ? [placer.place(label, anchors, true)] : [];
    }),
  ];
  return [...parts, ...curves.map(({ svg }) => svg), ...labels].join('\n');
}

function lossMark([x, y]: Point): string {
  return element('path', {
    d: 'M-6 -6L6 6M-6 6L6 -6',
    transform: `translate(${coordinate(x)} ${coordinate(y)})`,
    ...strokeOf(SOLID),
  });
}
