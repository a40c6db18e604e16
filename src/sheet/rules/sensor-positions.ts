import type { Problem } from '../problem.js';
import { SCHEMAS, schemaAt } from '../schema.js';
import { pointerTo, withUnit } from '../words.js';
import type { SheetRule } from './rule.js';

/** No two sensors sit closer than the closest even spacing that the schema allows. */
const CLOSEST_MM = schemaAt(SCHEMAS.sheet, '/sensors/pitchMm')?.minimum ?? 0;

export const rule: SheetRule = {
  name: 'sensor-positions',
  level: 'problem',
  why: 'The offset of the line is computed from where each sensor sits.',
  check({ sheet }) {
    const { pitchMm, positionsMm } = sheet.sensors;
    if (pitchMm !== undefined && positionsMm !== undefined) {
      return [
        {
          pointer: '/sensors/positionsMm',
          message: 'Both a spacing (pitchMm) and positions (positionsMm) are given.',
          got: 'both',
          allowed: 'one of the two',
          fix: 'Remove pitchMm if the row is uneven, else remove positionsMm.',
        },
      ];
    }
    if (positionsMm !== undefined) return [...outOfOrder(positionsMm), ...oneSided(positionsMm)];
    if (pitchMm !== undefined) return [];
    return [
      {
        pointer: '/sensors',
        message: 'Neither a spacing (pitchMm) nor positions (positionsMm) are given.',
        got: 'neither',
        allowed: 'one of the two',
        fix: 'Add pitchMm: the distance centre to centre between neighbouring sensors.',
      },
    ];
  },
};

function outOfOrder(positionsMm: readonly number[]): Problem[] {
  return positionsMm.flatMap((position, index): Problem[] => {
    const before = positionsMm[index - 1];
    if (before === undefined || before - position >= CLOSEST_MM) return [];
    const allowed = `at most ${withUnit(before - CLOSEST_MM, 'mm')}`;
    return [
      {
        pointer: pointerTo('sensors', 'positionsMm', index),
        message: `${withUnit(position, 'mm')} does not follow ${withUnit(before, 'mm')}: sensors are listed left to right, left is positive, and two sit at least ${withUnit(CLOSEST_MM, 'mm')} apart.`,
        got: withUnit(position, 'mm'),
        allowed,
        fix: 'List the positions from the leftmost sensor to the rightmost, falling.',
      },
    ];
  });
}

function oneSided(positionsMm: readonly number[]): Problem[] {
  const left = Math.max(...positionsMm);
  const right = Math.min(...positionsMm);
  if (left > 0 && right < 0) return [];
  return [
    {
      pointer: '/sensors/positionsMm',
      message: `All sensors are on one side of the centre line: ${withUnit(right, 'mm')} to ${withUnit(left, 'mm')}.`,
      got: `${withUnit(right, 'mm')} to ${withUnit(left, 'mm')}`,
      allowed: 'sensors on both sides, left positive, right negative',
      fix: "Measure each sensor's centre from the centre line of the vehicle.",
    },
  ];
}
