import type { Problem } from '../problem.js';
import { pointerTo, withUnit } from '../words.js';
import type { SheetRule } from './rule.js';
import { barView } from './view.js';

/** Rounding of positions is no fault: a billionth of a millimetre. */
const SLACK_MM = 1e-9;

export const rule: SheetRule = {
  name: 'line-cannot-hide',
  level: 'problem',
  why: 'Half-way between two sensors the line is at its farthest from both; if neither sees it there, the vehicle believes it lost.',
  check(context) {
    const { sheet, positionsMm } = context;
    const view = barView(context);
    if (view === undefined || positionsMm === undefined) return [];
    const widestMm = 2 * view.reachMm;
    const even = sheet.sensors.pitchMm !== undefined;
    // An even row says it once.
    const upTo = even ? 2 : positionsMm.length;
    return positionsMm.slice(0, upTo).flatMap((position, index): Problem[] => {
      const before = positionsMm[index - 1];
      if (before === undefined || before - position <= widestMm + SLACK_MM) return [];
      const between = withUnit(before - position, 'mm');
      const allowed = `at most ${withUnit(Math.floor((widestMm + SLACK_MM) * 10) / 10, 'mm')}`;
      return [
        {
          pointer: even ? '/sensors/pitchMm' : pointerTo('sensors', 'positionsMm', index),
          message: `Between sensors ${between} apart a line of ${withUnit(sheet.line.widthMm, 'mm')} can hide; ${allowed} with this line, spot and controller.`,
          got: between,
          allowed,
          fix: 'Move the sensors closer together, or lay a wider line.',
        },
      ];
    });
  },
};
