import { pwmOf, timersOf } from '../../vehicle/pwm-modes.js';
import { hzToKhz, khzToHz } from '../units.js';
import { withUnit } from '../words.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'pwm-limit',
  level: 'problem',
  why: 'A driver that is switched faster than it can follow gets hot and distorts the duty.',
  check({ sheet, board, uses }) {
    const { maxPwmKhz } = sheet.drive.driver;
    const pins = uses.flatMap(({ pin, role }) => (role === 'PWM output' ? [pin] : []));
    const serving = timersOf(pins);
    if (serving.size === 0) return [];
    const { mostHz, why } = pwmOf({ board, serving, maxPwmHz: khzToHz(maxPwmKhz) });
    if (mostHz <= khzToHz(maxPwmKhz)) return [];
    const got = withUnit(Math.round(hzToKhz(mostHz) * 1000) / 1000, 'kHz');
    return [
      {
        pointer: '/drive/driver/maxPwmKhz',
        message: `PWM comes at ${got}, more than the driver takes: ${why}.`,
        got,
        allowed: `at most ${withUnit(maxPwmKhz, 'kHz')}`,
        fix: 'Move the PWM to pins of another timer, or take a driver that switches faster.',
      },
    ];
  },
};
