import { withUnit } from '../words.js';
import type { SheetRule } from './rule.js';

/** Small brush motors bear this much over their rating in short runs; beyond it they age fast. Common practice. */
const BEARABLE_RATIO = 1.5;

export const rule: SheetRule = {
  name: 'motor-overvoltage',
  level: 'note',
  why: 'Far over its rated voltage a motor overheats, and its stall current grows in proportion.',
  check({ sheet }) {
    const { ratedVoltageV } = sheet.drive.motor;
    const { fullV } = sheet.power;
    if (fullV <= BEARABLE_RATIO * ratedVoltageV) return [];
    return [
      {
        pointer: '/power/fullV',
        message: `The full battery, ${withUnit(fullV, 'V')}, is ${withUnit(fullV / ratedVoltageV, undefined)} times the motor's rated ${withUnit(ratedVoltageV, 'V')}.`,
        fix: `Up to ${withUnit(BEARABLE_RATIO * ratedVoltageV, 'V')} is common; above it expect hot motors and more stall current than the driver may bear.`,
      },
    ];
  },
};
