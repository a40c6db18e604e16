/**
 * Answers of a questionnaire that is not finished yet, kept in a hidden file beside the sheet. It is written whole or not
 * at all after every answer, so that no interruption loses one.
 */
import { readFile, rename, rm } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import writeFileAtomic from 'write-file-atomic';
import type { Answers } from './facts.js';
import { isObject, type Json } from './json-tree.js';

const DRAFT_VERSION = 1;

export interface Draft {
  answers: Answers;
  /** The question to go on with. */
  at: string;
}

export type FoundDraft =
  | { kind: 'none' }
  | { kind: 'draft'; draft: Draft }
  /** Not readable as a draft; it was set aside under another name. */
  | { kind: 'damaged'; keptAs: string };

/** Where the draft of a sheet lies: `.tray-cart.draft.json` beside `tray-cart.json`; without a sheet, in the folder. */
export function draftFileFor(sheetFile: string | undefined, folder: string): string {
  if (sheetFile === undefined) return join(folder, '.fairlead-survey.draft.json');
  return join(dirname(sheetFile), `.${basename(sheetFile, '.json')}.draft.json`);
}

/** Reads a draft. One that is damaged is renamed, not thrown away. */
export async function findDraft(file: string): Promise<FoundDraft> {
  let text: string;
  try {
    text = await readFile(file, 'utf8');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return { kind: 'none' };
    throw error;
  }
  const draft = parseDraft(text);
  if (draft) return { kind: 'draft', draft };
  const keptAs = `${file}.damaged`;
  await rename(file, keptAs);
  return { kind: 'damaged', keptAs };
}

function parseDraft(text: string): Draft | undefined {
  let data: Json;
  try {
    data = JSON.parse(text) as Json;
  } catch {
    return undefined;
  }
  if (!isObject(data) || data['draftVersion'] !== DRAFT_VERSION) return undefined;
  const { answers, at } = data;
  return isObject(answers) && typeof at === 'string' ? { answers, at } : undefined;
}

/** Keeps answers; the file holds the old ones until the new ones are on the disk. */
export async function saveDraft(file: string, { answers, at }: Draft): Promise<void> {
  await writeFileAtomic(file, `${JSON.stringify({ draftVersion: DRAFT_VERSION, at, answers }, null, 1)}\n`);
}

export async function removeDraft(file: string): Promise<void> {
  await rm(file, { force: true });
}
