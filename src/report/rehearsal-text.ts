/** The outcome of a rehearsal in words and figures, for the terminal. */
import type { Lane } from '../course/lane.js';
import type { LanePiece } from '../course/layout.js';
import type { EngineName, LossReason, RunResult } from '../rehearsal/engine.js';
import { countedLapsS, median, type RehearsalReport, type RunRecord } from '../rehearsal/metrics.js';
import { mmToM, mToMm } from '../sheet/units.js';
import { table } from './text-table.js';

/** Lost runs that are told one by one. */
const MOST_LOST = 10;

/** What drives, in words. */
export const ENGINE_WORDS: Readonly<Record<EngineName, string>> = {
  twin: 'the twin of the controller',
  chip: 'the compiled firmware on the emulated chip',
  micropython: 'the firmware in the MicroPython interpreter',
};

export const REASONS: Readonly<Record<LossReason, string>> = {
  'off-lane': 'off the lane',
  stopped: 'firmware stopped',
  'no-progress': 'no progress',
  'time-limit': 'time limit',
};

export interface RehearsalNames {
  vehicle: string;
  course: string;
  laps: number;
}

/** What was driven, in two lines. */
export function headline(report: RehearsalReport, lane: Lane, names: RehearsalNames): string {
  const laps = `${names.laps} ${names.laps === 1 ? 'lap' : 'laps'} of ${lane.lengthM.toFixed(2)} m`;
  const way = lane.closed ? laps : `an open lane of ${lane.lengthM.toFixed(2)} m`;
  const runs = report.runs === 1 ? seedWords(report.seed) : `${report.runs} ${seedRange(report)}`;
  return `${names.vehicle} on ${names.course}, with ${ENGINE_WORDS[report.engine]}\n${way}; ${runs}`;
}

/** The whole outcome, each line ended. */
export function rehearsalText(report: RehearsalReport, lane: Lane, names: RehearsalNames): string {
  const rows = [['Finished', finishedWords(report)]];
  const isFlying = report.list.some((run) => run.finished && run.lapsS.length > 1);
  if (report.lapS !== null && report.ratio !== null) {
    const label = lane.closed ? (isFlying ? 'Flying lap' : 'Lap from standing') : 'Time';
    const median = report.finished > 1 ? ', median' : '';
    const bound = `${report.ratio.toFixed(2)} times the physical bound of ${report.boundLapS.toFixed(2)} s`;
    rows.push([label, `${report.lapS.toFixed(2)} s${median}; ${bound}`]);
    if (report.finished > 1) rows.push(['Quickest, slowest', extremes(report)]);
    const standing = report.list.find((run) => run.lapsS.length > 1)?.lapsS[0];
    if (report.runs === 1 && standing !== undefined) rows.push(['From standing', `${standing.toFixed(2)} s`]);
  }
  const error = `${report.rmsLateralMm.toFixed(1)} mm rms, ${report.maxLateralMm.toFixed(1)} mm at most`;
  rows.push(['Lateral error', error]);
  return `${headline(report, lane, names)}\n\n${table(rows)}\n${lostText(report, lane)}`;
}

/** One run in one line, for its picture. */
export function runSummary(result: RunResult, engine: EngineName, boundLapS: number): string {
  const lapS = median(countedLapsS(result));
  const { loss } = result;
  const verdict =
    loss === undefined ? 'finished' : `lost after ${loss.timeS.toFixed(2)} s: ${REASONS[loss.reason]}`;
  const kind = result.lapsS.length > 1 ? 'flying lap' : 'lap from standing';
  const lap =
    lapS === undefined
      ? []
      : [`${kind} ${lapS.toFixed(2)} s, ${(lapS / boundLapS).toFixed(2)} times the bound`];
  const error = `lateral error ${mToMm(result.rmsLateralM).toFixed(1)} mm rms, ${mToMm(result.maxLateralM).toFixed(1)} mm at most`;
  return [`${engine}, seed ${result.seed}: ${verdict}`, ...lap, error].join('; ');
}

export function finishedWords({ runs, finished, finishRate }: RehearsalReport): string {
  if (finishRate === null) return finished === 1 ? 'yes' : 'no, lost';
  const { confidencePercent } = finishRate;
  return `${finished} of ${runs}: ${rangeWords(finishRate, runs)} % with ${confidencePercent.toFixed(0)} % confidence`;
}

/** An interval with as many digits as so many runs can tell apart. */
function rangeWords(
  { lowPercent, highPercent }: { lowPercent: number; highPercent: number },
  runs: number,
): string {
  const digits = runs < 10_000 ? 1 : 2;
  return `${lowPercent.toFixed(digits)} to ${highPercent.toFixed(digits)}`;
}

export function extremes(report: RehearsalReport): string {
  const laps = report.list.flatMap((run) => (run.finished && run.lapS !== null ? [run.lapS] : []));
  return `${Math.min(...laps).toFixed(2)} s, ${Math.max(...laps).toFixed(2)} s`;
}

function lostText(report: RehearsalReport, lane: Lane): string {
  const lost = report.list.filter((run) => !run.finished);
  if (lost.length === 0) return '';
  const rows = lost.slice(0, MOST_LOST).map((run) => {
    return [
      String(run.seed),
      `${run.timeS.toFixed(2)} s`,
      placeWords(run, lane),
      run.reason ? REASONS[run.reason] : '',
    ];
  });
  const lines = ['', table([['Lost seed', 'after', 'where', 'why'], ...rows])];
  if (lost.length > MOST_LOST) lines.push(`and ${lost.length - MOST_LOST} more`);
  const broken = lost.find((run) => run.detail !== undefined);
  if (broken) lines.push(`What the firmware said, seed ${broken.seed}:`, broken.detail?.trimEnd() ?? '');
  if (report.runs > 1)
    lines.push(`One run alone: the same command with --runs 1 --seed ${lost[0]?.seed ?? 0}`);
  return `${lines.join('\n')}\n`;
}

function seedWords(seed: number): string {
  return seed === 0 ? 'the vehicle just as in the sheet' : `vehicle drawn by seed ${seed}`;
}

function seedRange({ seed, runs }: RehearsalReport): string {
  return `vehicles drawn by seeds ${seed} to ${seed + runs - 1}`;
}

/** Where on the lane a run was lost: "lap 2, 1.84 m, left bend of 120 mm". */
export function placeWords(run: RunRecord, lane: Lane): string {
  const atM = mmToM(run.lostAtMm ?? 0);
  const piece = lane.pieces.findLast((candidate) => candidate.startM <= atM) ?? lane.pieces[0];
  const kind = piece === undefined ? 'straight' : pieceWords(piece);
  const lap = lane.closed ? `lap ${run.lostInLap ?? 1}, ` : '';
  return `${lap}${atM.toFixed(2)} m, ${kind}`;
}

/** "left bend of 120 mm", "straight", "gap". */
export function pieceWords({ kind, curvaturePerM }: LanePiece): string {
  if (kind !== 'arc') return kind;
  return `${curvaturePerM > 0 ? 'left' : 'right'} bend of ${mToMm(1 / Math.abs(curvaturePerM)).toFixed(0)} mm`;
}
