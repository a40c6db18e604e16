import type { Problem } from '../problem.js';
import { joinAnd } from '../words.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'sensor-kinds',
  level: 'problem',
  why: 'In a mixed bar nothing but the list says which sensor is read as a voltage and which as a level.',
  check({ sheet }): Problem[] {
    const { kind, kinds, count } = sheet.sensors;
    if (kind !== 'mixed') return [];
    if (kinds === undefined) {
      return [
        {
          pointer: '/sensors/kinds',
          message: 'A mixed bar needs the kind of each sensor.',
          got: 'nothing',
          allowed: `${count} kinds, analog or digital`,
          fix: 'Add kinds, leftmost sensor first, such as ["digital", "analog", "analog", "digital"].',
        },
      ];
    }
    const found = [...new Set(kinds)];
    if (found.length > 1) return [];
    return [
      {
        pointer: '/sensors/kinds',
        message: `Every sensor of the mixed bar is ${joinAnd(found)}.`,
        got: joinAnd(found),
        allowed: 'some analog and some digital',
        fix: `Write "kind": "${joinAnd(found)}" and leave kinds out, or correct the list.`,
      },
    ];
  },
};
