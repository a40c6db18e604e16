import fc from 'fast-check';

/** A number from `min` to `max` with the given decimals, as a person would write it. */
export function decimal(min: number, max: number, decimals = 1): fc.Arbitrary<number> {
  const scale = 10 ** decimals;
  return fc.integer({ min: Math.ceil(min * scale), max: Math.floor(max * scale) }).map((n) => n / scale);
}
