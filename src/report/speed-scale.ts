/**
 * Speeds as strokes: five steps from slow to fast, dark and broad to bright and thin.
 *
 * Lightness rises evenly (CIE L* about 14, 31, 45, 57, 67) while the stroke gets thinner, so that the order can be read without colour as
 * well; no two neighbours differ in hue alone.
 */

export interface SpeedStep {
  /** Upper end of the step, m/s; the last one's is the fastest. */
  upToMps: number;
  label: string;
  color: string;
  /** Stroke width, px. */
  width: number;
}

const STROKES = [
  { color: '#231a4c', width: 5 },
  { color: '#1d4a80', width: 4.2 },
  { color: '#1f7770', width: 3.6 },
  { color: '#5b9440', width: 3 },
  { color: '#d69a1e', width: 2.4 },
] as const;

/** The colours, from slow to fast. */
export const SPEED_INKS: readonly string[] = STROKES.map(({ color }) => color);

/** Steps are a multiple of this wide, m/s. */
const ROUND_MPS = 0.05;

/** Share of the samples, the slowest, that the scale does not resolve: the run-up from standing. */
const SLOWEST_SHARE = 0.05;

/** Steps of even width that cover the speeds of a run, m/s; the first and the last are open. */
export function speedSteps(speedsMps: Float64Array): SpeedStep[] {
  const sorted = speedsMps.toSorted();
  const low = Math.max(0, sorted[Math.floor(sorted.length * SLOWEST_SHARE)] ?? 0);
  const start = Math.floor(low / ROUND_MPS + 1e-9) * ROUND_MPS;
  const range = Math.max((sorted.at(-1) ?? 0) - start, ROUND_MPS);
  const step = Math.ceil(range / STROKES.length / ROUND_MPS - 1e-9) * ROUND_MPS;
  const count = Math.max(2, Math.ceil(range / step - 1e-9));
  return Array.from({ length: count }, (_, i) => {
    const [from, to] = [(start + i * step).toFixed(2), (start + (i + 1) * step).toFixed(2)];
    const isLast = i === count - 1;
    return {
      upToMps: isLast ? Infinity : start + (i + 1) * step,
      label: i === 0 ? `below ${to}` : isLast ? `above ${from}` : `${from} to ${to}`,
      ...STROKES[Math.round((i * (STROKES.length - 1)) / (count - 1))]!,
    };
  });
}

/** The step that a speed belongs to. */
export function stepOf(steps: readonly SpeedStep[], speedMps: number): number {
  const found = steps.findIndex((step) => speedMps < step.upToMps);
  return found < 0 ? steps.length - 1 : found;
}
