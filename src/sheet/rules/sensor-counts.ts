import type { Problem } from '../problem.js';
import type { SheetRule } from './rule.js';
import { counted } from '../words.js';

export const rule: SheetRule = {
  name: 'sensor-counts',
  level: 'problem',
  why: 'Every sensor needs one pin, one position and one pair of readings; a list of another length belongs to another bar.',
  check({ sheet }) {
    const { count, pins, positionsMm, calibration } = sheet.sensors;
    const lists: [pointer: string, noun: string, list: readonly unknown[] | undefined][] = [
      ['/sensors/pins', 'pin', pins],
      ['/sensors/positionsMm', 'position', positionsMm],
      ['/sensors/calibration/ground', 'reading', calibration.ground],
      ['/sensors/calibration/line', 'reading', calibration.line],
    ];
    return lists.flatMap(([pointer, noun, list]): Problem[] => {
      if (list === undefined || list.length === count) return [];
      return [
        {
          pointer,
          message: `There are ${counted(list.length, noun)} for ${counted(count, 'sensor')}.`,
          got: counted(list.length, noun),
          allowed: counted(count, noun),
          fix: `Give one ${noun} for each sensor, leftmost first, or correct /sensors/count.`,
        },
      ];
    });
  },
};
