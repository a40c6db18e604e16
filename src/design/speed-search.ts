/** The screening of speeds: which cap and share of the class speeds is the quickest of those that pass. */

/** Scales on class speeds. */
export interface SpeedScale {
  /** No class is faster, m/s. */
  top: number;
  /** Factor on every class speed, at most 1. */
  share: number;
}

/** A scale and the mean time that it gives. */
export interface Timed {
  scale: SpeedScale;
  timeS: number;
}

export const SHARES: readonly number[] = [1, 0.95, 0.9, 0.84, 0.77, 0.7];
/** Caps are told apart to this share of full wheel speed. */
const TOP_STEP_SHARE = 0.025;
/** The largest cap that passes, and caps below it that are timed too: entering bends too fast costs more than the straights gain. */
const TIMED_TOPS = [1, 0.95, 0.89];
/** Slowest cap tried, as a share of full wheel speed. */
export const LOWEST_TOP_SHARE = 0.25;

/** What the search asks of a scale. */
export interface Trials {
  /** Whether the demanding vehicles finish. */
  readonly passes: (scale: SpeedScale) => boolean;
  /** Mean time of typical vehicles, s; undefined when one does not finish. */
  readonly timeS: (scale: SpeedScale) => number | undefined;
}

/**
 * The scale with the shortest time, share by share until it gets no shorter.
 *
 * Taken for granted: what passes goes on passing when cap or share are lowered. Where it does not, the confirmation finds out.
 */
export function quickestScale(
  shares: readonly number[],
  topSpeedMps: number,
  trials: Trials,
): Timed | undefined {
  let best: Timed | undefined;
  let largest: number | undefined;
  for (const share of shares) {
    largest = largestTop(share, topSpeedMps, largest, trials);
    if (largest === undefined) continue;
    const found = quickestTop(share, largest, trials);
    if (found && (best === undefined || found.timeS < best.timeS)) best = found;
    else if (best) break;
  }
  return best;
}

/** The largest cap that passes with a share, by bisection; `known` passes with a larger share. */
function largestTop(
  share: number,
  topSpeedMps: number,
  known: number | undefined,
  { passes }: Trials,
): number | undefined {
  if (known === topSpeedMps || passes({ top: topSpeedMps, share })) return topSpeedMps;
  let low = known ?? LOWEST_TOP_SHARE * topSpeedMps;
  let high = topSpeedMps;
  let largest = known;
  while (high - low > TOP_STEP_SHARE * topSpeedMps) {
    const top = (low + high) / 2;
    if (passes({ top, share })) largest = low = top;
    else high = top;
  }
  return largest;
}

/** For one share, the cap with the shortest time: the largest that passes, or one a little below it. */
function quickestTop(share: number, largest: number, { timeS }: Trials): Timed | undefined {
  let best: Timed | undefined;
  for (const factor of TIMED_TOPS) {
    const scale = { top: factor * largest, share };
    const time = timeS(scale);
    if (time !== undefined && (best === undefined || time < best.timeS)) best = { scale, timeS: time };
  }
  return best;
}
