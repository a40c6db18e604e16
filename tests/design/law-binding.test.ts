/** What binds the law of a class, against the law itself. */
import { describe, expect, it } from 'vitest';
import { cornerText, lawBinding } from '../../src/design/law-binding.js';
import { classRanges, speedLimits } from '../../src/design/speed-classes.js';
import { bestLaw, designLaw, proportionalRange } from '../../src/design/steering-gains.js';
import { keeps, worstMargins } from '../../src/design/tolerance-box.js';
import { demoVehicle } from './demo-vehicle.js';

const RADIUS_M = 0.12;
const vehicle = demoVehicle();
const slow = {
  ...vehicle,
  drive: { ...vehicle.drive, lagS: 0.4 },
  bar: { ...vehicle.bar, aheadM: 0.04 },
};
/** A speed hardly below the control limit of the slow vehicle's tightest bend. */
const brink = 0.98 * speedLimits(slow, classRanges(slow).at(-2)!).control;

describe('what sets the proportional gain', () => {
  it('is the geometry of the bend where the wanted gain keeps every margin', () => {
    const { gains } = designLaw(vehicle, 0.9, RADIUS_M)!;
    expect(gains.proportionalPerM2).toBe(proportionalRange(vehicle, RADIUS_M)[1]);
    expect(lawBinding(vehicle, gains, 0.9, RADIUS_M).proportional).toBe('bend geometry');
  });

  it('is a requirement where a larger gain would miss it', () => {
    const { gains } = designLaw(slow, brink, RADIUS_M)!;
    const binding = lawBinding(slow, gains, brink, RADIUS_M);
    expect(binding.proportional).toBe(binding.nearest);
    const worst = worstMargins(slow, brink, gains);
    expect(keeps(worst)).toBe(true);
    const stronger = bestLaw(slow, brink, 1.25 * gains.proportionalPerM2);
    expect(keeps(stronger.worst)).toBe(false);
    expect(stronger.worst.phaseMarginDeg < 33 || stronger.worst.ms > 1.8).toBe(true);
  });
});

it('the fast and sluggish vehicle decides where lag costs phase', () => {
  const { gains } = designLaw(slow, brink, RADIUS_M)!;
  const { corner } = lawBinding(slow, gains, brink, RADIUS_M);
  expect(corner.lag).toBeCloseTo(1 + slow.tolerance.lag, 12);
  expect(cornerText(corner)).toBe('speed +18 %, time constant +35 %');
});

it('a tighter bend at the same speed and law takes more of the wheels', () => {
  const { gains } = designLaw(vehicle, 0.6, RADIUS_M)!;
  const share = (radiusM: number) => lawBinding(vehicle, gains, 0.6, radiusM).wheelShare;
  expect(share(0.12)).toBeGreaterThan(share(0.2));
  expect(share(0.2)).toBeGreaterThan(share(0.6));
  // no less than what the bend itself needs, v kappa b / (2 top)
  expect(share(0.2)).toBeGreaterThan((0.6 * vehicle.drive.trackM) / (2 * 0.2 * vehicle.drive.topSpeedMps));
});
