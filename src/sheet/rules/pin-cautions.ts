import type { Problem } from '../problem.js';
import { joinAnd } from '../words.js';
import type { PinUse, SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'pin-cautions',
  level: 'note',
  why: 'Some pins work but have a second life: at start, for a bus, or for the radio.',
  check({ uses }) {
    const groups = new Map<string, PinUse[]>();
    for (const use of uses) {
      const { pin, role } = use;
      const cautions = [pin?.caution, role === 'analog sensor' ? pin?.adc?.caution : undefined];
      for (const caution of cautions) {
        if (caution !== undefined) groups.set(caution, [...(groups.get(caution) ?? []), use]);
      }
    }
    return [...groups].flatMap(([caution, group]): Problem[] => {
      const [first] = group;
      if (first === undefined) return [];
      const pins = group.map((use) => `${use.pin?.label ?? use.label} (${use.what})`);
      const message = `${pins.length === 1 ? 'Pin' : 'Each of pins'} ${joinAnd(pins)}: ${caution}.`;
      return [{ pointer: first.pointer, message, fix: 'Take another pin if that matters to you.' }];
    });
  },
};
