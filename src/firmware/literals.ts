/**
 * The one place that writes a number into emitted code.
 *
 * Only integers reach the firmware; each has a type, and what does not fit its type is refused, because a wrapped
 * constant would drive a wheel. C++: a decimal literal takes the first of int, long, long long that holds it
 * (C++11 2.14.2); on the AVR int has 16 bits, so a suffix says what the reader should know.
 * MicroPython: an integer of 31 bits lives in one machine word; a larger one is put on the heap (py/smallint.h), which
 * a control loop must not do.
 */
export type IntegerType = 'int8_t' | 'uint8_t' | 'int16_t' | 'uint16_t' | 'int32_t' | 'uint32_t';

export type Language = 'cpp' | 'python';

const LIMITS: Readonly<Record<IntegerType, readonly [least: number, most: number]>> = {
  int8_t: [-128, 127],
  uint8_t: [0, 255],
  int16_t: [-32768, 32767],
  uint16_t: [0, 65535],
  int32_t: [-2147483648, 2147483647],
  uint32_t: [0, 4294967295],
};

const SMALL_INT_MAX = 2 ** 30 - 1;

/** Thrown when a number cannot be written as what it is declared to be: a defect of the design, not of the sheet. */
export class LiteralError extends RangeError {
  override readonly name = 'LiteralError';
}

function check(value: number, type: IntegerType): void {
  const [least, most] = LIMITS[type];
  if (!Number.isInteger(value)) throw new LiteralError(`${value} is not an integer, as ${type} needs.`);
  if (value < least || value > most)
    throw new LiteralError(`${value} does not fit ${type} (${least} to ${most}).`);
}

function cppInteger(value: number, type: IntegerType): string {
  if (type === 'uint32_t') return `${value}UL`;
  if (type !== 'int32_t') return `${value}`;
  // The literal 2147483648 has no 32-bit type, so the least value is written as a difference.
  if (value === LIMITS.int32_t[0]) return '(-2147483647L - 1)';
  return `${value}L`;
}

function pythonInteger(value: number): string {
  if (Math.abs(value) > SMALL_INT_MAX)
    throw new LiteralError(`${value} does not fit a MicroPython small integer (31 bits).`);
  return `${value}`;
}

/**
 * The literal of one integer.
 *
 * @throws LiteralError for NaN, infinities, fractions and numbers outside the type
 */
export function literal(value: number, type: IntegerType, language: Language): string {
  check(value, type);
  // Adding zero turns -0 into 0.
  const plain = value + 0;
  return language === 'cpp' ? cppInteger(plain, type) : pythonInteger(plain);
}

/** The smallest of int16_t and int32_t that holds all the values; RAM is short on small boards. */
export function signedTypeOf(values: readonly number[]): 'int16_t' | 'int32_t' {
  const [least, most] = LIMITS.int16_t;
  return values.every((value) => value >= least && value <= most) ? 'int16_t' : 'int32_t';
}

/**
 * A measured or computed number for people, in a comment: shortest form at the given significant digits.
 *
 * @throws LiteralError for NaN and infinities
 */
export function numberText(value: number, significantDigits = 4): string {
  if (!Number.isFinite(value)) throw new LiteralError(`${value} cannot be written as a number.`);
  return String(Number(value.toPrecision(significantDigits)) + 0);
}
