import type { PinFacts } from '../../vehicle/board-facts.js';
import type { Problem } from '../problem.js';
import type { PinUse, SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'pins-used-once',
  level: 'problem',
  why: 'Two wires on one pin fight each other.',
  check({ uses }) {
    const first = new Map<PinFacts, PinUse>();
    return uses.flatMap((use): Problem[] => {
      if (use.pin === undefined) return [];
      const other = first.get(use.pin);
      if (other === undefined) {
        first.set(use.pin, use);
        return [];
      }
      return [
        {
          pointer: use.pointer,
          message: `Pin ${use.pin.label} is taken twice: by ${other.what} (${other.pointer}) and by ${use.what}.`,
          got: use.pin.label,
          allowed: 'one use for each pin',
          fix: `Move ${use.what} to a free pin.`,
        },
      ];
    });
  },
};
