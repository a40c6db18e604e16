import type { Problem } from '../problem.js';
import { pointerTo, quote } from '../words.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'integral-part',
  level: 'problem',
  why: 'A rule table has no measured offset to sum up, and gains by hand say themselves whether they integrate.',
  check({ sheet }) {
    const { integral, kind, gains } = sheet.control;
    if (integral !== 'always') return [];
    const found: Problem[] = [];
    const pointer = pointerTo('control', 'integral');
    if (kind !== 'pid') {
      found.push({
        pointer,
        message: `An integral part needs the controller kind ${quote('pid')}, not ${quote(kind)}.`,
        got: quote(integral),
        allowed: `${quote('auto')} or ${quote('never')}`,
        fix: 'Set /control/kind to pid, or measure both wheels and set /drive/trim.',
      });
    } else if (gains !== undefined && gains.integralDistanceMm === undefined) {
      found.push({
        pointer,
        message: 'The gains by hand have no integral part.',
        got: quote(integral),
        allowed: `${quote('auto')} or ${quote('never')}`,
        fix: 'Give /control/gains/integralDistanceMm, or leave the gains to the design.',
      });
    }
    return found;
  },
};
