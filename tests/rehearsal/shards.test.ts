import { describe, expect, it } from 'vitest';
import type { RunResult } from '../../src/rehearsal/engine.js';
import { mergeParts, shardRange, type StudyPart } from '../../src/rehearsal/shards.js';
import { FairleadError } from '../../src/sheet/problem.js';

const RUNS = 10;
const OF = 4;

function part(k: number, changes: Partial<StudyPart['study']> = {}): StudyPart {
  const range = shardRange({ first: 5, runs: RUNS }, { part: k, of: OF });
  const results = Array.from({ length: range.runs }, (_, i): RunResult => {
    return { seed: range.first + i, lapsS: [4], timeS: 4, rmsLateralM: 0.001, maxLateralM: 0.002 };
  });
  return {
    partVersion: 1,
    shard: { part: k, of: OF },
    study: {
      ...{ version: '1', vehicle: 'cart', courseName: 'lane.json', sheetDigest: 'a', courseDigest: 'b' },
      ...{ runs: RUNS, seed: 5, engine: 'twin', laps: 2, boundLapS: 4, lapM: 5, notes: [] },
      course: { courseVersion: 1, pieces: [{ straightMm: 100 }] },
      ...changes,
    },
    results,
  };
}

const named = (parts: readonly StudyPart[]) => parts.map((data, i) => ({ file: `p${i + 1}.json`, data }));
const all = [1, 2, 3, 4].map((k) => part(k));

function messages(files: Parameters<typeof mergeParts>[0]): string[] {
  try {
    mergeParts(files);
  } catch (error) {
    if (error instanceof FairleadError) return error.problems.map(({ message }) => message);
  }
  return [];
}

describe('shardRange', () => {
  it.each([
    [10, 4],
    [3, 7],
    [1000, 8],
    [1, 1],
  ])('cuts %i runs into %i parts that follow on each other', (runs, of) => {
    let next = 5;
    for (let k = 1; k <= of; k++) {
      const range = shardRange({ first: 5, runs }, { part: k, of });
      expect(range.first).toBe(next);
      expect(Math.abs(range.runs - runs / of)).toBeLessThan(1);
      next += range.runs;
    }
    expect(next).toBe(5 + runs);
  });
});

describe('mergeParts', () => {
  it('joins parts in any order', () => {
    const { results } = mergeParts(named([all[2]!, all[0]!, all[3]!, all[1]!]));
    expect(results.map(({ seed }) => seed)).toEqual([5, 6, 7, 8, 9, 10, 11, 12, 13, 14]);
  });

  it('tells what is missing and what is there twice', () => {
    expect(messages(named([all[0]!, all[1]!, all[1]!]))).toEqual([
      'Part 2 of 4 is given 2 times: p2.json, p3.json.',
      'Missing of 4 parts: 3, 4.',
    ]);
  });

  it('tells parts of another study, and what differs', () => {
    const foreign = part(2, { sheetDigest: 'c', seed: 6 });
    expect(messages(named([all[0]!, foreign, all[2]!, all[3]!]))).toEqual([
      'p2.json belongs to another study than p1.json: another sheet, another first seed.',
    ]);
    const cut = { ...all[1]!, shard: { part: 2, of: 5 } };
    expect(messages(named([all[0]!, cut]))).toEqual([
      'p2.json belongs to another study than p1.json: the study was cut into 5 parts there, into 4 in p1.json.',
    ]);
  });

  it('tells a part that is not whole, and what is no part', () => {
    const short = { ...all[3]!, results: all[3]!.results.slice(1) };
    expect(messages(named([all[0]!, all[1]!, all[2]!, short]))).toEqual([
      'p4.json does not hold the runs of its part.',
    ]);
    expect(messages([...named(all), { file: 'cart.json', data: { sheetVersion: 1 } }])).toEqual([
      'cart.json is not a part of a study.',
    ]);
    expect(messages([{ file: 'null.json', data: null }])).toEqual(['null.json is not a part of a study.']);
  });
});
