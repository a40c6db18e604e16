import type { Problem } from '../problem.js';
import { describeValue, pointerTo } from '../words.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'encoder-channels',
  level: 'problem',
  why: 'With quadrature the second channel tells the direction; with a single channel there is none.',
  check({ sheet: { encoders } }) {
    if (encoders === undefined) return [];
    return (['left', 'right'] as const).flatMap((side): Problem[] => {
      const label = encoders[side].b;
      const pointer = pointerTo('encoders', side, 'b');
      if (encoders.channels === 'quadrature' && label === undefined) {
        const message = `Quadrature takes two channels; b of the ${side} encoder is missing.`;
        return [
          {
            pointer,
            message,
            got: 'nothing',
            allowed: 'a pin',
            fix: 'Add b, or correct /encoders/channels.',
          },
        ];
      }
      if (encoders.channels === 'single' && label !== undefined) {
        const message = `A single channel takes one pin; b of the ${side} encoder is too many.`;
        const got = describeValue(label);
        return [
          { pointer, message, got, allowed: 'nothing', fix: 'Remove b, or correct /encoders/channels.' },
        ];
      }
      return [];
    });
  },
};
