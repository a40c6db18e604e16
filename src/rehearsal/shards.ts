/**
 * Parts of a study, each driven on its own machine or job, and how they are joined to exactly the whole.
 *
 * Part k of n drives runs floor((k - 1) runs/n) to floor(k runs/n) - 1. A part is a JSON document: the study that it belongs to, which
 * part it is, and its results.
 */
import { FairleadError, type Problem } from '../sheet/problem.js';
import type { RunResult } from './engine.js';
import type { StudyFacts } from './study.js';
import type { SeedRange } from './workers.js';

export const PART_VERSION = 1;

export interface Shard {
  /** 1 to `of`. */
  part: number;
  of: number;
}

/** What all parts of one study have in common. */
export interface StudyIdentity extends StudyFacts {
  /** Version of this program. */
  version: string;
  vehicle: string;
  courseName: string;
  sheetDigest: string;
  courseDigest: string;
  runs: number;
  /** Seed of the study's first run. */
  seed: number;
}

export interface StudyPart {
  partVersion: number;
  study: StudyIdentity;
  shard: Shard;
  results: RunResult[];
}

/** The runs of one part. */
export function shardRange({ first, runs }: SeedRange, { part, of }: Shard): SeedRange {
  const begin = Math.floor(((part - 1) * runs) / of);
  return { first: first + begin, runs: Math.floor((part * runs) / of) - begin };
}

interface NamedPart {
  file: string;
  part: StudyPart;
}

function isPart(data: unknown): data is StudyPart {
  const part = data as Partial<StudyPart> | null;
  return (
    typeof part === 'object' &&
    part?.partVersion === PART_VERSION &&
    typeof part.study === 'object' &&
    typeof part.shard === 'object' &&
    Array.isArray(part.results)
  );
}

/** Names of what differs between two studies. */
function differences(a: StudyIdentity, b: StudyIdentity): string[] {
  return (Object.keys(a) as (keyof StudyIdentity)[]).filter(
    (key) => JSON.stringify(a[key]) !== JSON.stringify(b[key]),
  );
}

const WORDS: Readonly<Record<string, string>> = {
  version: 'another version of fairlead',
  sheetDigest: 'another sheet',
  courseDigest: 'another course',
  engine: 'another engine',
  runs: 'another number of runs',
  seed: 'another first seed',
  laps: 'another number of laps',
};

function foreignProblem({ file, part }: NamedPart, first: NamedPart): Problem[] {
  const differs = differences(first.part.study, part.study);
  const told = differs.flatMap((key) => WORDS[key] ?? []);
  const { of } = first.part.shard;
  if (part.shard.of !== of)
    told.push(`the study was cut into ${part.shard.of} parts there, into ${of} in ${first.file}`);
  if (differs.length > 0 && told.length === 0) told.push('another study');
  return told.length === 0
    ? []
    : [
        {
          pointer: '/study',
          message: `${file} belongs to another study than ${first.file}: ${told.join(', ')}.`,
          fix: 'Merge only parts that were driven by the same command but for --shard.',
        },
      ];
}

/** Parts with too many or too few results for their number. */
function sizeProblem({ file, part }: NamedPart): Problem[] {
  const { runs, seed } = part.study;
  const range = shardRange({ first: seed, runs }, part.shard);
  const isWhole =
    part.results.length === range.runs &&
    part.results.every((result, i) => result.seed === (range.first + i) % 2 ** 32);
  return isWhole
    ? []
    : [
        {
          pointer: '/results',
          message: `${file} does not hold the runs of its part.`,
          fix: 'Drive it again.',
        },
      ];
}

function setProblems(parts: readonly NamedPart[]): Problem[] {
  const of = parts[0]!.part.shard.of;
  const problems: Problem[] = [];
  const missing: number[] = [];
  for (let k = 1; k <= of; k++) {
    const files = parts.filter(({ part }) => part.shard.part === k).map(({ file }) => file);
    if (files.length === 0) missing.push(k);
    if (files.length > 1) {
      problems.push({
        pointer: '/shard',
        message: `Part ${k} of ${of} is given ${files.length} times: ${files.join(', ')}.`,
        fix: 'Name each part once.',
      });
    }
  }
  if (missing.length > 0) {
    problems.push({
      pointer: '/shard',
      message: `Missing of ${of} parts: ${missing.join(', ')}.`,
      fix: `Drive them with --shard ${missing[0] ?? 1}/${of}${missing.length > 1 ? ' and so on' : ''}, and name their files too.`,
    });
  }
  return problems;
}

/**
 * Joins the parts of a study.
 *
 * @param files names and contents, in any order
 * @throws FairleadError (bad input) with all that is foreign, given twice or missing
 */
export function mergeParts(files: readonly { file: string; data: unknown }[]): {
  study: StudyIdentity;
  results: RunResult[];
} {
  const strangers = files.filter(({ data }) => !isPart(data));
  if (strangers.length > 0 || files.length === 0) {
    throw new FairleadError('Only parts of a study can be merged.', {
      problems: strangers.map(({ file }) => ({
        pointer: '',
        message: `${file} is not a part of a study.`,
        fix: 'Parts are written by rehearse --shard K/N.',
      })),
    });
  }
  const parts = files.map(({ file, data }) => ({ file, part: data as StudyPart }));
  const [first] = parts as [NamedPart];
  let problems = parts.flatMap((each) => foreignProblem(each, first));
  if (problems.length === 0) problems = [...setProblems(parts), ...parts.flatMap(sizeProblem)];
  if (problems.length > 0) throw new FairleadError('The parts do not make a whole.', { problems });
  parts.sort((a, b) => a.part.shard.part - b.part.shard.part);
  return { study: first.part.study, results: parts.flatMap(({ part }) => part.results) };
}
