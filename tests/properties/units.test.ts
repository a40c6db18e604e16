/** No number goes from module to module without its unit in its name; what is dimensionless is known by its last word or listed. */
import { describe, expect, test } from 'vitest';
import { exportedNumbers } from './exported-numbers.js';
import { LISTED, tellsUnit } from './number-names.js';

const numbers = exportedNumbers();

const isListed = ({ name, file }: { name: string; file: string }) =>
  LISTED.some(({ where, names }) => where.test(file) && (names.length === 0 || names.includes(name)));

describe('numbers that modules exchange', () => {
  test('are found: fields, parameters, results and constants of every folder', () => {
    const names = new Set(numbers.map(({ name, file, place }) => `${file}: ${place}: ${name}`));
    for (const known of [
      'design/lane-plant.ts: field of LanePlant: lookaheadM',
      'design/steering-loop.ts: parameter of controllerOf: speedMps',
      'design/bar-view.ts: result of viewM: viewM',
      'vehicle/gravity.ts: constant: STANDARD_GRAVITY_MPS2',
      'vehicle/vehicle.ts: field of Vehicle.line: widthM',
      'rehearsal/vehicle-motion.ts: field of VehicleMotion: speedMps',
    ])
      expect(names).toContain(known);
    expect(numbers.length).toBeGreaterThan(800);
  });

  test('tell their unit, or are listed as dimensionless', () => {
    const bare = numbers.filter((each) => !tellsUnit(each.name) && !isListed(each));
    expect(bare.map(({ name, file, place }) => `src/${file}: ${name}, ${place}`)).toEqual([]);
  });

  test('leave no name on the list without use', () => {
    const unused = LISTED.flatMap(({ where, names }) =>
      names.filter(
        (name) => !numbers.some((each) => each.name === name && where.test(each.file) && !tellsUnit(name)),
      ),
    );
    expect(unused).toEqual([]);
  });
});

test.each(['trackWidth', 'speed', 'delay', 'radiusMax', 'ahead', 'WIDTH', 'class', 'bars', 'param'])(
  '%s does not tell its unit',
  (name) => expect(tellsUnit(name)).toBe(false),
);

test.each(['trackWidthMm', 'speedMps', 'delayS', 'LONGEST_M', 'frequencyRadS', 'finishShare', 'turnPerM'])(
  '%s does',
  (name) => expect(tellsUnit(name)).toBe(true),
);
