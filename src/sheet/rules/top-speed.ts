import { topSpeedMps } from '../top-speed.js';
import { withUnit } from '../words.js';
import type { SheetRule } from './rule.js';

/** No vehicle of this kind is slower or faster: winners average 1.6 m/s (reports). */
const SLOWEST_MPS = 0.05;
const FASTEST_MPS = 10;

export const rule: SheetRule = {
  name: 'top-speed',
  level: 'problem',
  why: 'No-load speed, wheel diameter and voltage together give a speed; an absurd one means that one of them is wrong.',
  check({ sheet }) {
    const topMps = topSpeedMps(sheet);
    if (topMps >= SLOWEST_MPS && topMps <= FASTEST_MPS) return [];
    const { noLoadRpm } = sheet.drive.motor;
    return [
      {
        pointer: '/drive/motor/noLoadRpm',
        message: `${withUnit(noLoadRpm, 'rpm')} on wheels of ${withUnit(sheet.drive.wheelDiameterMm, 'mm')} at ${withUnit(sheet.power.nominalV, 'V')} would be ${withUnit(topMps, 'm/s')}.`,
        got: withUnit(topMps, 'm/s'),
        allowed: `${SLOWEST_MPS} to ${withUnit(FASTEST_MPS, 'm/s')}`,
        fix: 'Take the speed of the gearbox output shaft at the rated voltage, and check the wheel diameter.',
      },
    ];
  },
};
