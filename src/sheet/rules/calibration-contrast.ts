import type { Problem } from '../problem.js';
import { analogPlaces } from '../sensor-kinds.js';
import { pointerTo, withUnit } from '../words.js';
import type { RuleContext, SheetRule } from './rule.js';

/** Least share of the converter's range between ground and line; under it noise and light decide. Common practice. */
const LEAST_CONTRAST = 0.1;

export const rule: SheetRule = {
  name: 'calibration-contrast',
  level: 'problem',
  why: 'The offset is measured between the readings over ground and over line; without contrast there is nothing to measure.',
  check(context) {
    if (context.sheet.sensors.kind === 'digital') return [];
    return [...missing(context), ...beyondRange(context), ...weak(context), ...unlike(context)];
  },
};

function missing({ sheet }: RuleContext): Problem[] {
  const { calibration } = sheet.sensors;
  const count = analogPlaces(sheet.sensors).length;
  const { mode } = calibration;
  return (['ground', 'line'] as const).flatMap((key): Problem[] => {
    const other = key === 'ground' ? 'line' : 'ground';
    // A sweep needs no readings, but of two lists one alone is a slip.
    if (calibration[key] !== undefined || (mode === 'sweep' && calibration[other] === undefined)) return [];
    return [
      {
        pointer: pointerTo('sensors', 'calibration', key),
        message: `Calibration mode ${mode} ${mode === 'stored' ? 'needs' : 'takes both or none of'} the readings; ${key} is missing.`,
        got: 'nothing',
        allowed: `${count} readings`,
        fix: `Add one reading over the ${key} for each ${sheet.sensors.kind === 'mixed' ? 'analog sensor' : 'sensor'}, or write "mode": "sweep" and no readings.`,
      },
    ];
  });
}

function beyondRange({ sheet, board }: RuleContext): Problem[] {
  const { calibration } = sheet.sensors;
  return (['ground', 'line'] as const).flatMap((key) =>
    (calibration[key] ?? []).flatMap((reading, index): Problem[] => {
      if (reading <= board.adcMaxCount) return [];
      return [
        {
          pointer: pointerTo('sensors', 'calibration', key, index),
          message: `${withUnit(reading, 'counts')} is more than ${board.title} can read: 0 to ${withUnit(board.adcMaxCount, 'counts')}.`,
          got: withUnit(reading, 'counts'),
          allowed: `0 to ${withUnit(board.adcMaxCount, 'counts')}`,
          fix: 'Take the readings with this board.',
        },
      ];
    }),
  );
}

/** Line minus ground of each sensor that has both readings. */
function contrasts(calibration: RuleContext['sheet']['sensors']['calibration']): number[] {
  const { ground = [], line = [] } = calibration;
  return ground.slice(0, line.length).map((reading, index) => (line[index] ?? reading) - reading);
}

function weak({ sheet, board }: RuleContext): Problem[] {
  const least = Math.ceil(LEAST_CONTRAST * board.adcMaxCount);
  return contrasts(sheet.sensors.calibration).flatMap((contrast, index): Problem[] => {
    if (Math.abs(contrast) >= least) return [];
    const got = withUnit(Math.abs(contrast), 'counts');
    const allowed = `at least ${withUnit(least, 'counts')}`;
    return [
      {
        pointer: pointerTo('sensors', 'calibration', 'line', index),
        message: `Sensor ${numberOf(sheet, index)} tells line from ground by ${got} only; ${allowed} are needed.`,
        got,
        allowed,
        fix: 'Check its wiring and its height above the floor (about 3 mm), then take the readings again.',
      },
    ];
  });
}

/** Number, from 1, of the sensor whose readings stand at a place of the lists. */
function numberOf({ sensors }: RuleContext['sheet'], index: number): number {
  return (analogPlaces(sensors)[index] ?? index) + 1;
}

/** All analog sensors are of one kind, so all readings change to the same side over the line. */
function unlike({ sheet }: RuleContext): Problem[] {
  const all = contrasts(sheet.sensors.calibration);
  const rising = all.filter((contrast) => contrast > 0).length;
  const falling = all.filter((contrast) => contrast < 0).length;
  if (rising === 0 || falling === 0) return [];
  const odd = rising >= falling ? -1 : 1;
  return all.flatMap((contrast, index): Problem[] => {
    if (Math.sign(contrast) !== odd) return [];
    const way = odd < 0 ? 'falls' : 'rises';
    const others = odd < 0 ? 'rise' : 'fall';
    return [
      {
        pointer: pointerTo('sensors', 'calibration', 'line', index),
        message: `Over the line the reading of sensor ${numberOf(sheet, index)} ${way}, while most others ${others}.`,
        got: withUnit(contrast, 'counts'),
        allowed: `readings that all ${others} over the line`,
        fix: 'Check whether its two readings are swapped, or its sensor is of another kind.',
      },
    ];
  });
}
