/** Writes pictures into a folder, each file whole or not at all. */
import { mkdir, rm, stat } from 'node:fs/promises';
import { dirname, join, resolve } from 'node:path';
import writeFileAtomic from 'write-file-atomic';
import { FairleadError } from '../../sheet/problem.js';
import { FIGURE_NAMES, type Figure } from './design-figures.js';

/** Why a folder takes no files, by the system's code. */
const REASONS: Readonly<Record<string, string>> = {
  EACCES: 'access is denied',
  EPERM: 'the operation is not permitted',
  EROFS: 'the file system is read-only',
  EEXIST: 'there is a file of that name',
  ENOTDIR: 'a part of the path is a file',
  EISDIR: 'one of the names is taken by a folder',
  ENOENT: 'there can be no such folder',
  ENOSPC: 'the disk is full',
  EDQUOT: 'the disk quota is used up',
  ENAMETOOLONG: 'the name is too long',
};

/** Makes a folder and those above it. Not mkdir's `recursive`: that never ends where a file system takes no folders, as /proc. */
async function makeFolder(folder: string): Promise<void> {
  try {
    await mkdir(folder);
  } catch (error) {
    const { code } = error as NodeJS.ErrnoException;
    const isThere = code === 'EEXIST' && (await stat(folder)).isDirectory();
    if (isThere) return;
    if (code !== 'ENOENT' || dirname(folder) === folder) throw error;
    await makeFolder(dirname(folder));
    await mkdir(folder);
  }
}

/**
 * Makes the folder if it is missing and writes the pictures into it, over older ones; a figure of an older design that this one
 * does not have is taken away.
 *
 * @returns paths of the files, in the order given
 * @throws FairleadError (bad input) when the folder takes no files
 */
export async function writeFigures(folder: string, figures: readonly Figure[]): Promise<string[]> {
  const paths = figures.map(({ name }) => join(folder, name));
  try {
    await makeFolder(resolve(folder));
    for (const [i, { svg }] of figures.entries()) await writeFileAtomic(paths[i]!, svg);
    const gone = FIGURE_NAMES.filter((name) => figures.every((each) => each.name !== name));
    for (const name of gone) await rm(join(folder, name), { force: true });
  } catch (error) {
    const reason = REASONS[(error as NodeJS.ErrnoException).code ?? ''];
    if (reason === undefined) throw error;
    const message = `The figures cannot be written here: ${reason}.`;
    const problem = { pointer: '', message, fix: 'Name another folder with --figures.' };
    throw new FairleadError(message, { problems: [problem], file: folder, cause: error });
  }
  return paths;
}
