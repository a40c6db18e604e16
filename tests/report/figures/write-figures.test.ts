import { mkdir, mkdtemp, readFile, readdir, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { writeFigures } from '../../../src/report/figures/write-figures.js';
import type { Figure } from '../../../src/report/figures/design-figures.js';
import { FairleadError } from '../../../src/sheet/problem.js';

const FIGURES: Figure[] = [
  { name: 'bode.svg', svg: '<svg>a</svg>' },
  { name: 'nyquist.svg', svg: '<svg>b</svg>' },
];
let folder = '';
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fairlead-figures-'));
});
afterEach(() => rm(folder, { recursive: true }));

async function failureOf(target: string): Promise<FairleadError> {
  const failure = await writeFigures(target, FIGURES).catch((error: unknown) => error);
  if (!(failure instanceof FairleadError))
    throw new Error('It did not fail as expected.', { cause: failure });
  return failure;
}

it('makes the folder, writes each file, and nothing else', async () => {
  const target = join(folder, 'deep', 'er');
  expect(await writeFigures(target, FIGURES)).toEqual([
    join(target, 'bode.svg'),
    join(target, 'nyquist.svg'),
  ]);
  expect((await readdir(target)).sort()).toEqual(['bode.svg', 'nyquist.svg']);
  expect(await readFile(join(target, 'nyquist.svg'), 'utf8')).toBe('<svg>b</svg>');
});

it('takes a figure away that this design does not have', async () => {
  await writeFile(join(folder, 'rule-table.svg'), 'of the rules before');
  await writeFigures(folder, FIGURES);
  expect((await readdir(folder)).sort()).toEqual(['bode.svg', 'nyquist.svg']);
});

it('writes over older pictures and leaves other files alone', async () => {
  await writeFile(join(folder, 'bode.svg'), 'old');
  await writeFile(join(folder, 'notes.txt'), 'mine');
  await writeFigures(folder, FIGURES);
  expect(await readFile(join(folder, 'bode.svg'), 'utf8')).toBe('<svg>a</svg>');
  expect(await readFile(join(folder, 'notes.txt'), 'utf8')).toBe('mine');
});

it.each([
  ['file', 'there is a file of that name'],
  ['file/sub', 'a part of the path is a file'],
  ['x'.repeat(300), 'the name is too long'],
])('refuses %s', async (name, reason) => {
  await writeFile(join(folder, 'file'), 'mine');
  const { message, exitCode, file, problems } = await failureOf(join(folder, name));
  expect({ message, exitCode, file }).toEqual({
    message: `The figures cannot be written here: ${reason}.`,
    exitCode: 2,
    file: join(folder, name),
  });
  expect(problems).toMatchObject([{ fix: 'Name another folder with --figures.' }]);
  expect(await readFile(join(folder, 'file'), 'utf8')).toBe('mine');
});

it('refuses a file system that takes no folders', async () => {
  const { message } = await failureOf('/proc/fairlead-figures');
  expect(message).toBe('The figures cannot be written here: there can be no such folder.');
});

it('leaves no half-written file where a folder has the name of a picture', async () => {
  await mkdir(join(folder, 'nyquist.svg'));
  expect((await failureOf(folder)).message).toMatch(/one of the names is taken by a folder/);
  expect((await readdir(folder)).sort()).toEqual(['bode.svg', 'nyquist.svg']);
});
