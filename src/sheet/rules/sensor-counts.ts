import type { Problem } from '../problem.js';
import type { SheetRule } from './rule.js';
import { analogPlaces } from '../sensor-kinds.js';
import { counted } from '../words.js';

export const rule: SheetRule = {
  name: 'sensor-counts',
  level: 'problem',
  why: 'Every sensor needs one pin, one position and, if it is analog, one pair of readings; a list of another length belongs to another bar.',
  check({ sheet }) {
    const { kind, count, kinds, pins, positionsMm, calibration } = sheet.sensors;
    const mixed = kind === 'mixed';
    // Without its kinds nobody knows how many readings a mixed bar has; the rule sensor-kinds asks for them.
    const known = !mixed || kinds?.length === count;
    const measured = mixed ? analogPlaces(sheet.sensors).length : count;
    const ofWhat = mixed ? 'analog sensor' : 'sensor';
    type List = [
      pointer: string,
      noun: string,
      list: readonly unknown[] | undefined,
      want: number,
      of: string,
    ];
    const lists: List[] = [
      ['/sensors/pins', 'pin', pins, count, 'sensor'],
      ['/sensors/kinds', 'kind', mixed ? kinds : undefined, count, 'sensor'],
      ['/sensors/positionsMm', 'position', positionsMm, count, 'sensor'],
      ['/sensors/calibration/ground', 'reading', known ? calibration.ground : undefined, measured, ofWhat],
      ['/sensors/calibration/line', 'reading', known ? calibration.line : undefined, measured, ofWhat],
    ];
    return lists.flatMap(([pointer, noun, list, want, of]): Problem[] => {
      if (list === undefined || list.length === want) return [];
      return [
        {
          pointer,
          message: `There are ${counted(list.length, noun)} for ${counted(want, of)}.`,
          got: counted(list.length, noun),
          allowed: counted(want, noun),
          fix: `Give one ${noun} for each ${of}, leftmost first, or correct ${of === 'sensor' ? '/sensors/count' : '/sensors/kinds'}.`,
        },
      ];
    });
  },
};
