/** `fairlead rehearse A.json B.json`: two sheets on the same course and the same seeds, in pairs. */
import { comparePairs } from '../rehearsal/paired-comparison.js';
import { studyFacts, studyReport } from '../rehearsal/study.js';
import { pairsText, type ComparedSide } from '../report/pairs-text.js';
import { driveAll } from './driving.js';
import type { Io } from './io.js';
import { type RehearseOptions, seedsOf } from './rehearse-options.js';
import { loadStudy } from './rehearse-runs.js';

/** Pairs where no number is given: enough to tell laps that differ by a percent. */
const DEFAULT_PAIRS = 100;

export async function compareCommand(
  paths: readonly [first: string, second: string],
  coursePath: string,
  options: RehearseOptions,
  io: Io,
): Promise<void> {
  const seeds = seedsOf(options, DEFAULT_PAIRS);
  const engines = [options.on, options.onSecond ?? options.on] as const;
  const drive = async (i: 0 | 1) => {
    const loaded = await loadStudy(paths[i], coursePath, { on: engines[i], laps: options.laps }, io);
    const results = await driveAll(loaded.study, seeds, options.jobs, io, `driving ${'AB'[i] ?? ''}`);
    const name = `${loaded.names.vehicle} (${paths[i]})`;
    const side: ComparedSide = { name, report: studyReport(studyFacts(loaded.study), results) };
    return { loaded, results, side };
  };
  const first = await drive(0);
  const second = await drive(1);
  const pairs = comparePairs(first.results, second.results);
  if (options.json === true) {
    const names = { firstSheet: paths[0], secondSheet: paths[1], course: coursePath };
    io.json({ ...names, first: first.side.report, second: second.side.report, pairs });
    return;
  }
  const { course, names } = first.loaded;
  const laps = course.lane.closed ? `${names.laps} ${names.laps === 1 ? 'lap' : 'laps'} of ` : '';
  const seedWords = `seeds ${seeds.first} to ${seeds.first + seeds.runs - 1}`;
  const headline = `${names.course}, ${laps}${course.lane.lengthM.toFixed(2)} m; ${seeds.runs} pairs, ${seedWords}`;
  io.stdout(pairsText(first.side, second.side, pairs, headline));
}
