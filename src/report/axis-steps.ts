/** Numbers along an axis. */

/** A step of 1, 2 or 5 times a power of ten that cuts a range into about so many parts. */
export function niceStep(range: number, parts: number): number {
  const rough = range / parts;
  const power = 10 ** Math.floor(Math.log10(rough));
  const factor = [1, 2, 5, 10].find((candidate) => candidate * power >= rough * (1 - 1e-9)) ?? 10;
  return factor * power;
}
