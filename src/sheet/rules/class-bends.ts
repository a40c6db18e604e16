import type { Problem } from '../problem.js';
import { pointerTo, quote } from '../words.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'class-bends',
  level: 'problem',
  why: 'The bends of a class are told by radius or by sharpness; two answers may contradict each other, and none says nothing.',
  check({ given }) {
    const { classes } = given.speeds;
    if (classes === 'auto') return [];
    return classes.flatMap(({ name, minRadiusMm, sharpness }, index): Problem[] => {
      if ((minRadiusMm === undefined) !== (sharpness === undefined)) return [];
      const got = minRadiusMm === undefined ? 'neither' : 'both';
      return [
        {
          pointer: pointerTo('speeds', 'classes', index),
          message: `Class ${quote(name)} has ${got} of a radius (minRadiusMm) and a sharpness.`,
          got,
          allowed: 'one of the two',
          fix: 'Give minRadiusMm, or sharpness with turnDeg and withinMm, and not the other.',
        },
      ];
    });
  },
};
