import { listPins } from '../../vehicle/boards.js';
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
      if (use.role !== 'PWM output' || pin?.pwm === undefined || pin.pwm.channel === 'routed') return [];
      const output = `${pin.pwm.timer}${pin.pwm.channel}`;
      const other = first.get(output);
      if (other?.pin === undefined || other.pin === pin) {
        first.set(output, use);
        return [];
      }
      const taken = uses
        .flatMap((each) => each.pin?.pwm ?? [])
        .map(({ timer, channel }) => `${timer}${channel}`);
      const free = board.pins.filter(
        (each) =>
          each.reserved === undefined &&
          each.pwm !== undefined &&
          !taken.includes(`${each.pwm.timer}${each.pwm.channel}`),
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
