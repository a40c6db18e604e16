import { expect, test } from 'vitest';
import { type ClassBase, neverSlowerWhenWider } from '../../src/design/class-base.js';
import { bindingLimit } from '../../src/design/speed-classes.js';

function base(name: string, radiusM: number, controlMps: number, givenMps?: number): ClassBase {
  const limits = { motor: 1.4, grip: radiusM * 5, view: 1.5, control: controlMps };
  return {
    range: {
      name,
      minRadiusM: radiusM,
      lawRadiusM: radiusM,
      ...(givenMps !== undefined && { speedMps: givenMps }),
    },
    limits,
    allowedMps: givenMps ?? limits[bindingLimit(limits)],
    gains: { proportionalPerM2: 100 * radiusM, derivativeTimeS: 0.08, filterCoefficient: 0.4 },
  };
}

test('a wider class takes the law and the speed of a tighter one that may go faster', () => {
  const [wide, medium, tight] = [base('wide', 1, 0.3), base('medium', 0.4, 0.5), base('tight', 0.16, 0.6)];
  const found = neverSlowerWhenWider([wide, medium, tight]);
  expect(found.map((each) => each.allowedMps)).toEqual([0.6, 0.6, 0.6]);
  expect(found.map((each) => each.gains)).toEqual([tight.gains, tight.gains, tight.gains]);
  expect(found.map((each) => each.range.name)).toEqual(['wide', 'medium', 'tight']);
  for (const { limits } of found) expect(limits[bindingLimit(limits)]).toBeGreaterThanOrEqual(0.6);
});

test('what is in order stays, and so do speeds of the sheet', () => {
  const sound = [base('wide', 1, 0.9), base('tight', 0.2, 0.5)];
  expect(neverSlowerWhenWider(sound)).toEqual(sound);
  const given = [base('wide', 1, 0.9, 0.2), base('tight', 0.2, 0.9, 0.5)];
  expect(neverSlowerWhenWider(given)).toEqual(given);
});
