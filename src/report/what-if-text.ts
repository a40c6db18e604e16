/** Which change of hardware would help most, as `derive --what-if` tells it. */
import type { WhatIf } from '../design/what-if.js';
import { fractionToPercent } from '../sheet/units.js';
import { table } from './text-table.js';

const signed = (value: number, digits: number): string => `${value >= 0 ? '+' : ''}${value.toFixed(digits)}`;

function row({ change, topGainMps, tightGainMps, timeChange }: WhatIf): string[] {
  return [
    change,
    topGainMps === undefined ? '-' : signed(topGainMps, 2),
    tightGainMps === undefined ? '-' : signed(tightGainMps, 2),
    timeChange === undefined ? 'no design meets it' : `${signed(fractionToPercent(timeChange), 1)} %`,
  ];
}

/** Paragraphs of `derive --what-if`, the most helpful change first. */
export function whatIfText(changes: readonly WhatIf[]): string {
  const head = ['change, each alone', 'straight, m/s', 'tightest bend, m/s', 'time on the proving lane'];
  return `\nWhat a change of hardware would do\n\n${table([head, ...changes.map(row)])}\n`;
}
