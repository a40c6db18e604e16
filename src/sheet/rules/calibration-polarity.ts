import type { Problem } from '../problem.js';
import type { SheetRule } from './rule.js';

export const rule: SheetRule = {
  name: 'calibration-polarity',
  level: 'note',
  why: 'Most sensor circuits read more where more light comes back; readings the other way are either the other circuit or swapped lists.',
  check({ sheet }): Problem[] {
    const { kind, calibration } = sheet.sensors;
    const { ground, line } = calibration;
    if (kind === 'digital' || ground === undefined || line === undefined) return [];
    const rises = ground.every((reading, index) => (line[index] ?? reading) > reading);
    const falls = ground.every((reading, index) => (line[index] ?? reading) < reading);
    const lightLine = sheet.line.polarity === 'light-on-dark';
    if (lightLine ? !falls : !rises) return [];
    return [
      {
        pointer: '/sensors/calibration/line',
        message: `Readings over the ${lightLine ? 'light' : 'dark'} line are ${lightLine ? 'lower' : 'higher'} than over the ground.`,
        fix: 'That is right for sensors that read less where it is light; else ground and line are swapped.',
      },
    ];
  },
};
