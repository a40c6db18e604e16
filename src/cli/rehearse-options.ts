/** The options of `fairlead rehearse`, as its parts read them. */
import { InvalidArgumentError } from 'commander';
import type { Fault } from '../rehearsal/fault.js';
import type { EngineName } from '../rehearsal/engine.js';
import type { Shard } from '../rehearsal/shards.js';

export const MOST_RUNS = 1_000_000;
export const MOST_LAPS = 100;
export const MOST_SEED = 2 ** 32 - 1 - MOST_RUNS;
export const MOST_JOBS = 256;
const MOST_PARTS = 10_000;

export interface RehearseOptions {
  course?: string;
  on: EngineName;
  /** What drives the second of two sheets, where not the same. */
  onSecond?: EngineName;
  runs?: number;
  seed?: number;
  laps: number;
  jobs?: number;
  svg?: string;
  report?: string;
  shard?: Shard;
  out?: string;
  merge?: string[];
  curve?: boolean;
  spreads?: boolean;
  fault?: Fault[];
  json?: boolean;
}

/** How many runs, and the seed of the first: the vehicle of the sheet alone, or drawn ones from seed 1. */
export function seedsOf(options: RehearseOptions, defaultRuns = 1): { first: number; runs: number } {
  const runs = options.runs ?? defaultRuns;
  return { runs, first: options.seed ?? (runs === 1 ? 0 : 1) };
}

/** The name of a picture: not by mistake that of the sheet. */
export function svgName(text: string): string {
  if (!text.toLowerCase().endsWith('.svg')) throw new InvalidArgumentError('Its name must end in .svg.');
  return text;
}

/** The name of a report, likewise. */
export function reportName(text: string): string {
  if (!text.toLowerCase().endsWith('.html')) throw new InvalidArgumentError('Its name must end in .html.');
  return text;
}

/** Which part of a study: "2/8". */
export function shardOf(text: string): Shard {
  const [, part, of] = (/^(\d+)\/(\d+)$/.exec(text) ?? []).map(Number);
  if (part === undefined || of === undefined || of < 1 || of > MOST_PARTS || part < 1 || part > of) {
    throw new InvalidArgumentError(`It takes K/N, part K of N: 1/4 to 4/4; N is at most ${MOST_PARTS}.`);
  }
  return { part, of };
}
