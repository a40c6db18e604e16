/** What limits the speed over the radius, as a strip of stretches with their words. */
import type { DesignedClass } from '../../design/design.js';
import { mToMm } from '../../sheet/units.js';
import { WORDS } from '../svg-document.js';
import { coordinate, element, textAt } from '../svg-text.js';
import { textWidth } from './label-place.js';
import { THIN, strokeOf } from './line-style.js';
import type { PlotArea } from './plot-area.js';

export const BINDING_WORDS: Readonly<Record<DesignedClass['limitedBy'], string>> = {
  motor: 'motor',
  grip: 'grip',
  view: 'view',
  control: 'control',
  finish: 'perturbed rehearsals',
  sheet: 'given in the sheet',
};

/** Neighbouring classes that the same thing limits. */
interface Stretch {
  fromPx: number;
  toPx: number;
  words: string;
}

function stretchesOf(classes: readonly DesignedClass[], { x, width, xAxis }: PlotArea): Stretch[] {
  const rising = classes.toReversed();
  const stretches: Stretch[] = [];
  rising.forEach(({ minRadiusM, limitedBy }, i) => {
    const next = rising[i + 1];
    const fromPx = i === 0 ? x : xAxis.at(mToMm(minRadiusM));
    const toPx = next === undefined ? x + width : xAxis.at(mToMm(next.minRadiusM));
    const words = BINDING_WORDS[limitedBy];
    const before = stretches[stretches.length - 1];
    if (before?.words === words) before.toPx = toPx;
    else stretches.push({ fromPx, toPx, words });
  });
  return stretches;
}

const ROW_PX = 18;
const HEADING = 'limit';

/** @returns SVG, and the height below `top`, px */
export function bindingStrip(
  classes: readonly DesignedClass[],
  area: PlotArea,
  top: number,
  fontSize: number,
): { svg: string; height: number } {
  const right = area.x + area.width;
  const rowEnds: number[] = [];
  const parts = stretchesOf(classes, area).map(({ fromPx, toPx, words }) => {
    const width = textWidth(words, fontSize);
    const middle = Math.max(area.x + width / 2, Math.min(right - width / 2, (fromPx + toPx) / 2));
    const free = rowEnds.findIndex((end) => end + fontSize < middle - width / 2);
    const row = free < 0 ? rowEnds.length : free;
    rowEnds[row] = middle + width / 2;
    const [from, to, y] = [fromPx + 2, toPx - 2, top].map(coordinate) as [string, string, string];
    const bracket = element('path', {
      d: `M${from} ${coordinate(top - 6)}V${y}H${to}v-6`,
      ...strokeOf(THIN, WORDS),
    });
    const label = textAt(middle, top + ROW_PX * (row + 1), words, { 'text-anchor': 'middle', fill: WORDS });
    const stem = row === 0 ? [] : [stemTo((fromPx + toPx) / 2, top, top + ROW_PX * (row + 1) - fontSize)];
    return [bracket, ...stem, label].join('\n');
  });
  const heading = textAt(area.x - 8, top + 4, HEADING, { 'text-anchor': 'end', fill: WORDS });
  return { svg: [heading, ...parts].join('\n'), height: ROW_PX * rowEnds.length };
}

function stemTo(x: number, from: number, to: number): string {
  return element('path', {
    d: `M${coordinate(x)} ${coordinate(from)}V${coordinate(to)}`,
    ...strokeOf(THIN, WORDS),
  });
}
