/** `fairlead rehearse` proper: drives the runs, whole or one part of them, and says how that went. */
import { basename } from 'node:path';
import { loadCourse } from '../course/load-course.js';
import type { Design } from '../design/design.js';
import { enginePartsOf } from '../rehearsal/engines.js';
import { checkFaults } from '../rehearsal/fault.js';
import { PART_VERSION, shardRange, type StudyIdentity, type StudyPart } from '../rehearsal/shards.js';
import { type Study, studyFacts, studyReport } from '../rehearsal/study.js';
import { rehearsalText, type RehearsalNames } from '../report/rehearsal-text.js';
import { endingText } from '../report/ending-text.js';
import type { LoadedSheet } from '../sheet/load.js';
import { visible } from '../sheet/words.js';
import { VERSION } from '../version.js';
import { driveAll } from './driving.js';
import type { Io } from './io.js';
import { loadDesign } from './load-design.js';
import { type RehearseOptions, seedsOf } from './rehearse-options.js';
import { drawnRun, plotOf, writePicture } from './rehearse-picture.js';

/** What is rehearsed, and where it came from. */
export interface LoadedStudy {
  study: Study;
  loaded: LoadedSheet & { design: Design };
  course: Awaited<ReturnType<typeof loadCourse>>;
  names: RehearsalNames;
}

/** Designs, and makes ready what the engine needs. */
export async function loadStudy(
  path: string,
  coursePath: string,
  { on, laps, fault }: Pick<RehearseOptions, 'on' | 'laps' | 'fault'>,
  io: Io,
): Promise<LoadedStudy> {
  io.progress('designing ...');
  const loaded = await loadDesign(path);
  const course = await loadCourse(coursePath);
  if (fault !== undefined) checkFaults(fault, loaded.design.vehicle, on);
  io.progress('making the engine ready ...');
  const parts = await enginePartsOf(on, { digest: loaded.digest }, loaded.design);
  io.progress('');
  const names = { vehicle: loaded.sheet.name, course: basename(coursePath), laps };
  return {
    study: { parts, course: course.course, laps, ...(fault && { faults: fault }) },
    loaded,
    course,
    names,
  };
}

export async function rehearseRuns(
  path: string,
  coursePath: string,
  options: RehearseOptions,
  io: Io,
): Promise<void> {
  const { study, loaded, course, names } = await loadStudy(path, coursePath, options, io);
  const results = await driveAll(study, seedsOf(options), options.jobs, io);
  const facts = studyFacts(study);
  const report = studyReport(facts, results);

  const isPlotted = io.isTerminalOut && options.json !== true;
  const run =
    isPlotted || options.svg !== undefined ? await drawnRun(results, study, course.lane) : undefined;
  if (run !== undefined && options.svg !== undefined)
    await writePicture(options.svg, run, facts, `${names.vehicle} on ${names.course}`);
  if (options.report !== undefined) {
    const { writeReport } = await import('./rehearse-report.js');
    const source = { study, loaded, lane: course.lane, names, sheetPath: path, results, report };
    await writeReport(options.report, source, io);
  }
  if (options.json === true) {
    io.json(report);
    return;
  }
  io.stdout(rehearsalText(report, course.lane, names));
  if (options.fault !== undefined) io.stdout(`\n${endingText(report, loaded.design.controller)}`);
  for (const note of report.notes) io.stdout(`Note: ${note}\n`);
  if (run !== undefined && isPlotted) io.stdout(`\n${plotOf(run, io)}`);
  if (options.svg !== undefined) io.stdout(`\nPicture: ${visible(options.svg)}\n`);
  if (options.report !== undefined) io.stdout(`\nReport: ${visible(options.report)}\n`);
}

/** Drives one part of the runs and writes it, to a file or on stdout. */
export async function rehearsePart(
  path: string,
  coursePath: string,
  options: RehearseOptions & Required<Pick<RehearseOptions, 'shard'>>,
  io: Io,
): Promise<void> {
  const { study, loaded, course, names } = await loadStudy(path, coursePath, options, io);
  const { first, runs } = seedsOf(options);
  const identity: StudyIdentity = {
    version: VERSION,
    vehicle: names.vehicle,
    courseName: names.course,
    sheetDigest: loaded.digest,
    courseDigest: course.digest,
    runs,
    seed: first,
    ...studyFacts(study),
  };
  const { shard } = options;
  const range = shardRange({ first, runs }, shard);
  const results = range.runs === 0 ? [] : await driveAll(study, range, options.jobs, io);
  const part: StudyPart = { partVersion: PART_VERSION, study: identity, shard, results };
  if (options.out === undefined) {
    io.json(part);
    return;
  }
  const { default: writeFileAtomic } = await import('write-file-atomic');
  await writeFileAtomic(options.out, `${JSON.stringify(part)}\n`);
  const summary = `Part ${shard.part} of ${shard.of}: ${range.runs} runs from seed ${range.first}, in ${visible(options.out)}\n`;
  if (options.json === true) io.json({ file: options.out, shard, runs: range.runs, seed: range.first });
  else io.stdout(summary);
}
