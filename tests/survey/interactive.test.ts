import { readdir, readFile, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { checkSheet } from '../../src/sheet/check.js';
import { folder, sheetIn, survey } from './survey-folder.js';

describe('a survey', () => {
  it('of defaults writes a sound sheet, the schema beside it, and leaves no draft', async () => {
    const { result } = await survey([]);
    expect(result).toMatchObject({ kind: 'written', file: join(folder, 'tray-cart.json') });
    expect(await readdir(folder)).toEqual(['sheet.schema.json', 'tray-cart.json']);
    expect(checkSheet(await sheetIn('tray-cart.json')).problems).toEqual([]);
    const schema = await readFile(new URL('../../schemas/sheet.schema.json', import.meta.url), 'utf8');
    expect(await readFile(join(folder, 'sheet.schema.json'), 'utf8')).toBe(schema);
  });

  it('says what the answers amount to, once the last of them is there', async () => {
    const { talk } = await survey([['Sensor kind', 'digital']]);
    expect(talk.said()).toContain(
      '  = The bar sees the line up to 34 mm to each side: 1 to 2 of 6 sensors at\n    once, no blind gap.\n',
    );
    expect(talk.said()).toContain('  = 13 pins, none of them used twice.\n');
    expect(talk.said()).toContain('3/7 Sensors');
  });

  it('goes back and changes an answer', async () => {
    await survey([
      ['Line width', '3 cm'],
      ['Tightest bend', '<'],
      ['Line width', '25 mm'],
    ]);
    expect(await sheetIn('tray-cart.json')).toMatchObject({ line: { widthMm: 25 } });
  });

  it('tells a problem when it arises, and writes only once it is solved', async () => {
    const { talk } = await survey([
      ['Empty voltage', '7'],
      ['1 problem to be solved', ''],
      ['Empty voltage', '5 V'],
    ]);
    const told = '\n  ! Empty at 7 V is above the nominal 6 V.';
    expect(talk.said().split(told)).toHaveLength(2);
    expect(talk.asked.slice(-3)).toEqual([
      '1 problem to be solved',
      'Empty voltage',
      'All answers fit together',
    ]);
    expect(await sheetIn('tray-cart.json')).toMatchObject({ power: { emptyV: 5 } });
  });

  it('lets any answer be changed from the review', async () => {
    await survey([
      ['All answers fit together', 'change'],
      ['Which answer', 'grip'],
      ['Grip', '0.8'],
    ]);
    expect(await sheetIn('tray-cart.json')).toMatchObject({ drive: { gripCoefficient: 0.8 } });
  });
});

describe('an interrupted survey', () => {
  it('keeps its answers and goes on where it stopped', async () => {
    const { result } = await survey([
      ['Line width', '25 mm'],
      ['Crossings', 'Ctrl-C'],
    ]);
    const draftFile = join(folder, '.fairlead-survey.draft.json');
    expect(result).toEqual({ kind: 'left', interrupted: true, draftFile });
    expect(await readdir(folder)).toEqual(['.fairlead-survey.draft.json']);

    const { talk } = await survey([]);
    expect(talk.asked.slice(0, 2)).toEqual(['Unfinished survey', 'Crossings']);
    expect(await sheetIn('tray-cart.json')).toMatchObject({ line: { widthMm: 25 } });
    expect(await readdir(folder)).toEqual(['sheet.schema.json', 'tray-cart.json']);
  });

  it('can be begun afresh', async () => {
    await survey([
      ['Line width', '25 mm'],
      ['Crossings', 'Ctrl-C'],
    ]);
    const { talk } = await survey([['Unfinished survey', 'begin afresh']]);
    expect(talk.asked[1]).toBe('Vehicle name');
    expect(await sheetIn('tray-cart.json')).toMatchObject({ line: { widthMm: 19 } });
  });

  it('keeps nothing where nothing was answered', async () => {
    const { result } = await survey([['Vehicle name', 'Ctrl-C']]);
    expect(result).toEqual({ kind: 'left', interrupted: true });
    expect(await readdir(folder)).toEqual([]);
  });

  it('keeps its answers through an interruption of the question whether to go on', async () => {
    await survey([['Board', 'Ctrl-C']]);
    const { result } = await survey([['Unfinished survey', 'Ctrl-C']]);
    expect(result).toMatchObject({ kind: 'left', draftFile: join(folder, '.fairlead-survey.draft.json') });
    expect((await survey([])).talk.asked.slice(0, 2)).toEqual(['Unfinished survey', 'Board']);
  });

  it('can be stopped at the review, and resumed there', async () => {
    const { result } = await survey([['All answers fit together', 'stop']]);
    expect(result).toMatchObject({ kind: 'left', interrupted: false });
    expect((await survey([])).talk.asked).toEqual(['Unfinished survey', 'All answers fit together']);
  });

  it('sets a damaged draft aside', async () => {
    await writeFile(join(folder, '.fairlead-survey.draft.json'), '{ "answers": ');
    const { talk } = await survey([['Board', 'Ctrl-C']]);
    expect(talk.said().replaceAll(/\s+/g, ' ')).toContain('The kept answers were damaged');
    expect((await readdir(folder)).sort()).toEqual([
      '.fairlead-survey.draft.json',
      '.fairlead-survey.draft.json.damaged',
    ]);
  });
});
