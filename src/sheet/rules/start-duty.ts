import { withUnit } from '../words.js';
import type { SheetRule } from './rule.js';

/** More than this share of the duty may not go into merely getting the wheels to turn. */
const MOST_PERCENT = 50;

export const rule: SheetRule = {
  name: 'start-duty',
  level: 'problem',
  why: 'What is left of the duty above the start duty is all there is to steer and brake with, and an empty battery leaves less.',
  check({ sheet }) {
    const { startDutyPercent } = sheet.drive.motor;
    const { nominalV, emptyV } = sheet.power;
    const emptyPercent = (startDutyPercent * nominalV) / emptyV;
    if (emptyPercent <= MOST_PERCENT || emptyV > nominalV) return [];
    const most = Math.floor((MOST_PERCENT * emptyV) / nominalV);
    return [
      {
        pointer: '/drive/motor/startDutyPercent',
        message: `With the battery at ${withUnit(emptyV, 'V')} the wheels need ${withUnit(Math.round(emptyPercent), '%')} duty merely to turn.`,
        got: withUnit(startDutyPercent, '%'),
        allowed: `at most ${withUnit(most, '%')} at ${withUnit(nominalV, 'V')}`,
        fix: 'Free what rubs, gear lower, or take a higher battery voltage.',
      },
    ];
  },
};
