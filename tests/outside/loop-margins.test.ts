/**
 * Gain margin, phase margin and maximum sensitivity against published and independently computed loops.
 *
 * Sources beside each row. "computed": 40-digit arithmetic done apart from this project (catalogue of checks).
 */
import { describe, expect, test } from 'vitest';
import { marginsOf } from '../../src/design/margins.js';
import { controllerOf, loopMargins } from '../../src/design/steering-loop.js';
import { delayed, rational } from './responses.js';

describe('continuous loops', () => {
  test.each([
    // Octave control package, margin.m built-in test prints 2.50, 35.43; further digits computed
    {
      name: '24/((s+1)(s+2)(s+3))',
      num: [24],
      den: [1, 6, 11, 6],
      gm: 2.5,
      pm: 35.4254199888,
      ms: 2.39892976598,
    },
    // python-control, margin_test (gh-58); digits computed
    {
      name: '15/((s+1)(s+2)(s+3))',
      num: [15],
      den: [1, 6, 11, 6],
      gm: 4,
      pm: 60.7321364671,
      ms: 1.70397227393,
    },
    // python-control, margin_test prints 4.000, 67.6058; digits computed
    { name: '2/(s+1)^3', num: [2], den: [1, 3, 3, 1], gm: 4, pm: 67.5980663672, ms: 5 / 3 },
    // Astrom and Murray, Feedback Systems, prints 2.67, 41.7 (from memory); digits computed
    { name: '3/(s+1)^3', num: [3], den: [1, 3, 3, 1], gm: 8 / 3, pm: 41.6903261304, ms: 2.2 },
    // python-control, margin_test prints 10.0014; digits computed; never reaches |L| = 1
    { name: '0.8/(s+1)^3', num: [0.8], den: [1, 3, 3, 1], gm: 10, pm: Infinity, ms: 11 / 9 },
    // python-control, margin_test prints 44.4594; digits computed
    {
      name: '(s+0.1)/(s^2(s+1))',
      num: [1, 0.1],
      den: [1, 1, 0, 0],
      gm: Infinity,
      pm: 44.4593273422,
      ms: 1.58751022026,
    },
    // exact crossover 0.7861513778 (computed): a gridded value in a library's test is 0.78711
    { name: '1/(s^2+s)', num: [1], den: [1, 1, 0], gm: Infinity, pm: 51.827292373, ms: 1.467889825 },
  ])('$name', ({ num, den, gm, pm, ms }) => {
    const found = marginsOf(rational(num, den), 1e-3, 1e3);
    if (Number.isFinite(gm)) expect(found.gainMargin).toBeCloseTo(gm, 7);
    else expect(found.gainMargin).toBe(Infinity);
    if (Number.isFinite(pm)) expect(found.phaseMarginDeg).toBeCloseTo(pm, 6);
    else expect(found.phaseMarginDeg).toBe(Infinity);
    expect(found.ms).toBeCloseTo(ms, 7);
  });

  // closed forms: GM = pi/(2 k th), PM = 90 deg - k th
  test.each([
    { k: 0.5, ms: 1.59049023 },
    { k: 1, ms: 3.1293116 },
  ])('integrator $k with a delay of 1 s', ({ k, ms }) => {
    const found = marginsOf(delayed(rational([k], [1, 0]), 1), 1e-3, 20);
    expect(found.gainMargin).toBeCloseTo(Math.PI / (2 * k), 7);
    expect(found.phaseMarginDeg).toBeCloseTo(90 - (k * 180) / Math.PI, 7);
    expect(found.ms).toBeCloseTo(ms, 6);
  });

  // Skogestad, J. Process Control 13 (2003): robustness of the tc = L settings, printed 3.14, 61.4, 1.59 and 2.96, 46.9, 1.70 (from memory)
  test.each([
    {
      name: 'first order',
      loop: rational([0.5], [1, 0]),
      gm: Math.PI,
      pm: 61.3521102434588,
      ms: 1.59049023318958,
    },
    {
      name: 'integrating',
      loop: rational([0.5, 0.0625], [1, 0, 0]),
      gm: 2.96340224595,
      pm: 46.8642869093,
      ms: 1.70352169041048,
    },
  ])('SIMC, $name', ({ loop, gm, pm, ms }) => {
    const found = marginsOf(delayed(loop, 1), 1e-3, 20);
    expect(found.gainMargin).toBeCloseTo(gm, 7);
    expect(found.phaseMarginDeg).toBeCloseTo(pm, 7);
    expect(found.ms).toBeCloseTo(ms, 7);
  });

  // identity in ControlSystems.jl (margin bounds): GM >= Ms/(Ms-1), PM >= 2 asin(1/(2 Ms))
  test.each([[24], [15], [8], [30]])('what Ms guarantees, gain %d', (gain) => {
    const { gainMargin, phaseMarginDeg, ms } = marginsOf(rational([gain], [1, 6, 11, 6]), 1e-3, 1e3);
    expect(gainMargin).toBeGreaterThanOrEqual(ms / (ms - 1));
    expect(phaseMarginDeg).toBeGreaterThanOrEqual((2 * Math.asin(1 / (2 * ms)) * 180) / Math.PI);
  });
});

