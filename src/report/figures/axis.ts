/** Axes: from a value to its place in px, linear or logarithmic, with the values that are written beside them. */
import { niceStep } from '../axis-steps.js';

export interface Tick {
  value: number;
  /** Empty where the grid has a line without a number. */
  label: string;
}

export interface Axis {
  /** Ends of the axis, in its unit, rising. */
  readonly from: number;
  readonly to: number;
  /** Place of a value, px; values beyond the ends lie beyond the plot. */
  readonly at: (value: number) => number;
  readonly ticks: readonly Tick[];
}

export interface AxisEnds {
  from: number;
  to: number;
  /** Places of the ends, px. */
  fromPx: number;
  toPx: number;
}

const ROUNDING = 1e-9;

/** The shortest decimal number without what binary fractions add. */
function plain(value: number): string {
  return String(Number(value.toPrecision(6)) + 0);
}

/** @param step distance of the numbers; by default about six of them */
export function linearAxis({ from, to, fromPx, toPx }: AxisEnds, step = niceStep(to - from, 6)): Axis {
  const first = Math.ceil(from / step - ROUNDING);
  const last = Math.floor(to / step + ROUNDING);
  const ticks = Array.from({ length: last - first + 1 }, (_, i) => {
    const value = (first + i) * step;
    return { value, label: plain(value) };
  });
  return { from, to, ticks, at: (value) => fromPx + ((value - from) / (to - from)) * (toPx - fromPx) };
}

/** Digits that are numbered, by the width of a decade from which there is room for them, px. */
const NUMBERED: readonly { decadePx: number; digits: readonly number[] }[] = [
  { decadePx: 450, digits: [1, 2, 3, 4, 5, 6, 7, 8, 9] },
  { decadePx: 130, digits: [1, 2, 5] },
  { decadePx: 0, digits: [1] },
];

/** @throws RangeError unless both ends are above 0 */
export function logAxis({ from, to, fromPx, toPx }: AxisEnds): Axis {
  if (!(from > 0 && to > from)) throw new RangeError('A logarithmic axis runs from above 0 upward.');
  const decades = Math.log10(to / from);
  const room = Math.abs(toPx - fromPx) / decades;
  const numbered = NUMBERED.find(({ decadePx }) => room >= decadePx)?.digits ?? [];
  const ticks: Tick[] = [];
  for (let power = Math.floor(Math.log10(from)); 10 ** power <= to; power++) {
    for (let digit = 1; digit <= 9; digit++) {
      const value = digit * 10 ** power;
      if (value < from * (1 - ROUNDING) || value > to * (1 + ROUNDING)) continue;
      ticks.push({ value, label: numbered.includes(digit) ? plain(value) : '' });
    }
  }
  const at = (value: number) => fromPx + (Math.log10(value / from) / decades) * (toPx - fromPx);
  return { from, to, ticks, at };
}
