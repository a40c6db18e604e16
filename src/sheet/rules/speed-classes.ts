import { topSpeedMps } from '../top-speed.js';
import type { Problem } from '../problem.js';
import { pointerTo, quote, withUnit } from '../words.js';
import type { RuleContext, SheetRule } from './rule.js';

type Classes = Exclude<RuleContext['sheet']['speeds']['classes'], 'auto'>;

export const rule: SheetRule = {
  name: 'speed-classes',
  level: 'problem',
  why: 'Classes written by hand have to cover every bend without overlapping, and the motors have to reach their speeds.',
  check({ sheet }) {
    const { classes } = sheet.speeds;
    if (classes === 'auto') return [];
    return [
      ...sameNames(classes),
      ...unordered(classes),
      ...uncovered(classes, sheet.line.tightestRadiusMm),
      ...tooFast(classes, topSpeedMps(sheet)),
    ];
  },
};

/** Names that differ only in case or punctuation become one name in the firmware. */
const plainName = (name: string): string => name.toLowerCase().replace(/[^a-z0-9]/g, '');

function sameNames(classes: Classes): Problem[] {
  const names = classes.map(({ name }) => plainName(name));
  return classes.flatMap(({ name }, index): Problem[] => {
    const first = names.indexOf(plainName(name));
    if (first === index) return [];
    return [
      {
        pointer: pointerTo('speeds', 'classes', index, 'name'),
        message: `Class ${quote(name)} has the name of class ${first + 1}, ${quote(classes[first]?.name ?? '')}.`,
        got: quote(name),
        allowed: 'a name of its own, beyond letter case and punctuation',
        fix: 'Rename one of them.',
      },
    ];
  });
}

function unordered(classes: Classes): Problem[] {
  const rising = (classes[1]?.minRadiusMm ?? 0) >= (classes[0]?.minRadiusMm ?? 0);
  return classes.flatMap(({ minRadiusMm }, index): Problem[] => {
    const before = classes[index - 1]?.minRadiusMm;
    if (before === undefined || (rising ? minRadiusMm > before : minRadiusMm < before)) return [];
    return [
      {
        pointer: pointerTo('speeds', 'classes', index, 'minRadiusMm'),
        message: `${withUnit(minRadiusMm, 'mm')} after ${withUnit(before, 'mm')}: the radii of the classes have to ${rising ? 'rise' : 'fall'} one by one.`,
        got: withUnit(minRadiusMm, 'mm'),
        allowed: `${rising ? 'more' : 'less'} than ${withUnit(before, 'mm')}`,
        fix: 'List the classes by radius, each radius once.',
      },
    ];
  });
}

function uncovered(classes: Classes, tightestRadiusMm: number): Problem[] {
  const radii = classes.map(({ minRadiusMm }) => minRadiusMm);
  const least = Math.min(...radii);
  if (least <= tightestRadiusMm) return [];
  return [
    {
      pointer: pointerTo('speeds', 'classes', radii.indexOf(least), 'minRadiusMm'),
      message: `No class serves the tightest bend of ${withUnit(tightestRadiusMm, 'mm')}: the tightest class begins at ${withUnit(least, 'mm')}.`,
      got: withUnit(least, 'mm'),
      allowed: `at most ${withUnit(tightestRadiusMm, 'mm')}`,
      fix: 'Add a class for the tightest bend, or lower this radius.',
    },
  ];
}

function tooFast(classes: Classes, topMps: number): Problem[] {
  return classes.flatMap(({ name, speedMps }, index): Problem[] => {
    if (speedMps <= topMps) return [];
    return [
      {
        pointer: pointerTo('speeds', 'classes', index, 'speedMps'),
        message: `Class ${quote(name)} asks for ${withUnit(speedMps, 'm/s')}, but the motors reach ${withUnit(topMps, 'm/s')}.`,
        got: withUnit(speedMps, 'm/s'),
        allowed: `at most ${withUnit(Math.floor(topMps * 100) / 100, 'm/s')}`,
        fix: 'Lower the speed, or take faster motors, larger wheels or a higher voltage.',
      },
    ];
  });
}
