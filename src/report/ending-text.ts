/** How runs with faults ended, for the terminal. */
import type { ControllerConstants } from '../controller/constants.js';
import { lineLossBoundS } from '../design/line-loss.js';
import { reasonWords } from '../firmware/header.js';
import type { Ending } from '../rehearsal/ending.js';
import type { RehearsalReport } from '../rehearsal/metrics.js';
import { sToMs } from '../sheet/units.js';
import { table } from './text-table.js';

/** Runs told one by one. */
const MOST_TOLD = 20;

function motorsWords({ motorsOff, reactionS, restarted }: Ending): string {
  if (!motorsOff || reactionS === null) return 'on to the end';
  const off = `off after ${sToMs(reactionS).toFixed(0)} ms`;
  return restarted ? `${off}, DRIVEN AGAIN` : off;
}

/** A table of the runs, each line ended. */
export function endingText({ list }: RehearsalReport, controller: ControllerConstants): string {
  const told = list.flatMap(({ seed, finished, ending }) => (ending ? [{ seed, finished, ending }] : []));
  const rows = told.slice(0, MOST_TOLD).map(({ seed, finished, ending }) => {
    const reason = ending.reason === null ? '' : reasonWords(ending.reason);
    return [String(seed), finished ? 'yes' : 'no', motorsWords(ending), reason];
  });
  const more = told.length > MOST_TOLD ? `and ${told.length - MOST_TOLD} more\n` : '';
  const off = told.filter(({ ending }) => ending.motorsOff).map(({ ending }) => ending.reactionS ?? 0);
  const slowest =
    off.length > 1
      ? `Motors off in ${off.length} runs, after at most ${sToMs(Math.max(...off)).toFixed(0)} ms.\n`
      : '';
  return `${table([['Seed', 'finished', 'motors', 'reason'], ...rows])}\n${more}${slowest}Line lost for good at class speed: motors off within ${lineLossBoundS(controller).toFixed(2)} s, by the memory of the line.\n`;
}
