/**
 * A first-order lag sampled with a fractional delay: x' = -a x + a u(t - tau), 0 < tau < h.
 *
 * Formulas: Astrom and Wittenmark, Computer-Controlled Systems, sampled systems with delay (from memory):
 * Phi = e^(-a h), Gamma0 = 1 - e^(-a (h - tau)), Gamma1 = e^(-a (h - tau)) - e^(-a h). The values were computed from them with 50 digits.
 */
import { expect, test } from 'vitest';
import { sampledLag } from '../../src/design/wheel-loop-design.js';

test.each([
  [1, 1, 0.5, 0.3678794411714423, 0.3934693402873666, 0.2386512185411911],
  [20, 0.01, 0.004, 0.8187307530779819, 0.1130795632828425, 0.06818968363917566],
])('a = %d, h = %d, tau = %d', (a, periodS, delayS, phi, gamma0, gamma1) => {
  const { kept, late, early } = sampledLag(1 / a, delayS, periodS);
  expect(Math.abs(kept - phi)).toBeLessThan(1e-13);
  expect(Math.abs(late - gamma0)).toBeLessThan(1e-13);
  expect(Math.abs(early - gamma1)).toBeLessThan(1e-13);
});
