/** Reads an option that takes a whole number. */
import { InvalidArgumentError } from 'commander';

/** A parser for commander that takes whole numbers from `least` to `most`. */
export function wholeNumber(least: number, most: number): (text: string) => number {
  return (text) => {
    const value = /^\d+$/.test(text) ? Number(text) : Number.NaN;
    if (!(value >= least && value <= most)) {
      throw new InvalidArgumentError(`It takes a whole number from ${least} to ${most}.`);
    }
    return value;
  };
}