describe('second-order loop wn^2/(s(s + 2 zeta wn)), standard closed forms (computed)', () => {
  test.each([
    [0.2, 22.602284, 2.733921],
    [0.3, 33.272491, 1.994608],
    [0.4, 43.117598, 1.655047],
    [0.5, 51.827292, 1.46789],
    [0.6, 59.187267, 1.352758],
    [Math.SQRT1_2, 65.530199, 1.27202],
    [0.8, 69.859999, 1.22303],
  ])('zeta %d', (zeta, pm, ms) => {
    const found = marginsOf(rational([1], [1, 2 * zeta, 0]), 1e-3, 1e3);
    expect(found.phaseMarginDeg).toBeCloseTo(pm, 5);
    expect(found.ms).toBeCloseTo(ms, 5);
  });
});

describe('lane loop with digital PD, 40-digit arithmetic (computed)', () => {
  const plant = { lookaheadM: 0.08, speedMps: 0.5, lagS: 0.05, delayS: 0, samplePeriodS: 0.01 };
  const controller = {
    numerator: [120, -100],
    denominator: [1, 0],
    samplePeriodS: 0.01,
  };

  test.each([
    { delayS: 0, gm: 114.027216806, pm: 27.3795014001, ms: 2.11300953983 },
    { delayS: 0.01, gm: 45.7002583629, pm: 25.4452796346, ms: 2.27072642229 },
  ])('delay $delayS s', ({ delayS, gm, pm, ms }) => {
    const found = loopMargins({ ...plant, delayS }, controller);
    expect(found.gainMargin).toBeCloseTo(gm, 7);
    expect(found.phaseMarginDeg).toBeCloseTo(pm, 7);
    expect(found.ms).toBeCloseTo(ms, 7);
  });

  test('one sample of delay costs exactly crossover times sample period of phase', () => {
    const without = loopMargins(plant, controller).phaseMarginDeg;
    const late = loopMargins({ ...plant, delayS: 0.01 }, controller).phaseMarginDeg;
    expect(without - late).toBeCloseTo((3.37585382725 * 0.01 * 180) / Math.PI, 8);
  });

  test('the unfiltered law is the same controller', () => {
    // kp 40 1/m^2 at 0.5 m/s is 20 rad/s per m; Td 0.05 s; filter coefficient 1: no memory
    const law = { proportionalPerM2: 40, derivativeTimeS: 0.05, filterCoefficient: 1 };
    const found = controllerOf(law, 0.5, 0.01);
    expect(found.numerator[0]).toBeCloseTo(120, 9);
    expect(found.numerator[1]).toBeCloseTo(-100, 9);
    expect(found.denominator[1]).toBeCloseTo(0, 12);
  });
});
