/** Lines that are told apart without colour: by width and dashes. */
import { INK, WORDS } from '../svg-document.js';
import { coordinate, element, pathThrough, textAt, type Attributes } from '../svg-text.js';
import type { Point } from './polyline.js';

export interface LineStyle {
  /** px */
  width: number;
  /** Lengths of dashes and gaps, px; empty for a solid line. */
  dashes: string;
}

export const SOLID: LineStyle = { width: 2.4, dashes: '' };
export const DASHED: LineStyle = { width: 1.7, dashes: '9 4' };
export const DOTTED: LineStyle = { width: 2, dashes: '2 3.5' };
export const DASH_DOT: LineStyle = { width: 1.7, dashes: '11 4 2 4' };
export const LONG_DASHED: LineStyle = { width: 1.3, dashes: '18 5' };

/** Dimension lines and limits. */
export const THIN: LineStyle = { width: 1.2, dashes: '' };

export function strokeOf({ width, dashes }: LineStyle, stroke: string = INK): Attributes {
  return {
    fill: 'none',
    stroke,
    'stroke-width': width,
    ...(dashes !== '' && { 'stroke-dasharray': dashes }),
  };
}

/** A line through points, in parts where it was cut. */
export function line(parts: readonly (readonly Point[])[], style: LineStyle, more: Attributes = {}): string {
  const d = parts.map((part) => pathThrough(part)).join('');
  return element('path', { d, ...strokeOf(style), 'stroke-linejoin': 'round', ...more });
}

/** A point that is read off a curve. */
export function dot([cx, cy]: Point, more: Attributes = {}): string {
  return element('circle', { cx, cy, r: 3.5, fill: '#ffffff', stroke: INK, 'stroke-width': 1.6, ...more });
}

/** A measure between two points of the same x: a line with a bar at each end. */
export function upright(x: number, y0: number, y1: number, more: Attributes = {}): string {
  const [at, left, from, to] = [x, x - 4, y0, y1].map(coordinate) as [string, string, string, string];
  return element('path', {
    d: `M${at} ${from}V${to}M${left} ${from}h8M${left} ${to}h8`,
    ...strokeOf(THIN),
    ...more,
  });
}

const SAMPLE_PX = 40;
/** Height of one line of a key, px. */
export const KEY_ROW_PX = 21;

/** One line of a key: a piece of the line, and what it is. */
export function keyRow(x: number, y: number, style: LineStyle, text: string, stroke = INK): string {
  const sample = element('path', {
    d: `M${coordinate(x)} ${coordinate(y - 4)}h${SAMPLE_PX}`,
    ...strokeOf(style, stroke),
  });
  return `${sample}\n${textAt(x + SAMPLE_PX + 9, y, text, { fill: WORDS })}`;
}
