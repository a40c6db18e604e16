/** Largest magnitude of one intermediate. */
export interface Bound {
  name: string;
  magnitude: number;
  /** Largest magnitude allowed where it is less than the machine's integers, for what C++ stores in 16 bits. */
  limit?: number;
}

/** The largest magnitude among values; 0 for none. */
export const largest = (values: readonly number[]): number => Math.max(0, ...values.map(Math.abs));
