/** A plot over time or distance: axes, shades behind, curves, and the upright that marks the chosen moment. */
import { niceStep } from '../axis-steps.js';
import { GRID, INK, SHADE, WORDS } from '../svg-document.js';
import { coordinate, element, pathThrough, textAt } from '../svg-text.js';

const LEFT = 64;
const RIGHT = 10;
const TOP = 24;
const BOTTOM = 24;

export interface Curve {
  /** Along the axis, and the value; a point that is not finite breaks the curve. */
  points: readonly (readonly [x: number, y: number])[];
  label?: string;
  dashes?: string;
  /** Drawn as an area closed on itself. */
  isArea?: boolean;
  /** Value holds until the next point. */
  isStepped?: boolean;
}

export interface Shade {
  from: number;
  to: number;
  /** 0 to 1 */
  opacity: number;
  ink?: string;
}

export interface PlotSpec {
  /** For those who cannot see it. */
  label: string;
  /** Over the plot. */
  title: string;
  /** px */
  width: number;
  height: number;
  /** Range along the axis. */
  end: number;
  unit: string;
  from: number;
  to: number;
  /** Marks of the upright axis; round numbers where absent. */
  ticks?: readonly { at: number; label: string }[];
  curves: readonly Curve[];
  shades?: readonly Shade[];
}

/** The plot as an SVG element; data-left, data-per and data-end tell the script where a place on the axis is. */
export function plotSvg(spec: PlotSpec): string {
  const { width, height, end, from, to } = spec;
  const per = (width - LEFT - RIGHT) / end;
  const bottom = height - BOTTOM;
  const x = (at: number): number => LEFT + Math.min(Math.max(at, 0), end) * per;
  const y = (value: number): number => bottom - ((value - from) / (to - from)) * (bottom - TOP);
  const parts = [
    ...(spec.shades ?? []).map(({ from: a, to: b, opacity, ink }) => {
      const box = { x: x(a), y: TOP, width: Math.max(0, x(b) - x(a)), height: bottom - TOP };
      return element('rect', { ...box, fill: ink ?? SHADE, 'fill-opacity': opacity.toFixed(2) });
    }),
    ...(spec.ticks ?? roundTicks(from, to)).flatMap(({ at, label }) => [
      level(x(0), x(end), y(at), at === 0 ? WORDS : GRID),
      textAt(LEFT - 6, y(at) + 4, label, { 'text-anchor': 'end', fill: WORDS }),
    ]),
    ...alongAxis(spec, x, bottom),
    ...spec.curves.map((curve) => curveOf(curve, x, y)),
    ...titleParts(spec),
    `<path class="upright" d="M0 ${TOP}V${coordinate(bottom)}" stroke="${WORDS}" stroke-width="1.5" visibility="hidden"/>`,
  ];
  const kept = `data-left="${LEFT}" data-per="${per.toFixed(4)}"`;
  return element(
    'svg',
    { viewBox: `0 0 ${width} ${height}`, width, height, role: 'img', 'aria-label': spec.label },
    `\n<g class="axis" ${kept}></g>\n${parts.join('\n')}\n`,
  );
}

function roundTicks(from: number, to: number): { at: number; label: string }[] {
  const step = niceStep(to - from, 4);
  const first = Math.ceil(from / step - 1e-9);
  const count = Math.floor(to / step + 1e-9) - first + 1;
  return Array.from({ length: count }, (_, i) => {
    const at = (first + i) * step + 0;
    return { at, label: String(Number(at.toPrecision(6))) };
  });
}

function level(x0: number, x1: number, y: number, stroke: string): string {
  return element('path', {
    d: `M${coordinate(x0)} ${coordinate(y)}H${coordinate(x1)}`,
    stroke,
    fill: 'none',
  });
}

function alongAxis({ end, unit, width }: PlotSpec, x: (at: number) => number, bottom: number): string[] {
  const step = niceStep(end, width < 500 ? 4 : 10);
  return Array.from({ length: Math.floor(end / step + 1e-9) + 1 }, (_, i) => {
    const label = `${Number((i * step).toPrecision(6))}${i === 0 ? ` ${unit}` : ''}`;
    return textAt(x(i * step), bottom + 17, label, { 'text-anchor': 'middle', fill: WORDS });
  });
}

function curveOf(
  { points, dashes, isArea, isStepped }: Curve,
  x: (at: number) => number,
  y: (value: number) => number,
): string {
  const parts: [number, number][][] = [[]];
  for (const [at, value] of points) {
    const part = parts.at(-1)!;
    if (!Number.isFinite(value)) {
      if (part.length > 0) parts.push([]);
      continue;
    }
    const before = part.at(-1);
    if (isStepped === true && before !== undefined && before[1] !== y(value)) part.push([x(at), before[1]]);
    part.push([x(at), y(value)]);
  }
  const d = parts.map((part) => pathThrough(part)).join('');
  if (isArea === true) return element('path', { d: `${d}Z`, fill: SHADE, stroke: INK, 'stroke-width': 0.8 });
  return element('path', {
    d,
    fill: 'none',
    stroke: INK,
    'stroke-width': dashes === undefined ? 1.6 : 1.3,
    ...(dashes !== undefined && { 'stroke-dasharray': dashes }),
  });
}

/** The title, and the key of curves that have a label. */
function titleParts({ title, curves, width }: PlotSpec): string[] {
  const parts = [textAt(LEFT, 14, title, { 'font-weight': 'bold', fill: WORDS })];
  const keyed = curves.filter((curve) => curve.label !== undefined);
  keyed.forEach(({ label, dashes }, i) => {
    const at = width - RIGHT - (keyed.length - i) * 74;
    const sample = { d: `M${coordinate(at)} 10h24`, stroke: INK, 'stroke-width': 1.6, fill: 'none' };
    parts.push(element('path', { ...sample, ...(dashes !== undefined && { 'stroke-dasharray': dashes }) }));
    parts.push(textAt(at + 29, 14, label ?? '', { fill: WORDS }));
  });
  return parts;
}
