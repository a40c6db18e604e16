/**
 * Stability limits of a sampled servo, K/(s(s+1)) behind a hold in a unity feedback.
 *
 * Source: NPTEL course on digital control, module 3 (Jury test; bilinear transform with Routh): with T = 1 s the loop
 * K (0.3679 z + 0.2642)/((z - 1)(z - 0.3679)) is stable for 0 < K < 2.39. Exact limit there (1 - e^-1)/(1 - 2 e^-1); the digits and the limits at
 * other sample periods are computed apart from this project (Jury's criterion, poles on the unit circle).
 *
 * The lane plant with the vehicle at rest and the bar 1 m ahead is this servo: offset seen = heading, L/(s (tau s + 1)). The lateral
 * error of the axle then stays as it is: a pole at 1 beside the loop.
 */
import { describe, expect, test } from 'vitest';
import { closedLoopRadius } from '../../src/design/closed-loop.js';
import { type LanePlant, samplePlant } from '../../src/design/lane-plant.js';
import { scanLoop } from '../../src/design/margins.js';
import { openLoop } from '../../src/design/steering-loop.js';
import { stepOutputs } from './step-outputs.js';

function servo(samplePeriodS: number, lagS = 1): LanePlant {
  return { lookaheadM: 1, speedMps: 0, lagS, delayS: 0, samplePeriodS };
}

const gain = (k: number, samplePeriodS: number) => ({ numerator: [k], denominator: [1], samplePeriodS });

const LIMITS: readonly [periodS: number, gain: number][] = [
  [0.1, 20.33892561],
  [0.5, 4.361993867],
  [1, 2.392211191177333],
  [2, 1.455678842],
];

describe('largest stable gain of K/(s(s+1))', () => {
  test.each(LIMITS)('T = %d s: %d, as the gain margin of K = 1', (periodS, limit) => {
    const loop = openLoop(samplePlant(servo(periodS)), gain(1, periodS));
    const { gainMargin } = scanLoop(loop, 1e-3, Math.PI / periodS);
    expect(gainMargin / limit).toBeCloseTo(1, 9);
  });

  test('T = 1 s: 2.39 as printed, poles on the circle at 1.324393456 rad/s', () => {
    const { gainMargin, phaseCrossoverRadS } = scanLoop(
      openLoop(samplePlant(servo(1)), gain(1, 1)),
      1e-3,
      Math.PI,
    );
    expect(gainMargin).toBeCloseTo(2.39, 2);
    expect(gainMargin).toBeCloseTo((1 - Math.exp(-1)) / (1 - 2 * Math.exp(-1)), 9);
    expect(phaseCrossoverRadS).toBeCloseTo(1.324393456, 8);
  });

  // the last one leaves the circle at z = -1
  test.each([...LIMITS, [4, 0.965276663] as const])(
    'T = %d s: poles leave the circle at %d',
    (periodS, limit) => {
      const radius = (k: number) => closedLoopRadius(samplePlant(servo(periodS)), gain(k, periodS));
      expect(radius(0.98 * limit)).toBeCloseTo(1, 4);
      expect(radius(1.02 * limit)).toBeGreaterThan(1.0005);
    },
  );
});

describe('pulse transfer functions behind a hold', () => {
  /** First coefficients of the impulse response, from the first outputs to a step. */
  const first = (plant: LanePlant) => {
    const outputs = stepOutputs(samplePlant(plant), 3);
    const pole = Math.exp(-plant.samplePeriodS / plant.lagS);
    // y1 = b1; y2 = b1 + b2 - a1 y1 with a1 = -(1 + pole)
    return [outputs[1]!, outputs[2]! - outputs[1]! - (1 + pole) * outputs[1]!];
  };

  test.each([
    // Ogata, Discrete-Time Control Systems: (0.3679 z + 0.2642)/((z - 1)(z - 0.3679)) (from memory; digits computed)
    { plant: servo(1), printed: [0.3679, 0.2642], want: [0.3678794411714423, 0.2642411176571154] },
    // Franklin, Powell and Workman, antenna servo: 0.0484 (z + 0.9672)/((z - 1)(z - 0.9048)) (from memory; digits computed)
    {
      plant: servo(1, 10),
      printed: [0.0484, 0.0484 * 0.9672],
      want: [0.04837418035959573, 0.0467884016044447],
    },
    // computed
    { plant: servo(0.01, 0.05), want: [9.365376538990929e-4, 8.761548153210885e-4] },
  ])('$plant.lagS s, T = $plant.samplePeriodS s', ({ plant, printed, want }) => {
    const got = first(plant);
    got.forEach((b, i) => expect(Math.abs(b / want[i]! - 1)).toBeLessThan(1e-12));
    printed?.forEach((b, i) => expect(Math.abs(got[i]! / b - 1)).toBeLessThan(1e-3));
  });
});
