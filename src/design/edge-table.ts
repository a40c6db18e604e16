/**
 * Where an edge of the line lies between two sensors, by the sum of what they see.
 *
 * A sensor sees a disc of radius r. If a straight edge passes at distance d from the disc's centre, with the
 * line on the near side, the covered share of the disc is A(d / r) (vehicle/sensor-bar.ts, discShare).
 *
 * Between two sensors a distance 2 g apart, with the edge at x from the middle, the two coverages add up to
 * S(x) = A((x + g)/r) + A((x - g)/r), which rises with x. The table is its inverse. Where spots do not
 * touch, S keeps the value 1 while the edge crosses the blind part; the table passes through its middle.
 */
import { EDGE_BITS, EDGE_ENTRIES, EDGE_STEP_BITS, FULL_COVERAGE } from '../controller/constants.js';
import { discShare } from '../vehicle/sensor-bar.js';
import { INT16_MAX } from './scales.js';

/** Edge position from the middle of the gap, in half gaps, at which two sensors see `sum` (0..2) together. */
function edgeAt(sum: number, spotInHalfGaps: number): number {
  const seen = (x: number) => discShare((x + 1) / spotInHalfGaps) + discShare((x - 1) / spotInHalfGaps);
  const bound = (towards: 1 | -1): number => {
    // outermost x still on the given side of the sum; the two differ only on a level stretch
    let low = -1 - spotInHalfGaps;
    let high = 1 + spotInHalfGaps;
    for (let i = 0; i < 60; i++) {
      const middle = (low + high) / 2;
      const below = towards > 0 ? seen(middle) <= sum : seen(middle) < sum;
      if (below) low = middle;
      else high = middle;
    }
    return (low + high) / 2;
  };
  return (bound(1) + bound(-1)) / 2;
}

/**
 * The firmware's edge table.
 *
 * @param spotRadiusM radius of a sensor's spot
 * @param pitchM distance between neighbouring sensors (the mean, where it varies)
 * @returns EDGE_ENTRIES integers, in 1/2^EDGE_BITS of half the distance between the sensors; places that only the ends of
 *   very large spots reach, where no edge is looked for, are cut to 16 bits
 */
export function edgeTable(spotRadiusM: number, pitchM: number): number[] {
  const spot = spotRadiusM / (pitchM / 2);
  const middle = (EDGE_ENTRIES - 1) / 2;
  return Array.from({ length: EDGE_ENTRIES }, (_, i) => {
    // odd about the middle, to the last bit
    const above = Math.abs(i - middle) + middle;
    const sum = Math.min(2, ((above << EDGE_STEP_BITS) - 1) / FULL_COVERAGE);
    const place = Math.min(INT16_MAX, Math.round(edgeAt(sum, spot) * (1 << EDGE_BITS)));
    return i < middle ? -place : place;
  });
}
