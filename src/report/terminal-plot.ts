/**
 * A run in the terminal: the driven path from above, and the lateral error over time below it.
 *
 * The path is drawn whole, the lane dotted: where both agree, as they should, only the path is seen.
 */
import { CROSSING_LENGTH_M } from '../course/lane-strips.js';
import { mToMm } from '../sheet/units.js';
import { DotCanvas } from './dot-canvas.js';
import { extentOf, lanePoses, least, most, type DrivenRun } from './driven-run.js';

const MOST_MAP_ROWS = 22;
const ERROR_ROWS = 6;
/** Room for the numbers beside the error plot, characters. */
const MARGIN = 8;
/** Dots of the lane between two that are drawn. */
const LANE_DOT_STEP = 3;

export interface PlotOptions {
  /** Width of the terminal, characters; 80 are used at most, 40 at least. */
  columns: number;
  /** Braille dots; else plain ASCII. */
  unicode: boolean;
}

/** The whole picture, each line ended. */
export function terminalPlot(run: DrivenRun, options: PlotOptions): string {
  const columns = Math.min(79, Math.max(40, options.columns - 1));
  const lines = [
    ...mapLines(run, columns, options.unicode),
    '',
    'Lateral error of the axle, mm (above 0: left of the line), over time, s',
    ...errorLines(run, columns, options.unicode),
  ];
  return `${lines.join('\n')}\n`;
}

function mapLines(run: DrivenRun, columns: number, unicode: boolean): string[] {
  const { lane, trace, loss } = run;
  const extent = extentOf(run);
  const halfM = CROSSING_LENGTH_M / 2;
  const widthM = Math.max(extent.right - extent.left, 1e-3);
  const heightM = extent.top - extent.bottom;
  const dotsPerCell = unicode ? 4 : 2;
  const acrossPerM = (columns * (dotsPerCell / 2) - 1) / widthM;
  const downPerM = (MOST_MAP_ROWS * dotsPerCell - 1) / Math.max(heightM, 1e-3);
  const perM = Math.min(acrossPerM, downPerM);
  const rows = Math.floor((heightM * perM) / dotsPerCell) + 1;
  const canvas = new DotCanvas(columns, rows, unicode);
  const x = (xM: number): number => (xM - extent.left) * perM;
  const y = (yM: number): number => canvas.height - 1 - (yM - extent.bottom) * perM;

  for (const pose of lanePoses(lane, LANE_DOT_STEP / perM)) canvas.dot(x(pose.xM), y(pose.yM));
  for (const { xM, yM, headingRad } of lane.crossings) {
    const [dx, dy] = [-halfM * Math.sin(headingRad), halfM * Math.cos(headingRad)];
    canvas.line(x(xM - dx), y(yM - dy), x(xM + dx), y(yM + dy));
  }
  for (let i = 1; i < trace.timeS.length; i++) {
    canvas.line(x(trace.xM[i - 1]!), y(trace.yM[i - 1]!), x(trace.xM[i]!), y(trace.yM[i]!));
  }
  const marks = ['S start'];
  for (const crossing of lane.crossings) canvas.mark(x(crossing.xM), y(crossing.yM), '+');
  if (lane.crossings.length > 0) marks.push('+ crossing');
  const gaps = lane.pieces.filter((piece) => piece.kind === 'gap');
  for (const gap of gaps) {
    const middle = lane.poseAt(gap.startM + gap.lengthM / 2);
    canvas.mark(x(middle.xM), y(middle.yM), 'g');
  }
  if (gaps.length > 0) marks.push('g gap');
  canvas.mark(x(trace.xM[0] ?? 0), y(trace.yM[0] ?? 0), 'S');
  if (loss !== undefined) {
    canvas.mark(x(loss.xM), y(loss.yM), 'X');
    marks.push('X lost');
  }
  const scale = `Driven path: ${widthM.toFixed(2)} m by ${heightM.toFixed(2)} m`;
  return [`${scale}   ${marks.join('  ')}`, ...canvas.lines()];
}

function errorLines(run: DrivenRun, columns: number, unicode: boolean): string[] {
  const { timeS, lateralM } = run.trace;
  const canvas = new DotCanvas(columns - MARGIN, ERROR_ROWS, unicode);
  const endS = Math.max(timeS.at(-1) ?? 0, 1e-3);
  const limitM = Math.max(most(lateralM), -least(lateralM), 1e-3);
  const x = (s: number): number => (s / endS) * (canvas.width - 1);
  const y = (m: number): number => ((1 - m / limitM) / 2) * (canvas.height - 1);
  for (let dot = 0; dot < canvas.width; dot += 4) canvas.dot(dot, y(0));
  for (let i = 1; i < timeS.length; i++) {
    canvas.line(x(timeS[i - 1]!), y(lateralM[i - 1]!), x(timeS[i]!), y(lateralM[i]!));
  }
  const limit = mToMm(limitM).toFixed(1);
  const beside = [`+${limit}`, ...Array<string>(ERROR_ROWS - 2).fill(''), `-${limit}`];
  const bar = unicode ? '\u2502' : '|';
  const plot = canvas.lines().map((line, row) => `${(beside[row] ?? '').padStart(MARGIN - 2)} ${bar}${line}`);
  const end = endS.toFixed(1);
  return [...plot, `${' '.repeat(MARGIN)}0${end.padStart(columns - MARGIN - 1)}`];
}
