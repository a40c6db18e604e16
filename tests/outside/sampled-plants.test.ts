/**
 * The exact zero-order-hold discretisation of the lane plant against published and independently computed plants.
 */
import { describe, expect, test } from 'vitest';
import { type LanePlant, plantResponse, samplePlant } from '../../src/design/lane-plant.js';
import { stepOutputs } from './step-outputs.js';

/** The same for a transfer function in z^-1 without direct term. */
function stepOf(numerator: readonly number[], denominator: readonly number[], count: number): number[] {
  const outputs: number[] = [];
  for (let k = 0; k < count; k++) {
    let sum = 0;
    numerator.forEach((b, i) => (sum += k - 1 - i >= 0 ? b : 0));
    denominator.forEach((a, i) => (sum -= i > 0 ? a * (outputs[k - i] ?? 0) : 0));
    outputs.push(sum);
  }
  return outputs;
}

const lane: LanePlant = { lookaheadM: 0.08, speedMps: 0.5, lagS: 0.05, delayS: 0, samplePeriodS: 0.01 };

describe('zero-order hold', () => {
  // computed with 50 digits (mpmath), and by scipy and Octave control to the digits that double precision leaves them
  test('(0.08 s + 0.5)/(s^2 (0.05 s + 1)), h = 0.01', () => {
    const numerator = [7.650957096445011e-5, 1.210675051260209e-6, -6.865678366960941e-5];
    const denominator = [1, -2.818730753077982, 2.637461506155964, -0.8187307530779819];
    const want = stepOf(numerator, denominator, 6);
    stepOutputs(samplePlant(lane), 6).forEach((y, k) => expect(Math.abs(y - want[k]!)).toBeLessThan(1e-14));
  });

  // same source: 1/(s^2 (0.05 s + 1)): the lane plant with the sensors on the axle at 1 m/s
  test('1/(s^2 (0.05 s + 1)), h = 0.01', () => {
    const numerator = [3.173117305045353e-6, 1.208260427500113e-5, 2.871203112155331e-6];
    const denominator = [1, -2.818730753077982, 2.637461506155964, -0.8187307530779819];
    const want = stepOf(numerator, denominator, 6);
    const outputs = stepOutputs(samplePlant({ ...lane, lookaheadM: 0, speedMps: 1 }), 6);
    outputs.forEach((y, k) => expect(Math.abs(y - want[k]!)).toBeLessThan(1e-15));
  });

  // 1/s^2 sampled: h^2/2 (1, 1)/(1, -2, 1), python-control discrete_test; reached as the lag goes to nothing
  test('double integrator as the limit of no lag, h = 0.5', () => {
    const outputs = stepOutputs(
      samplePlant({ ...lane, lookaheadM: 0, speedMps: 1, lagS: 1e-9, samplePeriodS: 0.5 }),
      4,
    );
    const want = stepOf([0.125, 0.125], [1, -2, 1], 4);
    outputs.forEach((y, k) => expect(y).toBeCloseTo(want[k]!, 7));
  });

  // Astrom and Wittenmark, Computer-Controlled Systems, sampling with delay: double integrator, h = 1, delay 0.5:
  // gamma0 (0.125, 0.5), gamma1 (0.375, 0.5) (formulas from memory, values computed)
  test('double integrator with half a sample of delay', () => {
    const sampled = samplePlant({ lookaheadM: 0, speedMps: 1, lagS: 1e-10, delayS: 0.5, samplePeriodS: 1 });
    expect(sampled.gamma0[0]).toBeCloseTo(0.125, 8);
    expect(sampled.gamma0[1]).toBeCloseTo(0.5, 8);
    expect(sampled.gamma1[0]).toBeCloseTo(0.375, 8);
    expect(sampled.gamma1[1]).toBeCloseTo(0.5, 8);
  });

  // same source: x' = -a x + a u(t - tau): gamma0 = 1 - e^(-a (h - tau)), gamma1 = e^(-a (h - tau)) - e^(-a h)
  test.each([
    { a: 1, h: 1, delayS: 0.5, want: [0.3678794411714423, 0.3934693402873666, 0.2386512185411911] },
    { a: 20, h: 0.01, delayS: 0.004, want: [0.8187307530779819, 0.1130795632828425, 0.06818968363917566] },
  ])('first-order lag with delay, a = $a', ({ a, h, delayS, want }) => {
    const sampled = samplePlant({ lookaheadM: 0, speedMps: 1, lagS: 1 / a, delayS, samplePeriodS: h });
    expect(sampled.phi33).toBeCloseTo(want[0]!, 13);
    expect(sampled.gamma0[2]).toBeCloseTo(want[1]!, 13);
    expect(sampled.gamma1[2]).toBeCloseTo(want[2]!, 13);
  });
});

test('the response at low frequency is that of the continuous plant', () => {
  const w = 0.5;
  const sampled = samplePlant({ ...lane, samplePeriodS: 1e-4 });
  const [re, im] = plantResponse(sampled, w);
  // (L s + v)/(s^2 (tau s + 1)) at s = jw; a hold of h delays by h/2
  const size = Math.hypot(0.5, 0.08 * w) / (w * w * Math.hypot(1, 0.05 * w));
  const phase = Math.atan2(0.08 * w, 0.5) - Math.PI - Math.atan(0.05 * w) - (w * 1e-4) / 2;
  expect(Math.hypot(re, im)).toBeCloseTo(size, 7);
  expect(re).toBeCloseTo(size * Math.cos(phase), 6);
  expect(im).toBeCloseTo(size * Math.sin(phase), 6);
});
