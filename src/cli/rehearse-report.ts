/** `rehearse --report`: the HTML report of a study. Runs that are shown whole are driven again for their traces. */
import { readFile } from 'node:fs/promises';
import { basename } from 'node:path';
import type { Lane } from '../course/lane.js';
import type { Design } from '../design/design.js';
import type { Engine, RunResult } from '../rehearsal/engine.js';
import { engineFrom } from '../rehearsal/engine-parts.js';
import { runSetup } from '../rehearsal/runner.js';
import type { Study, StudyReport } from '../rehearsal/study.js';
import { ErrorBandSum } from '../report/html/error-band.js';
import { reportHtml } from '../report/html/page.js';
import type { ReportAssets, ShownRun } from '../report/html/report-data.js';
import type { RehearsalNames } from '../report/rehearsal-text.js';
import type { LoadedSheet } from '../sheet/load.js';
import type { Io } from './io.js';

/** Lost runs that are shown whole. */
const MOST_LOST = 3;
/** Runs of the twin that the band of the error is taken from; other engines take minutes for so many. */
const BAND_RUNS = 300;

const ASSETS = new URL('../../templates/report/', import.meta.url);

export interface ReportSource {
  study: Study;
  loaded: LoadedSheet & { design: Design };
  lane: Lane;
  names: RehearsalNames;
  sheetPath: string;
  results: readonly RunResult[];
  report: StudyReport;
}

/** Writes the report whole or not at all. */
export async function writeReport(file: string, source: ReportSource, io: Io): Promise<void> {
  const { loaded, lane, names, sheetPath, report } = source;
  const engine = await engineFrom(source.study.parts);
  const chosen = chosenRuns(source.results);
  const { traces, band } = await driveAgain(engine, source, chosen, io);
  const shown = chosen.flatMap(({ why, seed }): ShownRun[] => {
    const result = traces.get(seed);
    return result?.trace === undefined ? [] : [{ why, result: { ...result, trace: result.trace } }];
  });
  const { data: sheet, digest, design } = loaded;
  const data = { names, sheetFile: basename(sheetPath), sheet, digest, design, lane, report, shown, band };
  const { default: writeFileAtomic } = await import('write-file-atomic');
  await writeFileAtomic(file, reportHtml(data, await reportAssets()));
}

export async function reportAssets(): Promise<ReportAssets> {
  const read = (name: string): Promise<string> => readFile(new URL(name, ASSETS), 'utf8');
  return { style: await read('report.css'), script: await read('report.js') };
}

interface Chosen {
  why: string;
  seed: number;
}

/** The first run, the lost ones up to MOST_LOST, and the finished one with the greatest error; each once. */
export function chosenRuns(results: readonly RunResult[]): Chosen[] {
  const lost = results.filter((result) => result.loss !== undefined).slice(0, MOST_LOST);
  const finished = results.filter((result) => result.loss === undefined);
  const widest = finished.toSorted((a, b) => b.maxLateralM - a.maxLateralM)[0];
  const [first] = results;
  const chosen: Chosen[] = [];
  const add = (result: RunResult | undefined, why: string): void => {
    if (result !== undefined && chosen.every(({ seed }) => seed !== result.seed))
      chosen.push({ seed: result.seed, why });
  };
  add(
    first,
    results.length === 1
      ? 'the only run'
      : first?.loss === undefined
        ? 'the first run'
        : 'the first run, lost',
  );
  for (const result of lost) add(result, 'lost');
  add(widest, 'the greatest error of those that finished');
  return chosen;
}

async function driveAgain(
  engine: Engine,
  { study, lane, results }: ReportSource,
  chosen: readonly Chosen[],
  io: Io,
): Promise<{ traces: Map<number, RunResult>; band: ReturnType<ErrorBandSum['band']> }> {
  const wanted = new Set(chosen.map(({ seed }) => seed));
  const inBand = engine.name === 'twin' ? results.slice(0, BAND_RUNS).map(({ seed }) => seed) : [];
  const seeds = [...new Set([...wanted, ...inBand])];
  const traces = new Map<number, RunResult>();
  const sum = new ErrorBandSum(lane.lengthM);
  for (const [i, seed] of seeds.entries()) {
    io.progress(`report: driving again ${i + 1} of ${seeds.length} runs`);
    const result = await engine.run(
      runSetup(study.parts.vehicle, lane, seed, study.laps, true, study.faults),
    );
    if (result.trace !== undefined) sum.add(result.trace);
    if (wanted.has(seed)) traces.set(seed, { ...result, seed });
  }
  io.progress('');
  return { traces, band: sum.band() };
}
