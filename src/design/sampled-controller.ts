/** A controller as polynomials in z^-1, and its frequency response. */

/** Polynomials in z^-1, lowest power first; the denominator begins with 1. */
export interface SampledController {
  numerator: number[];
  denominator: number[];
  samplePeriodS: number;
}

/** Product of two polynomials. */
export function productOf(a: readonly number[], b: readonly number[]): number[] {
  const product = new Array<number>(a.length + b.length - 1).fill(0);
  a.forEach((x, i) => b.forEach((y, j) => (product[i + j] = (product[i + j] as number) + x * y)));
  return product;
}

/** Sum of two polynomials. */
export function sumOf(a: readonly number[], b: readonly number[]): number[] {
  return Array.from({ length: Math.max(a.length, b.length) }, (_, i) => (a[i] ?? 0) + (b[i] ?? 0));
}

/**
 * Response at a frequency.
 *
 * @param frequencyRadS above 0, at most pi / samplePeriodS
 * @returns [real, imaginary]
 */
export function controllerResponse(controller: SampledController, frequencyRadS: number): [number, number] {
  const angle = frequencyRadS * controller.samplePeriodS;
  const zr = Math.cos(angle);
  const zi = -Math.sin(angle);
  const [nr, ni] = polynomialAt(controller.numerator, zr, zi);
  const [dr, di] = polynomialAt(controller.denominator, zr, zi);
  const size = dr * dr + di * di;
  return [(nr * dr + ni * di) / size, (ni * dr - nr * di) / size];
}

/** Horner's rule, highest power first. */
function polynomialAt(coefficients: readonly number[], zr: number, zi: number): [number, number] {
  let re = 0;
  let im = 0;
  for (let i = coefficients.length - 1; i >= 0; i--) {
    const next = re * zr - im * zi + (coefficients[i] as number);
    im = re * zi + im * zr;
    re = next;
  }
  return [re, im];
}
