import { topSpeedMps } from '../top-speed.js';
import type { Problem } from '../problem.js';
import { fractionToPercent, percentToFraction } from '../units.js';
import { pointerTo, withUnit } from '../words.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'slow-class',
  level: 'note',
  why: 'Under the speed that belongs to the start duty, friction holds and lets go by turns, and the wheels run by jerks.',
  check({ sheet }) {
    const { classes } = sheet.speeds;
    if (classes === 'auto') return [];
    const topMps = topSpeedMps(sheet);
    const jerkyMps = topMps * percentToFraction(sheet.drive.motor.startDutyPercent);
    return classes.flatMap(({ name, speedMps }, index): Problem[] => {
      if (speedMps >= jerkyMps) return [];
      const percent = withUnit(Math.round(fractionToPercent(speedMps / topMps)), '%');
      return [
        {
          pointer: pointerTo('speeds', 'classes', index, 'speedMps'),
          message: `Class ${name} drives at ${withUnit(speedMps, 'm/s')}, ${percent} of the top speed, which is less than the start duty of ${withUnit(sheet.drive.motor.startDutyPercent, '%')}: the wheels may run by jerks.`,
          fix: `From ${withUnit(jerkyMps, 'm/s')} on they run evenly; a lower gear helps too.`,
        },
      ];
    });
  },
};
