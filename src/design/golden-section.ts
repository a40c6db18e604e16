/** A minimum between two places, by golden section: each step asks once and narrows the range to 0.618 of it (Kiefer 1953). */

export interface Minimum {
  at: number;
  value: number;
}

/** Where `f` is least between `low` and `high`, if it has one minimum there; the left one of two equal values counts. */
export function leastBetween(f: (x: number) => number, low: number, high: number, steps: number): Minimum {
  const ratio = (Math.sqrt(5) - 1) / 2;
  let a = low;
  let b = high;
  let c = b - ratio * (b - a);
  let d = a + ratio * (b - a);
  let fc = f(c);
  let fd = f(d);
  for (let i = 0; i < steps; i++) {
    if (fc <= fd) {
      [b, d, fd] = [d, c, fc];
      c = b - ratio * (b - a);
      fc = f(c);
    } else {
      [a, c, fc] = [c, d, fd];
      d = a + ratio * (b - a);
      fd = f(d);
    }
  }
  return fc <= fd ? { at: c, value: fc } : { at: d, value: fd };
}
