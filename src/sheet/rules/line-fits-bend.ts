import { withUnit } from '../words.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'line-fits-bend',
  level: 'problem',
  why: 'A line wider than the radius of a bend has no inner edge there, and cannot be followed by its middle.',
  check({ sheet }) {
    const { widthMm, tightestRadiusMm } = sheet.line;
    if (tightestRadiusMm >= widthMm) return [];
    return [
      {
        pointer: '/line/tightestRadiusMm',
        message: `A bend of ${withUnit(tightestRadiusMm, 'mm')} is too tight for a line of ${withUnit(widthMm, 'mm')}.`,
        got: withUnit(tightestRadiusMm, 'mm'),
        allowed: `at least the line's width, ${withUnit(widthMm, 'mm')}`,
        fix: 'Measure the radius from the centre of the bend to the middle of the line, and the width across the line.',
      },
    ];
  },
};
