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
const BISECTIONS = 5;
/** Caps below the largest passing one that are tried too. */
const SLOWER_TOPS = [0.95, 0.89];
/** Slowest cap tried, as a share of full wheel speed. */
export const LOWEST_TOP_SHARE = 0.25;

/**
 * The scale with the shortest time, share by share until it gets no shorter.
 *
 * @param timeAt time that a scale gives, s; undefined where it does not pass
 */
export function quickestScale(
  shares: readonly number[],
  topSpeedMps: number,
  timeAt: (scale: SpeedScale) => number | undefined,
): Timed | undefined {
  let best: Timed | undefined;
  for (const share of shares) {
    const found = quickestTop(share, topSpeedMps, timeAt);
    if (found && (best === undefined || found.timeS < best.timeS)) best = found;
    else if (best) break;
  }
  return best;
}

/** For one share, the cap with the shortest time: the largest that passes, or one a little below it. */
function quickestTop(
  share: number,
  topSpeedMps: number,
  timeAt: (scale: SpeedScale) => number | undefined,
): Timed | undefined {
  let low = LOWEST_TOP_SHARE * topSpeedMps;
  let high = topSpeedMps;
  let best: Timed | undefined;
  const tryTop = (top: number): boolean => {
    const scale = { top, share };
    const timeS = timeAt(scale);
    if (timeS !== undefined && (best === undefined || timeS < best.timeS)) best = { scale, timeS };
    return timeS !== undefined;
  };
  let largest = tryTop(topSpeedMps) ? topSpeedMps : undefined;
  for (let i = 0; largest !== topSpeedMps && i < BISECTIONS; i++) {
    const top = (low + high) / 2;
    if (tryTop(top)) largest = low = top;
    else high = top;
  }
  // entering bends too fast costs more than the straights gain: the fastest cap need not be the quickest
  if (largest !== undefined) for (const factor of SLOWER_TOPS) tryTop(factor * largest);
  return best;
}
