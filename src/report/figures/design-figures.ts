/** All the pictures of a design, each under the name of its file. */
import type { Design } from '../../design/design.js';
import { bendEntryFigure } from './bend-entry-figure.js';
import { bodeFigure } from './bode-figure.js';
import { nyquistFigure } from './nyquist-figure.js';
import { ruleTableFigure } from './rule-table-figure.js';
import { speedRadiusFigure } from './speed-radius-figure.js';

export interface Figure {
  /** Name of the file. */
  name: (typeof FIGURE_NAMES)[number];
  /** An SVG document that needs nothing beside it. */
  svg: string;
}

/** Names of all figures that a design may have. */
export const FIGURE_NAMES = [
  'bode.svg',
  'nyquist.svg',
  'bend-entry.svg',
  'speed-radius.svg',
  'rule-table.svg',
] as const;

/** The same design gives the same bytes. The rule table is drawn for a controller with rules only. */
export function designFigures(design: Design): Figure[] {
  const rules = ruleTableFigure(design);
  return [
    { name: 'bode.svg', svg: bodeFigure(design) },
    { name: 'nyquist.svg', svg: nyquistFigure(design) },
    { name: 'bend-entry.svg', svg: bendEntryFigure(design) },
    { name: 'speed-radius.svg', svg: speedRadiusFigure(design) },
    ...(rules === undefined ? [] : [{ name: 'rule-table.svg' as const, svg: rules }]),
  ];
}
