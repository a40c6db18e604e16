/** The sheet that a questionnaire is about: the one at hand, and whether it can be written. */
import { access, constants, stat } from 'node:fs/promises';
import { dirname } from 'node:path';
import { readJsonFile } from '../sheet/load.js';
import { FairleadError } from '../sheet/problem.js';
import { describeValue } from '../sheet/words.js';
import { isObject, type JsonObject } from './json-tree.js';
import { textOf } from './sheet-file.js';

export interface AtHand {
  /** The sheet as written; empty where there is none yet. */
  base: JsonObject;
  /** Its text, where it exists. */
  text?: string;
}

/**
 * Reads the sheet that is to be changed. It may be faulty, as long as it is JSON: the questionnaire can put it right.
 *
 * @throws FairleadError (bad input) if the file is there but no JSON object.
 */
export async function sheetAtHand(file: string | undefined): Promise<AtHand> {
  if (file === undefined || (await textOf(file)) === undefined) return { base: {} };
  const { data, text } = await readJsonFile(file);
  if (isObject(data)) return { base: data, text };
  const message = `The file holds ${describeValue(data)}, not a build sheet.`;
  throw new FairleadError(message, { problems: [{ pointer: '', message, fix: 'Name another file.' }], file });
}

/**
 * Makes sure that files can be written where the sheet goes: before the first question, not after the last.
 *
 * @throws FairleadError (bad input) if the folder is missing or closed.
 */
export async function checkFolderOf(file: string): Promise<void> {
  const folder = dirname(file);
  const found = await stat(folder).catch(() => undefined);
  if (!found?.isDirectory()) {
    refuse(folder, 'There is no such folder.', 'Make it first, or name a file elsewhere.');
  }
  try {
    await access(folder, constants.W_OK);
  } catch (error) {
    refuse(folder, 'No file can be written in this folder.', 'Choose another one.', error);
  }
}

function refuse(folder: string, message: string, fix: string, cause?: unknown): never {
  const problems = [{ pointer: '', message, fix }];
  throw new FairleadError(`${folder}: ${message}`, { problems, file: folder, cause });
}
