/** A questionnaire answered from a script, in a folder of its own for each test. */
import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect } from 'vitest';
import { type Result, surveyOnTerminal } from '../../src/survey/interactive.js';
import { type Line, scripted, type Scripted } from './scripted.js';

/** The folder of the running test. */
export let folder: string;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fairlead-survey-'));
});
afterEach(async () => {
  await rm(folder, { recursive: true });
});

/** Answers the questions named and takes the offered value for all others. */
export async function survey(
  lines: readonly Line[],
  sheetFile?: string,
): Promise<{ result: Result; talk: Scripted }> {
  const talk = scripted(lines);
  const file = sheetFile === undefined ? undefined : join(folder, sheetFile);
  const result = await surveyOnTerminal(talk.surface, file, folder);
  expect(talk.left()).toEqual([]);
  return { result, talk };
}

/** A sheet as it stands in the folder. */
export const sheetIn = async (name: string): Promise<Record<string, Record<string, unknown>>> =>
  JSON.parse(await readFile(join(folder, name), 'utf8')) as Record<string, Record<string, unknown>>;
