/** Speed against finish rate, for the terminal: a row for each scale of the class speeds. */
import type { CurvePoint } from '../rehearsal/speed-curve.js';
import { table } from './text-table.js';

/** Length of the longest bar, characters. */
const BAR = 24;

/** @param targetPercent finish target of the sheet */
export function curveText(points: readonly CurvePoint[], boundLapS: number, targetPercent: number): string {
  const rows = points.map(({ factor, runs, finished, finishedPercent, lowPercent, highPercent, lapS }) => [
    factor.toFixed(2),
    `${finished} of ${runs}`,
    `${lowPercent.toFixed(1)} to ${highPercent.toFixed(1)} %`,
    lapS === null ? '-' : `${lapS.toFixed(2)} s`,
    lapS === null ? '-' : (lapS / boundLapS).toFixed(2),
    '#'.repeat(Math.round((finishedPercent / 100) * BAR)),
  ]);
  const head = ['speeds', 'finished', '95 % interval', 'lap, median', 'over bound', 'finish rate'];
  const kept = points.filter(({ finishedPercent }) => finishedPercent >= targetPercent);
  const fastest = kept.at(-1);
  const verdict =
    fastest === undefined
      ? `At none of these speeds ${targetPercent} % finish.`
      : `Up to ${fastest.factor.toFixed(2)} times the design's speeds ${targetPercent} % or more finish here.`;
  return `${table([head, ...rows])}\nSpeeds over those of the design, 1.00. ${verdict}\n`;
}
