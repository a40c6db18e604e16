import { listPins } from '../../vehicle/boards.js';
import type { Problem } from '../problem.js';
import { describeValue } from '../words.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'pins-exist',
  level: 'problem',
  why: 'A pin has to be on the board, and free of duties that the board itself gives it.',
  check({ board, uses }) {
    const usable = listPins(board.pins.filter((pin) => pin.reserved === undefined));
    return uses.flatMap(({ pointer, label, pin, what }): Problem[] => {
      const common = { pointer, got: describeValue(label), allowed: usable };
      if (pin === undefined) {
        const message = `${board.title} has no pin ${describeValue(label)} (${what}).`;
        return [{ ...common, message, fix: 'Write the label as printed beside the pin.' }];
      }
      if (pin.reserved === undefined) return [];
      const message = `Pin ${pin.label} (${what}) is not free: ${pin.reserved}.`;
      return [{ ...common, message, fix: 'Move the wire to another pin.' }];
    });
  },
};
