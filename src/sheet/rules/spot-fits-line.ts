import { coveredShare, seeingReach } from '../../vehicle/sensor-bar.js';
import { fractionToPercent } from '../units.js';
import { withUnit } from '../words.js';
import type { SheetRule } from './rule.js';
import { neededShare } from './view.js';

export const rule: SheetRule = {
  name: 'spot-fits-line',
  level: 'problem',
  why: 'A spot much wider than the line is never filled by it: the reading over the line hardly differs from the ground.',
  check({ sheet }) {
    const { spotRadiusMm } = sheet.sensors;
    const { widthMm } = sheet.line;
    const share = neededShare(sheet);
    if (seeingReach(widthMm, spotRadiusMm, share) !== undefined) return [];
    const percent = withUnit(Math.round(fractionToPercent(coveredShare(0, widthMm, spotRadiusMm))), '%');
    return [
      {
        pointer: '/sensors/spotRadiusMm',
        message: `A line of ${withUnit(widthMm, 'mm')} fills only ${percent} of a spot of ${withUnit(spotRadiusMm, 'mm')} radius.`,
        got: percent,
        allowed: `at least ${withUnit(fractionToPercent(share), '%')}`,
        fix: 'Mount the sensors nearer to the floor, or lay a wider line.',
      },
    ];
  },
};
