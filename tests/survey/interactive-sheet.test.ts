import { mkdir, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { surveyOnTerminal } from '../../src/survey/interactive.js';
import { scripted } from './scripted.js';
import { folder, sheetIn, survey } from './survey-folder.js';

describe('a sheet at hand', () => {
  it('is named by its file', async () => {
    await survey([], 'bench-cart.json');
    expect(await sheetIn('bench-cart.json')).toMatchObject({ name: 'bench-cart' });
  });

  it('goes straight to the review, which says what changes', async () => {
    await survey([], 'cart.json');
    const sheet = await sheetIn('cart.json');
    await writeFile(join(folder, 'cart.json'), JSON.stringify({ ...sheet, tolerances: { gripPercent: 30 } }));
    const { talk } = await survey(
      [
        ['This sheet has values already', 'review'],
        ['All answers fit together', 'change'],
        ['Which answer', '4'],
        ['Line width', '25'],
      ],
      'cart.json',
    );
    expect(talk.said()).toContain('Changes in');
    expect(talk.said()).toContain('\n Line width: 19 mm -> 25 mm\n');
    expect(await sheetIn('cart.json')).toEqual({
      ...sheet,
      line: { ...sheet['line'], widthMm: 25 },
      tolerances: { gripPercent: 30 },
    });
  });

  it('is left as it is when the survey is interrupted', async () => {
    await survey([], 'cart.json');
    const before = await readFile(join(folder, 'cart.json'), 'utf8');
    await survey(
      [
        ['This sheet has values already', 'all questions'],
        ['Line width', '25'],
        ['Tightest bend', 'Ctrl-C'],
      ],
      'cart.json',
    );
    expect(await readFile(join(folder, 'cart.json'), 'utf8')).toBe(before);
    expect(await readdir(folder)).toEqual(['.cart.draft.json', 'cart.json', 'sheet.schema.json']);
  });

  it('of the same name is not replaced unasked', async () => {
    await writeFile(join(folder, 'tray-cart.json'), 'mine');
    await survey([
      [`${join(folder, 'tray-cart.json')} is there already`, ''],
      ['Vehicle name', 'other-cart'],
    ]);
    expect(await readFile(join(folder, 'tray-cart.json'), 'utf8')).toBe('mine');
    expect(await sheetIn('other-cart.json')).toMatchObject({ name: 'other-cart' });
    await survey([[`${join(folder, 'tray-cart.json')} is there already`, 'replace it']]);
    expect(await sheetIn('tray-cart.json')).toMatchObject({ name: 'tray-cart' });
  });

  it('that cannot be written leaves the answers kept, and says so', async () => {
    // A folder where a file is to go: the system refuses to write.
    await mkdir(join(folder, 'tray-cart.json'));
    const talk = scripted([['Line width', '25']]);
    await expect(surveyOnTerminal(talk.surface, undefined, folder)).rejects.toMatchObject({ code: 'EISDIR' });
    await rm(join(folder, 'tray-cart.json'), { recursive: true });

    await mkdir(join(folder, 'sheet.schema.json'));
    const again = scripted([]);
    await expect(surveyOnTerminal(again.surface, undefined, folder)).rejects.toMatchObject({
      code: 'EISDIR',
    });
    expect(again.said()).toContain(
      `Your answers are kept in ${join(folder, '.fairlead-survey.draft.json')}.`,
    );
    await rm(join(folder, 'sheet.schema.json'), { recursive: true });
    await survey([['Unfinished survey', 'go on']]);
    expect(await sheetIn('tray-cart.json')).toMatchObject({ line: { widthMm: 25 } });
  });

  it('that is not JSON is refused before the first question', async () => {
    await writeFile(join(folder, 'cart.json'), '{ "name": ');
    await expect(survey([], 'cart.json')).rejects.toMatchObject({ exitCode: 2 });
    await writeFile(join(folder, 'cart.json'), '[]');
    await expect(survey([], 'cart.json')).rejects.toMatchObject({
      problems: [{ message: 'The file holds a list of 0 entries, not a build sheet.' }],
    });
  });

  it('in a folder that does not exist is refused before the first question', async () => {
    await expect(survey([], 'none/cart.json')).rejects.toMatchObject({
      exitCode: 2,
      problems: [{ message: 'There is no such folder.', fix: 'Make it first, or name a file elsewhere.' }],
    });
  });
});
