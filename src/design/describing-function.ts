/**
 * Limit cycles of a rule table by the describing function.
 *
 * A table makes an odd staircase of the offset: curvature jumps by d_i where the offset passes x_i > 0. To a
 * sine of amplitude A it answers with a first harmonic of gain
 *
 *   N(A) = 4 / (pi A) sum over x_i < A of d_i sqrt(1 - (x_i / A)^2)
 *
 * (a relay is the case of one step d at 0: N = 4 d / (pi A)). With the linear rest of the loop, of response
 * M(jw) per unit of curvature per offset, the loop holds a cycle where N(A) M(jw) = -1: at the frequencies w
 * where M is real and negative, and the amplitudes where N(A) = 1 / |M|. Source: Gelb and Vander Velde,
 * Multiple-Input Describing Functions, 1968; Astrom and Hagglund 1984 for the relay.
 */

/** One jump of an odd staircase. */
export interface Step {
  /** Where the input passes it, from 0 on. */
  at: number;
  height: number;
}

/** Gain of the first harmonic for a sine of amplitude `amplitude` (above 0). */
export function describingGain(steps: readonly Step[], amplitude: number): number {
  let sum = 0;
  for (const { at, height } of steps) {
    if (at < amplitude) sum += height * Math.sqrt(1 - (at / amplitude) ** 2);
  }
  return (4 * sum) / (Math.PI * amplitude);
}

/** A predicted cycle. */
export interface LimitCycle {
  /** Amplitude of the input, in its unit. */
  amplitude: number;
  frequencyRadS: number;
}

const AMPLITUDES = 4000;

/**
 * Amplitudes at which the staircase has a given gain and a growing oscillation would lower it: stable cycles.
 *
 * @param gain gain at which the loop just oscillates
 * @param largest largest amplitude looked at
 */
export function cycleAmplitudes(steps: readonly Step[], gain: number, largest: number): number[] {
  const found: number[] = [];
  let before = largest / AMPLITUDES;
  let gainBefore = describingGain(steps, before);
  for (let i = 2; i <= AMPLITUDES; i++) {
    const amplitude = (largest * i) / AMPLITUDES;
    const here = describingGain(steps, amplitude);
    if (gainBefore >= gain && here < gain) {
      let [low, high] = [before, amplitude];
      for (let k = 0; k < 60; k++) {
        const middle = (low + high) / 2;
        if (describingGain(steps, middle) >= gain) low = middle;
        else high = middle;
      }
      found.push((low + high) / 2);
    }
    [before, gainBefore] = [amplitude, here];
  }
  return found;
}

/** Largest gain of a staircase over amplitudes up to `largest`. */
export function largestGain(steps: readonly Step[], largest: number): number {
  let most = 0;
  for (let i = 1; i <= AMPLITUDES; i++)
    most = Math.max(most, describingGain(steps, (largest * i) / AMPLITUDES));
  return most;
}
