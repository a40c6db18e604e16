/** The design's law beside published tuning rules, for each speed class. */
import { type ComparedLaw, comparedLaws } from '../design/comparison.js';
import type { Design } from '../design/design.js';
import { sToMs } from '../sheet/units.js';
import { table } from './text-table.js';

/** The laws compared on the loop of one class. */
export interface ClassComparison {
  name: string;
  laws: ComparedLaw[];
}

export function compareLaws(design: Design): ClassComparison[] {
  return design.classes.map((each) => ({ name: each.name, laws: comparedLaws(each) }));
}

function row({ name, settings, margins, note }: ComparedLaw): string[] {
  const ms = (timeS: number | undefined) => (timeS === undefined ? '-' : sToMs(timeS).toFixed(0));
  return [
    name,
    settings ? settings.gain.toFixed(0) : '-',
    ms(settings?.integralTimeS),
    ms(settings?.derivativeTimeS),
    margins ? margins.gainMargin.toFixed(1) : '-',
    margins ? margins.phaseMarginDeg.toFixed(0) : '-',
    margins ? margins.ms.toFixed(2) : '-',
    note ?? '',
  ];
}

/** Paragraphs of `derive --compare`. */
export function comparisonText(classes: readonly ClassComparison[]): string {
  const head = ['law', 'gain, rad/s per m', 'Ti, ms', 'Td, ms', 'GM', 'PM, deg', 'Ms', ''];
  const parts = classes.map(
    ({ name, laws }) =>
      `Published rules on the loop of class ${name}, nominal vehicle\n\n${table([head, ...laws.map(row)])}`,
  );
  return `\n${parts.join('\n\n')}\n`;
}
