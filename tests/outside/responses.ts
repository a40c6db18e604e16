/** Frequency responses of loops as textbooks write them, for the checks of margins. */
import type { Response } from '../../src/design/margins.js';

export type Complex = [number, number];

export const plus = ([a, b]: Complex, [c, d]: Complex): Complex => [a + c, b + d];

export const times = ([a, b]: Complex, [c, d]: Complex): Complex => [a * c - b * d, a * d + b * c];

export const over = ([a, b]: Complex, [c, d]: Complex): Complex => {
  const size = c * c + d * d;
  return [(a * c + b * d) / size, (b * c - a * d) / size];
};

/** Value of a polynomial, highest power first. */
export function polynomial(coefficients: readonly number[], at: Complex): Complex {
  return coefficients.reduce<Complex>((sum, c) => plus(times(sum, at), [c, 0]), [0, 0]);
}

/** A ratio of polynomials in s, highest power first. */
export const rational =
  (numerator: readonly number[], denominator: readonly number[]): Response =>
  (w) =>
    over(polynomial(numerator, [0, w]), polynomial(denominator, [0, w]));

/** A ratio of polynomials in z, highest power first, for a sample period in s. */
export const sampledRational =
  (numerator: readonly number[], denominator: readonly number[], periodS: number): Response =>
  (w) => {
    const z: Complex = [Math.cos(w * periodS), Math.sin(w * periodS)];
    return over(polynomial(numerator, z), polynomial(denominator, z));
  };

/** The same response after a delay. */
export const delayed =
  (loop: Response, delayS: number): Response =>
  (w) =>
    times(loop(w), [Math.cos(w * delayS), -Math.sin(w * delayS)]);

/** Product of polynomials, highest power first. */
export function product(...factors: readonly (readonly number[])[]): number[] {
  return factors.reduce<number[]>(
    (whole, factor) => {
      const next = new Array<number>(whole.length + factor.length - 1).fill(0);
      whole.forEach((a, i) => factor.forEach((b, j) => (next[i + j]! += a * b)));
      return next;
    },
    [1],
  );
}
