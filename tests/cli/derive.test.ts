import { mkdtemp, readFile, readdir, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { runFairlead } from './run-fairlead.js';

const SHEET = 'examples/tray-cart/tray-cart.json';
const NAMES = ['bode.svg', 'nyquist.svg', 'bend-entry.svg', 'speed-radius.svg'];
let folder = '';

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fairlead-derive-'));
});
afterAll(() => rm(folder, { recursive: true }));

describe('fairlead derive --figures', () => {
  it('lists the files below the numbers', async () => {
    const target = join(folder, 'text');
    const { exitCode, stdout, stderr } = await runFairlead(['derive', SHEET, '--figures', target]);
    expect({ exitCode, stderr }).toEqual({ exitCode: 0, stderr: '' });
    const paths = NAMES.map((name) => join(target, name));
    expect(stdout).toContain('Speed classes');
    expect(stdout.endsWith(`\n\nFigures:\n${paths.map((path) => `  ${path}\n`).join('')}`)).toBe(true);
    expect((await readdir(target)).sort()).toEqual(NAMES.toSorted());
    expect(await readFile(paths[0]!, 'utf8')).toMatch(/^<svg xmlns="http:\/\/www\.w3\.org\/2000\/svg"/);
  });

  it('keeps --json one document, with the files under `figures`', async () => {
    const target = join(folder, 'json');
    const { exitCode, stdout } = await runFairlead(['derive', SHEET, '--json', '--figures', target]);
    const document = JSON.parse(stdout) as { ok: boolean; figures: string[] };
    expect([exitCode, document.ok]).toEqual([0, true]);
    expect(document.figures).toEqual(NAMES.map((name) => join(target, name)));
    const texts = await Promise.all(
      NAMES.map(async (name) => [
        await readFile(join(target, name), 'utf8'),
        await readFile(join(folder, 'text', name), 'utf8'),
      ]),
    );
    for (const [again, before] of texts) expect(again).toBe(before);
  });

  it('says why a folder takes no files, and gives no numbers then', async () => {
    const words = ['derive', SHEET, '--figures', SHEET];
    expect(await runFairlead(words)).toEqual({
      exitCode: 2,
      stdout: '',
      stderr: `${SHEET}: The figures cannot be written here: there is a file of that name. Name another folder with --figures.\n`,
    });
    const { exitCode, stdout } = await runFairlead([...words, '--json']);
    expect(exitCode).toBe(2);
    expect(JSON.parse(stdout)).toMatchObject({ ok: false, problems: [{ pointer: '' }] });
  });
});
