/**
 * The inks of the pictures on a dark screen. The pictures carry those for paper; a style sheet puts these in their place, so that
 * print stays as drawn. Slower is broader and stands out more from the ground in both: dark on paper, pale on a dark screen.
 */
import { SPEED_INKS } from '../speed-scale.js';
import { GRID, INK, LOST, MARK, SHADE, WORDS } from '../svg-document.js';

/** Ground of the pages and pictures. */
export const GROUND = { light: '#ffffff', dark: '#171611' };

const PALE_SPEEDS = ['#f7ecc8', '#e0c04f', '#86b35e', '#4f9c96', '#6488cc'] as const;

const FIXED: readonly (readonly [light: string, dark: string])[] = [
  [GROUND.light, GROUND.dark],
  [LOST, '#ff9d8f'],
  [INK, '#f7ecc8'],
  [WORDS, '#d6d1c2'],
  [GRID, '#46433a'],
  [SHADE, '#3d3a30'],
  ['#c2bdb0', '#6a6658'],
  [MARK, '#48607c'],
];

/** Each ink on paper and its counterpart. */
export function inkPairs(): readonly (readonly [light: string, dark: string])[] {
  const all = [
    ...FIXED,
    ...SPEED_INKS.map((light, i): [string, string] => [light, PALE_SPEEDS[i] ?? PALE_SPEEDS[0]]),
  ];
  return [...new Map(all)];
}

/** Style rules for a dark screen; never for paper. */
export function darkInkRules(): string {
  const rules = inkPairs().map(
    ([light, dark]) => `svg [fill="${light}"]{fill:${dark}}svg [stroke="${light}"]{stroke:${dark}}`,
  );
  // words in a picture without an ink of their own are black
  return `@media screen and (prefers-color-scheme:dark){svg{fill:#d6d1c2}\n${rules.join('\n')}}\n`;
}
