/**
 * Maximum sensitivity of the examples in Skogestad, Simple analytic rules for model reduction and PID controller tuning, J. Process
 * Control 13 (2003) 291-309: processes without an exact low-order model under its PI and PID settings, series form
 * Kc (1 + 1/(Ti s)) (1 + Td s). The printed Ms have two decimals (from memory); four decimals are computed apart from this project.
 */
import { expect, test } from 'vitest';
import { marginsOf } from '../../src/design/margins.js';
import { type Settings, simcIntegrating, simcLag } from '../../src/design/classic-rules.js';
import { product, rational } from './responses.js';

const lag = (timeS: number) => [timeS, 1];

const TWO_LAGS = { num: [1], den: product(lag(1), lag(0.2)) };
const SEVEN_LAGS = {
  num: product(lag(-0.3), lag(0.08)),
  den: product(lag(2), lag(1), lag(0.4), lag(0.2), lag(0.05), lag(0.05), lag(0.05)),
};
const FOUR_LAGS = { num: [1], den: product(lag(1), lag(1), lag(1), lag(1)) };
const INTEGRATING = {
  num: product(lag(0.17), lag(0.17)),
  den: product([1, 0], lag(1), lag(1), lag(0.028)),
};

interface Example {
  name: string;
  num: readonly number[];
  den: readonly number[];
  pi: Settings;
  derivativeTimeS?: number;
  printed: number;
  ms: number;
}

test.each<Example>([
  // half rule: L 0.1, T 1.1, settings by our own function
  {
    name: '1/((s+1)(0.2s+1)), PI',
    ...TWO_LAGS,
    pi: simcLag({ gain: 1, lagS: 1.1, delayS: 0.1 }),
    printed: 1.56,
    ms: 1.5602,
  },
  // half rule: L 1.47, T 2.5
  {
    name: '(-0.3s+1)(0.08s+1)/(seven lags), PI',
    ...SEVEN_LAGS,
    pi: simcLag({ gain: 1, lagS: 2.5, delayS: 1.47 }),
    printed: 1.66,
    ms: 1.6616,
  },
  // second order: L 0.77, T1 2, T2 1.2
  {
    name: '(-0.3s+1)(0.08s+1)/(seven lags), PID',
    ...SEVEN_LAGS,
    pi: simcLag({ gain: 1, lagS: 2, delayS: 0.77 }),
    derivativeTimeS: 1.2,
    printed: 1.73,
    ms: 1.724,
  },
  // half rule: L 2.5, T 1.5
  {
    name: '1/(s+1)^4, PI',
    ...FOUR_LAGS,
    pi: simcLag({ gain: 1, lagS: 1.5, delayS: 2.5 }),
    printed: 1.46,
    ms: 1.463,
  },
  // second order: L 1.5, T1 1.5, T2 1
  {
    name: '1/(s+1)^4, PID',
    ...FOUR_LAGS,
    pi: simcLag({ gain: 1, lagS: 1.5, delayS: 1.5 }),
    derivativeTimeS: 1,
    printed: 1.43,
    ms: 1.4318,
  },
  // half rule: L 1.69
  {
    name: '(0.17s+1)^2/(s(s+1)^2(0.028s+1)), PI',
    ...INTEGRATING,
    pi: simcIntegrating({ slope: 1, delayS: 1.69 }),
    printed: 1.48,
    ms: 1.4749,
  },
  // second order: L 0.358, T2 1.33
  {
    name: '(0.17s+1)^2/(s(s+1)^2(0.028s+1)), PID',
    ...INTEGRATING,
    pi: simcIntegrating({ slope: 1, delayS: 0.358 }),
    derivativeTimeS: 1.33,
    printed: 1.23,
    ms: 1.2284,
  },
])('$name: Ms $printed', ({ num, den, pi, derivativeTimeS = 0, printed, ms }) => {
  const { gain } = pi;
  const integralTimeS = pi.integralTimeS!;
  const numerator = product([gain], lag(integralTimeS), lag(derivativeTimeS), num);
  const loop = rational(numerator, product([integralTimeS, 0], den));
  const found = marginsOf(loop, 1e-3, 1e3).ms;
  expect(Math.abs(found - printed)).toBeLessThan(0.01);
  expect(Math.abs(found - ms)).toBeLessThan(1e-4);
});
