/**
 * The steering law with its integral part, as a discrete PID with filtered derivative and back-calculation.
 *
 * Form: DiscretePIDs.jl (after Astrom and Hagglund): bi = K h / Ti, ad = Td / (Td + N h), bd = K N Td / (Td + N h), ar = h / Tt,
 * Tt = sqrt(Ti Td); D := ad D - bd (y - y_old); v = K (r - y) + I + D; u = sat(v); I := I + bi (r - y) + ar (u - v).
 * Sequence computed apart from this project: K = 2, Ti = 0.5, Td = 0.1, N = 10, h = 0.01, limits -1 to 1, r = 1.
 */
import { expect, test } from 'vitest';
import { SteeringLaw } from '../../src/controller/steering-law.js';

/** y, v, u of each sample. */
const SEQUENCE = [
  [0, 2, 1],
  [0, 1.9952786405, 1],
  [0.1, 0.7907684265, 0.7907684265],
  [0.25, -0.4732315735, -0.4732315735],
  [0.4, -1.2432315735, -1],
  [0.6, -2.3583539268, -1],
  [0.8, -3.0566064925, -1],
  [1, -3.5441322541, -1],
] as const;

/** Input and curvature units of 1, and the bits of the gains: the gains below are then whole numbers. */
const INPUT_ONE = 4000;
const CURVATURE_ONE = 4000;
const GAIN_BITS = 13;
const FULL_SPEED_UNITS = 8192;

/** @param limit of the output, 1 as in the sequence */
function law(limit: number): SteeringLaw {
  const perInput = CURVATURE_ONE / INPUT_ONE;
  return new SteeringLaw({
    steering: {
      gainBits: GAIN_BITS,
      curvatureLimit: limit * CURVATURE_ONE,
      demandFilter: 1,
      holdFilter: 1,
      searchCurvature: 0,
    },
    classes: [
      {
        name: 'all',
        curvature: 0,
        speed: 0,
        speedSlope: 0,
        proportional: 2 * perInput * 2 ** GAIN_BITS,
        derivative: (10 * perInput * 2 ** GAIN_BITS) / 16,
        derivativeFilter: 0.5 * 2 ** 15,
        // bi in 1/2^16, two bits more, doubled: full speed takes half of it
        integral: Math.round(0.04 * perInput * 2 ** 16 * 2 ** 2 * 2),
      },
    ],
    integral: { gainBits: 2, limit: 4 * CURVATURE_ONE, tracking: Math.round(0.04472135955 * 2 ** 16) },
  });
}

test('the sequence, saturated and not', () => {
  const steering = law(1);
  SEQUENCE.forEach(([y, , u], k) => {
    const input = Math.round((1 - y) * INPUT_ONE);
    const got = steering.curvature(input, 0, FULL_SPEED_UNITS, k === 0) / CURVATURE_ONE;
    expect(Math.abs(got - u), `sample ${k}`).toBeLessThan(1e-3);
  });
});

test('without its back-calculation the integral part would be another by the third sample', () => {
  // no limit, nothing to give back: I grows by bi (r - y) alone, 0.08 after two samples at r - y = 1
  const steering = law(4);
  const got = [0, 0, 0.1].map((y, k) =>
    steering.curvature(Math.round((1 - y) * INPUT_ONE), 0, FULL_SPEED_UNITS, k === 0),
  );
  expect(got[2]! / CURVATURE_ONE).toBeCloseTo(1.8 - 1 + 0.08, 2);
});
