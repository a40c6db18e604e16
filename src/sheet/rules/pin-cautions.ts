import { cautionsOf } from '../../vehicle/pin-roles.js';
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
      const cautions = use.pin === undefined ? [] : cautionsOf(use.pin, use.role);
      for (const caution of cautions) groups.set(caution, [...(groups.get(caution) ?? []), use]);
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
