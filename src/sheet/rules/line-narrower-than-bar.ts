import { withUnit } from '../words.js';
import type { SheetRule } from './rule.js';
import { barView } from './view.js';

export const rule: SheetRule = {
  name: 'line-narrower-than-bar',
  level: 'problem',
  why: 'While every spot lies wholly on the line, an offset changes no reading, and there is nothing to steer by.',
  check(context) {
    const view = barView(context);
    if (view === undefined) return [];
    const { widthMm } = context.sheet.line;
    const barMm = 2 * (view.outermostMm + context.sheet.sensors.spotRadiusMm);
    if (barMm > widthMm) return [];
    const allowed = `less than ${withUnit(barMm, 'mm')}`;
    return [
      {
        pointer: '/line/widthMm',
        message: `The line, ${withUnit(widthMm, 'mm')} wide, covers the whole bar, which sees ${withUnit(barMm, 'mm')} from spot to spot.`,
        got: withUnit(widthMm, 'mm'),
        allowed,
        fix: 'Space the sensors wider, add sensors, or lay a narrower line.',
      },
    ];
  },
};
