import { DRIVERS, MOTOR_PIN_KEYS } from '../../vehicle/drivers.js';
import type { Problem } from '../problem.js';
import { describeValue, joinAnd, pointerTo } from '../words.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'driver-pins',
  level: 'problem',
  why: 'Each driver scheme has its own pins; a missing one leaves a motor undriven, a superfluous one means another scheme.',
  check({ sheet }) {
    const { driver } = sheet.drive;
    const scheme = DRIVERS[driver.scheme];
    const needed = scheme.motorPins.map(({ key }) => key);
    const wanted = `Driver scheme ${scheme.id} takes ${joinAnd(needed)} for each motor`;
    const allowed = joinAnd(needed);
    const problems: Problem[] = [];
    for (const side of ['left', 'right'] as const) {
      for (const key of MOTOR_PIN_KEYS) {
        const label = driver[side][key];
        const pointer = pointerTo('drive', 'driver', side, key);
        if (label === undefined && needed.includes(key)) {
          const message = `${wanted}; ${key} of the ${side} motor is missing.`;
          problems.push({
            pointer,
            message,
            got: 'nothing',
            allowed,
            fix: `Add ${key}, or correct /drive/driver/scheme.`,
          });
        } else if (label !== undefined && !needed.includes(key)) {
          const message = `${wanted}; ${key} of the ${side} motor is too many.`;
          const got = describeValue(label);
          problems.push({
            pointer,
            message,
            got,
            allowed,
            fix: `Remove ${key}, or correct /drive/driver/scheme.`,
          });
        }
      }
    }
    if (driver.standbyPin !== undefined && !scheme.standby) {
      problems.push({
        pointer: '/drive/driver/standbyPin',
        message: `Driver scheme ${scheme.id} has no standby pin.`,
        got: describeValue(driver.standbyPin),
        allowed: 'no standby pin',
        fix: "Remove it, and wire the driver's enable input to its supply, or correct /drive/driver/scheme.",
      });
    }
    return problems;
  },
};
