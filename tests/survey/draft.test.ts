import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { draftFileFor, findDraft, removeDraft, saveDraft } from '../../src/survey/draft.js';

let folder: string;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fairlead-draft-'));
});
afterEach(async () => {
  await rm(folder, { recursive: true });
});

describe('a draft', () => {
  it('lies hidden beside the sheet', () => {
    expect(draftFileFor('carts/tray-cart.json', '.')).toBe('carts/.tray-cart.draft.json');
    expect(draftFileFor('cart', '.')).toBe('.cart.draft.json');
    expect(draftFileFor(undefined, '.')).toBe('.fairlead-survey.draft.json');
  });

  it('comes back as it was kept', async () => {
    const file = join(folder, 'd.json');
    const draft = { answers: { '/line/widthMm': 25, '#pins': 'by-hand' }, at: '/line/widthMm' };
    await saveDraft(file, draft);
    expect(await findDraft(file)).toEqual({ kind: 'draft', draft });
    await removeDraft(file);
    expect(await findDraft(file)).toEqual({ kind: 'none' });
    await removeDraft(file);
  });

  it.each([
    '',
    '{',
    '[]',
    '{ "draftVersion": 2, "answers": {}, "at": "" }',
    '{ "draftVersion": 1, "answers": [] }',
  ])('that reads %j is set aside, not thrown away', async (text) => {
    const file = join(folder, 'd.json');
    await writeFile(file, text);
    expect(await findDraft(file)).toEqual({ kind: 'damaged', keptAs: `${file}.damaged` });
    expect(await readFile(`${file}.damaged`, 'utf8')).toBe(text);
  });
});
