/** Published tuning rules against their authors' or handbooks' worked numbers. Sources beside each check. */
import { describe, expect, test } from 'vitest';
import {
  amigoIntegrating,
  amigoLag,
  cohenCoon,
  simcDoubleIntegrating,
  simcIntegrating,
  simcLag,
  zieglerNicholsClosed,
  zieglerNicholsOpen,
} from '../../src/design/classic-rules.js';

const chau = { gain: 1.25, lagS: 4, delayS: 0.9 };
const unit = { gain: 1, lagS: 1, delayS: 1 };

describe('Ziegler and Nichols 1942', () => {
  // Chau, Process Control, Example 5.7A, as in the stored README of an open tuning collection
  test('open loop, K 1.25, T 4, L 0.9', () => {
    const { pid } = zieglerNicholsOpen(chau);
    expect(pid.gain).toBeCloseTo(4.266666666666667, 12);
    expect(pid.integralTimeS).toBeCloseTo(1.8, 12);
    expect(pid.derivativeTimeS).toBeCloseTo(0.45, 12);
  });

  // Ogata, Modern Control Engineering, Example 8-1 (from memory): 18, 1.405, 0.35124
  test('closed loop, Ku 30, Pu 2.81', () => {
    const { pid } = zieglerNicholsClosed(30, (2 * Math.PI) / Math.sqrt(5));
    expect(pid.gain).toBe(18);
    expect(pid.integralTimeS).toBeCloseTo(1.405, 3);
    expect(pid.derivativeTimeS).toBeCloseTo(0.35124, 5);
  });

  // Caltech wiki to Astrom and Murray, Feedback Systems, erratum to eq. 11.10: PI kp 0.9 T/(K tau), ki 0.27 T/(K tau^2) from the
  // step response; kp 0.45 kc, ki 0.54 kc/Tc from the ultimate cycle
  test('PI gains as the erratum of a textbook has them', () => {
    const open = zieglerNicholsOpen({ gain: 2, lagS: 3, delayS: 0.5 }).pi;
    expect(open.gain).toBeCloseTo((0.9 * 3) / (2 * 0.5), 12);
    expect(open.gain / open.integralTimeS!).toBeCloseTo((0.27 * 3) / (2 * 0.5 ** 2), 12);
    const closed = zieglerNicholsClosed(8, 3).pi;
    expect(closed.gain).toBeCloseTo(0.45 * 8, 12);
    expect(closed.gain / closed.integralTimeS!).toBeCloseTo((0.54 * 8) / 3, 12);
  });

  // computed apart from this project
  test('open loop, K 2, T 0.5, L 0.05', () => {
    const { pid } = zieglerNicholsOpen({ gain: 2, lagS: 0.5, delayS: 0.05 });
    expect(pid.gain).toBeCloseTo(6, 12);
    expect(pid.integralTimeS).toBeCloseTo(0.1, 12);
    expect(pid.derivativeTimeS).toBeCloseTo(0.025, 12);
  });
});

describe('Cohen and Coon 1953', () => {
  // Chau, Example 5.7A prints 4.9, 2.0, 0.31 (from memory); digits computed
  test('K 1.25, T 4, L 0.9', () => {
    const { p, pi, pid } = cohenCoon(chau);
    expect(p.gain).toBeCloseTo(3.822222222, 9);
    expect(pi.gain).toBeCloseTo(3.266666667, 9);
    expect(pi.integralTimeS).toBeCloseTo(2.045, 9);
    expect(pid.gain).toBeCloseTo(4.940740741, 9);
    expect(pid.integralTimeS).toBeCloseTo(2.028040541, 9);
    expect(pid.derivativeTimeS).toBeCloseTo(0.31441048, 8);
  });

  test('K = T = L = 1 (computed)', () => {
    const { pi, pid } = cohenCoon(unit);
    expect(pi.gain).toBeCloseTo(0.983333333, 9);
    expect(pi.integralTimeS).toBeCloseTo(1.137931034, 9);
    expect(pid.gain).toBeCloseTo(1.583333333, 9);
    expect(pid.integralTimeS).toBeCloseTo(1.80952381, 8);
    expect(pid.derivativeTimeS).toBeCloseTo(0.307692308, 9);
  });
});

describe('Skogestad, SIMC 2003', () => {
  // the paper's examples: half rule, then settings (printed 5.5 and 0.8; 0.296 and 13.5)
  test('1/((s+1)(0.2s+1)): L 0.1, T 1.1', () => {
    const { gain, integralTimeS } = simcLag({ gain: 1, lagS: 1.1, delayS: 0.1 });
    expect(gain).toBeCloseTo(5.5, 9);
    expect(integralTimeS).toBeCloseTo(0.8, 9);
  });

  test('(0.17s+1)^2/(s(s+1)^2(0.028s+1)): L 1.69', () => {
    const { gain, integralTimeS } = simcIntegrating({ slope: 1, delayS: 1.69 });
    expect(gain).toBeCloseTo(0.296, 3);
    expect(integralTimeS).toBeCloseTo(13.5, 1);
  });

  test('integrating: Kc 0.5/(k L), Ti 8 L', () => {
    expect(simcIntegrating({ slope: 2, delayS: 0.25 })).toEqual({ gain: 1, integralTimeS: 2 });
  });

  test('double integrating, tc = L = 1: Kc 0.0625, Ti = Td = 8', () => {
    expect(simcDoubleIntegrating(1, 1)).toEqual({ gain: 0.0625, integralTimeS: 8, derivativeTimeS: 8 });
  });
});

// Formulas as coded in AlCap23/Thesis, Matlab/AMIGO_Tune.m (after Advanced PID Control, eq. 7.7 and 7.33), and alike in several other
// public repositories; the values are computed from them.
describe('Astrom and Hagglund, AMIGO 2004', () => {
  test('K = T = L = 1', () => {
    const { pi, pid } = amigoLag(unit);
    expect(pi.gain).toBeCloseTo(0.25, 12);
    expect(pi.integralTimeS).toBeCloseTo(1, 12);
    expect(pid.gain).toBeCloseTo(0.65, 12);
    expect(pid.integralTimeS).toBeCloseTo(1.090909091, 9);
    expect(pid.derivativeTimeS).toBeCloseTo(0.384615385, 9);
  });

  test('K 1.25, T 4, L 0.9', () => {
    const { pi, pid } = amigoLag(chau);
    expect(pi.gain).toBeCloseTo(0.831333241, 9);
    expect(pi.integralTimeS).toBeCloseTo(3.200771543, 9);
    expect(pid.gain).toBeCloseTo(1.76, 9);
    expect(pid.integralTimeS).toBeCloseTo(2.464615385, 9);
    expect(pid.derivativeTimeS).toBeCloseTo(0.421545667, 9);
  });

  test('integrating: the limit of a long lag', () => {
    const { pid } = amigoLag({ gain: 1e9, lagS: 1e9, delayS: 1 });
    expect(pid.gain).toBeCloseTo(0.45, 6);
    expect(pid.integralTimeS).toBeCloseTo(8, 6);
    expect(pid.derivativeTimeS).toBeCloseTo(0.5, 6);
    expect(amigoIntegrating({ slope: 1, delayS: 1 })).toEqual({
      gain: 0.45,
      integralTimeS: 8,
      derivativeTimeS: 0.5,
    });
  });
});
