import { listPins } from '../../vehicle/boards.js';
import { isAble, type PinRole } from '../../vehicle/pin-roles.js';
import type { Problem } from '../problem.js';
import type { SheetRule } from './rule.js';

const LACK: Readonly<Record<PinRole, string>> = {
  'analog sensor': 'cannot read a voltage',
  'digital sensor': 'cannot be a digital input',
  'PWM output': 'cannot do PWM',
  output: 'cannot be an output',
  encoder: 'raises no interrupt when it changes',
  button: 'has no internal pull-up for the button',
  'stop input': 'has no internal pull-up for the stop input',
};

export const rule: SheetRule = {
  name: 'pins-able',
  level: 'problem',
  why: 'Not every pin can read a voltage, do PWM, drive an output or hold a contact up.',
  check({ board, uses }) {
    return uses.flatMap(({ pointer, pin, role, what }): Problem[] => {
      if (pin === undefined || pin.reserved !== undefined || isAble(pin, role)) return [];
      const able = board.pins.filter((each) => each.reserved === undefined && isAble(each, role));
      const free = able.filter((each) => uses.every((use) => use.pin !== each));
      const fix =
        free.length > 0
          ? `Move it to a free pin that can: ${listPins(free)}.`
          : role === 'analog sensor'
            ? 'Every pin that can is taken: take fewer sensors, digital ones, or another board.'
            : 'Every pin that can is taken: free one of them, or take another board.';
      const message = `Pin ${pin.label} (${what}) ${LACK[role]}.`;
      return [{ pointer, message, got: pin.label, allowed: listPins(able), fix }];
    });
  },
};
