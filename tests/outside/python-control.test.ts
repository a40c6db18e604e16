/**
 * Margins against the loops and expected values of python-control (control/tests/margin_test.py), continuous and sampled. What it
 * prints has three to six digits; further digits are computed with 40-digit arithmetic apart from this project.
 */
import { describe, expect, test } from 'vitest';
import { type Response, marginsOf, scanLoop } from '../../src/design/margins.js';
import { type Complex, over, plus, product, rational, sampledRational, times } from './responses.js';

/** 8.75 (4 s^2 + 0.4 s + 1) over three factors, with three crossovers. */
const THREE_CROSSOVERS = rational(
  product([8.75], [4, 0.4, 1]),
  product([100, 1], [1, 0.22, 1], [0.01, 0.008, 1]),
);

describe('continuous loops', () => {
  test.each([
    // printed: 2, inf, stability margin 0.4170, phase crossover 1.7321
    { name: '1/(s^3+2s^2+3s+4)', loop: rational([1], [1, 2, 3, 4]), gm: 2, pm: Infinity, ms: 2.3982185484 },
    // printed: phase margin 144.9032
    {
      name: '(s+0.1)/(s(s+1))',
      loop: rational([1, 0.1], [1, 1, 0]),
      gm: Infinity,
      pm: 144.903198772,
      ms: 1,
    },
    // printed: 300, stability margin 0.9917; it never reaches |L| = 1
    {
      name: '0.01(10-s)/((s+2)(s+1))',
      loop: rational([-0.01, 0.1], [1, 3, 2]),
      gm: 300,
      pm: Infinity,
      ms: 1.00836063965,
    },
    // printed: 2.2716, first phase margin 97.5941; the others, -157.7844 and 134.7326, are larger in size
    {
      name: '8.75(4s^2+0.4s+1)/((100s+1)(s^2+0.22s+1)(s^2/100+0.008s+1))',
      loop: THREE_CROSSOVERS,
      gm: 2.27158587032,
      pm: 97.5939791,
      ms: 1.78863698557,
    },
  ])('$name', ({ loop, gm, pm, ms }) => {
    const found = marginsOf(loop, 1e-3, 1e5);
    if (Number.isFinite(gm)) expect(found.gainMargin / gm).toBeCloseTo(1, 8);
    else expect(found.gainMargin).toBe(Infinity);
    if (Number.isFinite(pm)) expect(found.phaseMarginDeg).toBeCloseTo(pm, 6);
    else expect(found.phaseMarginDeg).toBe(Infinity);
    expect(found.ms).toBeCloseTo(ms, 6);
  });
});

/** 2/(s(s+1)(s+2)) = 1/s - 2/(s+1) + 1/(s+2) behind a hold: each pole for itself. */
function simplePoles(periodS: number): Response {
  return (w) => {
    const z: Complex = [Math.cos(w * periodS), Math.sin(w * periodS)];
    const term = (gain: number, pole: number) => over([gain, 0], plus(z, [-pole, 0]));
    const decay = Math.exp(-periodS);
    const lags = plus(term(-2 * (1 - decay), decay), term((1 - decay ** 2) / 2, decay ** 2));
    return plus(term(periodS, 1), lags);
  };
}

/** 2/(s+1)^3 behind a hold, as a chain of three lags; exp of its matrix is e^-h times a polynomial in h. */
function triplePole(periodS: number): Response {
  const h = periodS;
  const decay = Math.exp(-h);
  const inputs = [1 - decay * (1 + h + (h * h) / 2), 1 - decay * (1 + h), 1 - decay] as const;
  return (w) => {
    const left: Complex = plus([Math.cos(w * h), Math.sin(w * h)], [-decay, 0]);
    const last = over([inputs[2], 0], left);
    const middle = over(plus([inputs[1], 0], times([decay * h, 0], last)), left);
    const carried = plus(times([decay * h, 0], middle), times([(decay * h * h) / 2, 0], last));
    return times([2, 0], over(plus([inputs[0], 0], carried), left));
  };
}

/** k wn^2/(s^2 + 2 zeta wn s + wn^2) behind a hold (Astrom and Wittenmark, Computer-Controlled Systems, table 2.1). */
function oscillator(gain: number, zeta: number, naturalRadS: number, periodS: number): Response {
  const wave = naturalRadS * Math.sqrt(1 - zeta * zeta);
  const decay = Math.exp(-zeta * naturalRadS * periodS);
  const cos = decay * Math.cos(wave * periodS);
  const sin = ((decay * zeta * naturalRadS) / wave) * Math.sin(wave * periodS);
  const numerator = [gain * (1 - cos - sin), gain * (decay * decay + sin - cos)];
  return sampledRational(numerator, [1, -2 * cos, decay * decay], periodS);
}

describe('sampled loops, unity controller', () => {
  test.each([
    // gh-465, to 1e-5
    {
      name: '2/(s^3+3s^2+2s), h = 0.01',
      loop: simplePoles(0.01),
      h: 0.01,
      printed: [2.955761, 32.398492, 0.429535, 1.403725],
      relative: 1e-5,
    },
    {
      name: '2/(s+1)^3, h = 0.1',
      loop: triplePole(0.1),
      h: 0.1,
      printed: [3.4927, 65.4212, 0.5763, 1.6283],
      relative: 1e-4,
    },
    {
      name: '1.1 (2 pi)^2/(s^2 + 0.8 pi s + (2 pi)^2), h = 0.05',
      loop: oscillator(1.1, 0.2, 2 * Math.PI, 0.05),
      h: 0.05,
      printed: [2.3842, 18.161, 0.26953, 11.712],
      relative: 1e-4,
    },
  ])('$name', ({ loop, h, printed, relative }) => {
    const found = scanLoop(loop, 0.01, Math.PI / h);
    const got = [found.gainMargin, found.phaseMarginDeg, 1 / found.ms, found.phaseCrossoverRadS!];
    printed.forEach((want, i) => expect(Math.abs(got[i]! / want - 1)).toBeLessThan(relative));
  });
});
