/** Two rehearsals side by side, for the terminal. */
import type { RehearsalReport } from '../rehearsal/metrics.js';
import type { Difference, PairedComparison } from '../rehearsal/paired-comparison.js';
import { fractionToPercent } from '../sheet/units.js';
import { ENGINE_WORDS } from './rehearsal-text.js';
import { table } from './text-table.js';

/** One of the two: how it is named, and how it drove. */
export interface ComparedSide {
  name: string;
  report: RehearsalReport;
}

/** Differences with a chance below this are told as such. */
const UNLIKELY_CHANCE = 0.05;

export function pairsText(
  first: ComparedSide,
  second: ComparedSide,
  pairs: PairedComparison,
  headline: string,
): string {
  const { runs, finish, lapS, firstMeanLapS, confidencePercent } = pairs;
  const seconds = (value: number | null) => (value === null ? '-' : `${value.toFixed(2)} s`);
  const mm = (value: number) => `${value.toFixed(1)} mm`;
  const share =
    lapS && firstMeanLapS ? ` (${signed(fractionToPercent(lapS.mean / firstMeanLapS), 1)} %)` : '';
  const rows = [
    ['', 'A', 'B', `B - A, mean of pairs (${confidencePercent.toFixed(0)} % interval)`],
    [
      'Finished',
      `${first.report.finished} of ${runs}`,
      `${second.report.finished} of ${runs}`,
      `only A ${finish.onlyFirst}, only B ${finish.onlySecond}`,
    ],
    ['Lap, median', seconds(first.report.lapS), seconds(second.report.lapS), words(lapS, 's', 3) + share],
    [
      'Lateral error, rms',
      mm(first.report.rmsLateralMm),
      mm(second.report.rmsLateralMm),
      words(pairs.rmsLateralMm, 'mm', 2),
    ],
    [
      'Lateral error, most',
      mm(first.report.maxLateralMm),
      mm(second.report.maxLateralMm),
      words(pairs.maxLateralMm, 'mm', 1),
    ],
  ];
  const names = [first, second].map(
    ({ name, report }, i) => `${'AB'[i]}: ${name}, with ${ENGINE_WORDS[report.engine]}`,
  );
  return `${names.join('\n')}\n${headline}\n\n${table(rows)}\n${verdict(pairs)}\n`;
}

function signed(value: number, digits: number): string {
  return `${value < 0 ? '' : '+'}${value.toFixed(digits)}`;
}

function words(difference: Difference | null, unit: string, digits: number): string {
  if (difference === null) return 'too few pairs';
  const { mean, low, high } = difference;
  return `${signed(mean, digits)} ${unit} (${signed(low, digits)} to ${signed(high, digits)})`;
}

function verdict({ finish, lapS, confidencePercent }: PairedComparison): string {
  const { onlyFirst, onlySecond, chance } = finish;
  const better = onlyFirst > onlySecond ? 'A' : 'B';
  const rate =
    onlyFirst + onlySecond === 0
      ? 'Both finish the same runs.'
      : chance < UNLIKELY_CHANCE
        ? `${better} finishes more often: by chance alone so uneven a split comes with a probability of ${chance.toPrecision(2)}.`
        : `That one finishes more often may be chance (probability ${chance.toPrecision(2)}).`;
  const isClear = lapS !== null && (lapS.low > 0 || lapS.high < 0);
  const lap =
    lapS === null
      ? 'Laps cannot be compared.'
      : isClear
        ? `${lapS.mean < 0 ? 'B' : 'A'} is the faster one.`
        : `No difference in lap time can be told with ${confidencePercent.toFixed(0)} % confidence.`;
  return `${rate} ${lap}`;
}
