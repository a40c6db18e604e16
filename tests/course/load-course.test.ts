import { mkdtemp, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import fc from 'fast-check';
import { beforeAll, describe, expect, it } from 'vitest';
import { checkCourse } from '../../src/course/check-course.js';
import { loadCourse } from '../../src/course/load-course.js';
import { FairleadError } from '../../src/sheet/problem.js';

let folder = '';

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fairlead-course-'));
});

async function failureOf(text: string): Promise<FairleadError> {
  const path = join(folder, 'lane.json');
  await writeFile(path, text);
  const error: unknown = await loadCourse(path).catch((reason: unknown) => reason);
  if (error instanceof FairleadError) return error;
  throw new Error('The course was taken.');
}

describe('loadCourse', () => {
  it('reads, checks and compiles an example', async () => {
    const { lane, course, digest } = await loadCourse('examples/courses/winding.json');
    expect(lane.closed).toBe(true);
    expect(lane.pieces.length).toBe(course.pieces.length);
    expect(digest).toMatch(/^[0-9a-f]{64}$/);
  });

  it('names every piece that does not fit, each once', async () => {
    const pieces = [
      { straightMm: -5 },
      { radiusMm: 200 },
      { turn: 3 },
      { gapMm: '4 cm' },
      { radiusMm: 10, turnDeg: 90 },
      7,
    ];
    const error = await failureOf(JSON.stringify({ courseVersion: 1, closd: true, pieces }));
    expect(error.exitCode).toBe(2);
    const pointers = error.problems.map((problem) => problem.pointer);
    expect(new Set(pointers).size).toBe(pointers.length);
    const startsOf = (i: number): string[] =>
      pointers.filter((pointer) => pointer.startsWith(`/pieces/${i}`));
    for (let i = 0; i < pieces.length; i++) expect(startsOf(i)).toHaveLength(1);
    const text = JSON.stringify(error.problems);
    expect(text).toContain('-5 mm');
    expect(text).toContain('closed');
    expect(text).toContain('10 mm');
  });

  it.each([
    ['', 'The file is empty; a JSON file is needed.'],
    ['{ "courseVersion": 1, ', 'This is not JSON'],
    ['[]', 'list'],
    ['{ "courseVersion": 1, "pieces": [] }', 'piece'],
  ])('refuses %j', async (text, words) => {
    const { problems } = await failureOf(text);
    expect(JSON.stringify(problems)).toContain(words);
  });

  it('says which file is missing', async () => {
    await expect(loadCourse(join(folder, 'none.json'))).rejects.toThrow(/none\.json: There is no such file/);
  });
});

describe('checkCourse', () => {
  it('takes or refuses anything without throwing, and lays out what it takes', () => {
    const piece = fc.oneof(
      fc.record({ straightMm: fc.double({ min: -10, max: 2000 }) }),
      fc.record({ radiusMm: fc.double({ min: 0, max: 500 }), turnDeg: fc.double({ min: -400, max: 400 }) }),
      fc.record({ gapMm: fc.integer({ min: 0, max: 1200 }) }),
      fc.record({ cornerDeg: fc.integer({ min: -160, max: 160 }) }),
      fc.constant({ crossing: true }),
      fc.anything(),
    );
    const course = fc.record({
      courseVersion: fc.constant(1),
      closed: fc.boolean(),
      lineWidthMm: fc.integer({ min: 4, max: 50 }),
      pieces: fc.array(piece, { maxLength: 6 }),
    });
    fc.assert(
      fc.property(fc.oneof(course, fc.anything()), (data) => {
        const checked = checkCourse(data);
        expect(checked.course === undefined).toBe(checked.problems.length > 0);
      }),
      { numRuns: 500 },
    );
  });
});
