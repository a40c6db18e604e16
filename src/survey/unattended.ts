/** A sheet without a terminal: from a file of answers, or from the defaults alone. */
import { join } from 'node:path';
import { FairleadError } from '../sheet/problem.js';
import { readJsonFile } from '../sheet/load.js';
import { sheetFromAnswers } from './answers-file.js';
import { type Json, type JsonObject, sameJson } from './json-tree.js';
import { changesBetween, fileNameFor, nameFrom, textOf, writeSheet } from './sheet-file.js';
import { checkFolderOf, sheetAtHand } from './target.js';

export interface UnattendedOptions {
  sheetFile: string | undefined;
  /** Where a sheet goes that no file is named for. */
  folder: string;
  answersFile: string | undefined;
  /** Whether a sheet that says something else may be replaced. */
  replace: boolean;
}

export interface Written {
  file: string;
  sheet: JsonObject;
  /** False where the file said the same already. */
  changed: boolean;
}

/**
 * Makes the sheet from answers on top of the one at hand and writes it.
 *
 * @throws FairleadError (bad input) with all problems of the answers; or if a file is there that says something else
 * and may not be replaced.
 */
export async function surveyUnattended(options: UnattendedOptions): Promise<Written> {
  const { sheetFile, answersFile } = options;
  const answers = answersFile === undefined ? {} : (await readJsonFile(answersFile)).data;
  const { base, text } = await sheetAtHand(sheetFile);
  const name = text === undefined && sheetFile !== undefined ? nameFrom(sheetFile) : undefined;
  const made = sheetFromAnswers(answers, name === undefined ? base : { name, ...base });
  if ('problems' in made) {
    const about = answersFile ?? sheetFile;
    const message = `${about ?? 'the defaults'} give no sound build sheet.`;
    throw new FairleadError(message, {
      problems: made.problems,
      ...(about !== undefined && { file: about }),
    });
  }
  const { sheet } = made;
  const file = sheetFile ?? join(options.folder, fileNameFor(sheet));
  await checkFolderOf(file);
  const present = await textOf(file);
  if (present !== undefined) {
    const old = parsed(present);
    if (sameJson(old, sheet)) return { file, sheet, changed: false };
    if (!options.replace) throw occupied(file, old, sheet);
  }
  await writeSheet(file, sheet);
  return { file, sheet, changed: true };
}

function parsed(text: string): Json | undefined {
  try {
    return JSON.parse(text) as Json;
  } catch {
    return undefined;
  }
}

function occupied(file: string, old: Json | undefined, sheet: JsonObject): FairleadError {
  const changes = old === undefined ? [] : changesBetween(old, sheet);
  const differing = changes.length === 0 ? '' : ` It differs: ${changes.join('; ')}.`;
  const message = `The file is there already and says something else.${differing}`;
  const fix = 'Name another file, or add --replace.';
  return new FairleadError(message, { problems: [{ pointer: '', message, fix }], file });
}
