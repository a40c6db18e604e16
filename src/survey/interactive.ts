/** The whole questionnaire on a terminal, from the kept answers of an earlier one to the written file. */
import { join } from 'node:path';
import type { Surface } from './ask.js';
import { draftFileFor, findDraft, removeDraft, saveDraft } from './draft.js';
import { choiceQuestion } from './fields.js';
import type { FlowState } from './flow.js';
import type { JsonObject } from './json-tree.js';
import { openingState, sayWelcome } from './opening.js';
import { converse } from './session.js';
import { changesBetween, fileNameFor, nameFrom, textOf, writeSheet } from './sheet-file.js';
import { checkFolderOf, sheetAtHand } from './target.js';
import { wrap } from './wrap.js';

/** Left before the end, by choice or interrupted; without `draftFile` nothing was answered yet. */
export interface Left {
  kind: 'left';
  interrupted: boolean;
  draftFile?: string;
}

export type Result = { kind: 'written'; file: string; sheet: JsonObject } | Left;

/**
 * Asks everything and writes the sheet to `sheetFile`, or else to a file in `folder` that has the vehicle's name.
 *
 * @throws FairleadError (bad input) for a sheet or folder that cannot be used, and the system's error when writing fails;
 * the answers are kept then.
 */
export async function surveyOnTerminal(
  surface: Surface,
  sheetFile: string | undefined,
  folder: string,
): Promise<Result> {
  const draftFile = draftFileFor(sheetFile, folder);
  await checkFolderOf(draftFile);
  const { base, text } = await sheetAtHand(sheetFile);
  const found = await findDraft(draftFile);
  sayWelcome(surface, sheetFile);
  if (found.kind === 'damaged') {
    const note = `The kept answers were damaged; they are set aside in ${found.keptAs}.`;
    surface.say(`${wrap(note, surface.columns).join('\n')}\n`);
  }
  const draft = found.kind === 'draft' ? found.draft : undefined;
  const start = await openingState(surface, base, draft, sheetFile && nameFrom(sheetFile));
  if (start === undefined) return { kind: 'left', interrupted: true, ...(draft && { draftFile }) };

  let state = start;
  const keep = async (next: FlowState): Promise<void> => {
    state = next;
    await saveDraft(draftFile, next);
  };
  const left = (interrupted: boolean): Left => {
    const answered = Object.keys(state.answers).length > 0;
    return { kind: 'left', interrupted, ...(answered && { draftFile }) };
  };
  const fileFor = (sheet: JsonObject): string => sheetFile ?? join(folder, fileNameFor(sheet));
  const changesIn = (sheet: JsonObject): string[] => (text === undefined ? [] : changesBetween(base, sheet));
  for (;;) {
    const ending = await converse({ surface, start: state, keep, fileFor, changesIn });
    if (ending.kind === 'left') return left(ending.interrupted);
    const { sheet } = ending;
    const file = fileFor(sheet);
    const reply = await mayWrite(surface, file, text);
    if (reply === 'closed') return left(true);
    if (reply === 'write') {
      try {
        await writeSheet(file, sheet);
      } catch (error) {
        if (left(false).draftFile) surface.say(`Your answers are kept in ${draftFile}.\n`);
        throw error;
      }
      await removeDraft(draftFile);
      return { kind: 'written', file, sheet };
    }
    if (sheetFile !== undefined) return left(false);
    state = { ...state, at: '/name' };
  }
}

/** A file with a text that we have not read is not replaced unasked. */
async function mayWrite(
  surface: Surface,
  file: string,
  known: string | undefined,
): Promise<'write' | 'keep' | 'closed'> {
  const present = await textOf(file);
  if (present === undefined || present === known) return 'write';
  const fresh = known === undefined;
  const title = fresh ? `${file} is there already` : `${file} has changed since this survey began`;
  const choices = [
    {
      value: 'keep',
      label: 'keep it',
      meaning: fresh ? 'choose another name for this vehicle' : 'stop here',
    },
    { value: 'write', label: 'replace it', meaning: 'what it says is lost' },
  ];
  const reply = await surface.ask(
    choiceQuestion({ title, why: '', help: [], allowed: '' }, choices, 'keep'),
    false,
  );
  if (reply.kind !== 'answer') return 'closed';
  return reply.value === 'write' ? 'write' : 'keep';
}
