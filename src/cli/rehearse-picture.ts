/** The run of a rehearsal that is worth a picture, on the terminal or as a file. */
import type { Lane } from '../course/lane.js';
import type { EngineName, RunResult } from '../rehearsal/engine.js';
import { engineFrom } from '../rehearsal/engine-parts.js';
import { runSetup } from '../rehearsal/runner.js';
import type { Study } from '../rehearsal/study.js';
import { isUtf8Locale } from '../report/dot-canvas.js';
import type { DrivenRun } from '../report/driven-run.js';
import { driveSvg } from '../report/drive-svg.js';
import { runSummary } from '../report/rehearsal-text.js';
import { terminalPlot } from '../report/terminal-plot.js';
import type { Io } from './io.js';

export interface DrawnRun {
  result: RunResult;
  driven: DrivenRun;
}

/** The first run that was lost, or else the first, driven again for its trace. */
export async function drawnRun(
  results: readonly RunResult[],
  { parts, laps, faults }: Study,
  lane: Lane,
): Promise<DrawnRun | undefined> {
  const chosen = results.find((result) => result.loss !== undefined) ?? results[0];
  if (chosen === undefined) return undefined;
  const engine = await engineFrom(parts);
  const result = await engine.run(runSetup(parts.vehicle, lane, chosen.seed, laps, true, faults));
  const { trace, loss } = result;
  return trace && { result, driven: { lane, trace, ...(loss === undefined ? {} : { loss }) } };
}

/** Writes the picture whole or not at all. */
export async function writePicture(
  file: string,
  { result, driven }: DrawnRun,
  facts: { engine: EngineName; boundLapS: number },
  title: string,
): Promise<void> {
  const { default: writeFileAtomic } = await import('write-file-atomic');
  const summary = runSummary(result, facts.engine, facts.boundLapS);
  await writeFileAtomic(file, driveSvg(driven, { title, summary }));
}

export function plotOf({ driven }: DrawnRun, io: Io): string {
  return terminalPlot(driven, { columns: io.columns, unicode: isUtf8Locale(process.env) });
}
