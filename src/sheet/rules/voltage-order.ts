import type { Problem } from '../problem.js';
import { withUnit } from '../words.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'voltage-order',
  level: 'problem',
  why: 'A battery is empty below its nominal voltage and full above it.',
  check({ sheet }) {
    const { emptyV, nominalV, fullV } = sheet.power;
    const problems: Problem[] = [];
    if (emptyV > nominalV) {
      problems.push({
        pointer: '/power/emptyV',
        message: `Empty at ${withUnit(emptyV, 'V')} is above the nominal ${withUnit(nominalV, 'V')}.`,
        got: withUnit(emptyV, 'V'),
        allowed: `at most ${withUnit(nominalV, 'V')}`,
        fix: 'Give the voltage at which the battery has to be charged.',
      });
    }
    if (fullV < nominalV) {
      problems.push({
        pointer: '/power/fullV',
        message: `Full at ${withUnit(fullV, 'V')} is below the nominal ${withUnit(nominalV, 'V')}.`,
        got: withUnit(fullV, 'V'),
        allowed: `at least ${withUnit(nominalV, 'V')}`,
        fix: 'Give the voltage of the freshly charged battery.',
      });
    }
    return problems;
  },
};
