/** The frame that all pictures share: an SVG document on white with a title, one line below it, and inks that print in grey. */
import { coordinate, element, escaped, textAt } from './svg-text.js';

/** Curves. */
export const INK = '#231a4c';
/** Words and axes. */
export const WORDS = '#4a463c';
/** Grid lines. */
export const GRID = '#d5d2ca';
/** Areas behind curves. */
export const SHADE = '#dfdacb';
/** Gaps and crossings behind curves. */
export const MARK = '#9fb4cc';
/** Where a run was lost. */
export const LOST = '#a3161f';
/** Words over curves: a white edge keeps them legible. */
export const HALO = { stroke: '#ffffff', 'stroke-width': 3, 'paint-order': 'stroke', fill: WORDS };

/** Width of a picture and the space at its edges, px. */
export const WIDTH = 960;
export const MARGIN = 24;

export interface SvgDocument {
  title: string;
  /** One line below the title. */
  summary: string;
  /** For those who cannot see the picture. */
  description: string;
  /** px */
  height: number;
  /** px */
  fontSize: number;
  /** SVG, in document coordinates. */
  parts: readonly string[];
}

/** A whole document, WIDTH wide; the parts begin below 70 px. */
export function svgDocument({ title, summary, description, height, fontSize, parts }: SvgDocument): string {
  const all = [
    element('title', {}, escaped(title)),
    element('desc', {}, escaped(description)),
    element('rect', { width: WIDTH, height, fill: '#ffffff' }),
    textAt(MARGIN, 38, title, { 'font-size': '20', 'font-weight': 'bold', fill: WORDS }),
    textAt(MARGIN, 60, summary, { 'font-size': '14', fill: WORDS }),
    ...parts,
  ];
  const root = {
    xmlns: 'http://www.w3.org/2000/svg',
    viewBox: `0 0 ${WIDTH} ${coordinate(height)}`,
    width: WIDTH,
    height,
    role: 'img',
    'font-family': "system-ui, 'Helvetica Neue', Arial, 'DejaVu Sans', sans-serif",
    'font-size': String(fontSize),
  };
  return `${element('svg', root, `\n${all.join('\n')}\n`)}\n`;
}

/** A group moved to a place. */
export function groupAt(x: number, y: number, content: string): string {
  return element('g', { transform: `translate(${coordinate(x)} ${coordinate(y)})` }, `\n${content}\n`);
}
