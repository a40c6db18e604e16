import { listPins } from '../../vehicle/boards.js';
import { sharedOutput } from '../../vehicle/pin-roles.js';
import type { Problem } from '../problem.js';
import type { PinUse, SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'pwm-outputs-distinct',
  level: 'problem',
  why: 'Two pins on one PWM output always carry the same duty, so two motors could not differ.',
  check({ board, uses }) {
    const first = new Map<string, PinUse>();
    return uses.flatMap((use): Problem[] => {
      const { pin } = use;
      const output = pin && sharedOutput(pin);
      if (use.role !== 'PWM output' || pin?.pwm === undefined || output === undefined) return [];
      const other = first.get(output);
      if (other?.pin === undefined || other.pin === pin) {
        first.set(output, use);
        return [];
      }
      const taken = uses.map((each) => each.pin && sharedOutput(each.pin));
      const free = board.pins.filter(
        (each) =>
          each.reserved === undefined && each.pwm !== undefined && !taken.includes(sharedOutput(each)),
      );
      return [
        {
          pointer: use.pointer,
          message: `Pins ${other.pin.label} (${other.what}) and ${pin.label} (${use.what}) share one PWM output (slice ${pin.pwm.timer}, channel ${pin.pwm.channel}).`,
          got: pin.label,
          allowed: 'a PWM output of its own',
          fix:
            free.length > 0
              ? `Move it to one of ${listPins(free)}.`
              : 'Free a pin of another PWM output for it.',
        },
      ];
    });
  },
};
