/** `fairlead survey` without a terminal: what it prints, writes and returns. In a terminal: tests/survey/terminal.test.ts. */
import { spawnSync } from 'node:child_process';
import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { ROOT, runFairlead } from './run-fairlead.js';

let folder: string;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fairlead-survey-'));
});
afterEach(async () => {
  await rm(folder, { recursive: true });
});

const survey = (...words: string[]) => runFairlead(['survey', ...words], { folder });
const answer = (text: string) => writeFile(join(folder, 'answers.json'), text);

describe('fairlead survey without a terminal', () => {
  it('writes the defaults and names the next command', async () => {
    expect(await survey('--defaults')).toEqual({
      exitCode: 0,
      stdout:
        'Written: tray-cart.json\nBeside it, for editors: sheet.schema.json\nNext, type: fairlead derive tray-cart.json\n',
      stderr: '',
    });
    expect((await runFairlead(['check', 'tray-cart.json'], { folder })).exitCode).toBe(0);
    expect(await survey('--defaults')).toEqual({
      exitCode: 0,
      stdout: 'tray-cart.json says so already; nothing was written.\n',
      stderr: '',
    });
  });

  it('prints one JSON document with --json', async () => {
    await answer('{ "/line/widthMm": "2.5 cm" }');
    const { exitCode, stdout, stderr } = await survey('cart.json', '--answers', 'answers.json', '--json');
    expect({ exitCode, stderr }).toEqual({ exitCode: 0, stderr: '' });
    const written = JSON.parse(await readFile(join(folder, 'cart.json'), 'utf8')) as unknown;
    expect(JSON.parse(stdout)).toEqual({ ok: true, file: 'cart.json', sheet: written });
    expect(written).toMatchObject({ name: 'cart', line: { widthMm: 25 } });
  });

  it('tells all problems of the answers at once and writes nothing', async () => {
    await answer('{ "/line/widthMm": "2.5 m", "power": { "emptyV": "7 mm" } }');
    expect(await survey('--answers', 'answers.json')).toEqual({
      exitCode: 2,
      stdout: '',
      stderr:
        'answers.json /power/emptyV: "7 mm": the unit "mm" does not fit here; use V, mV, volt or volts.\n' +
        'answers.json /line/widthMm: 2500 mm is outside 5 to 100 mm. Measure across the line, edge to edge.\n',
    });
    const { stdout } = await survey('--answers', 'answers.json', '--json');
    expect(JSON.parse(stdout)).toMatchObject({
      ok: false,
      problems: [{ pointer: '/power/emptyV' }, { pointer: '/line/widthMm' }],
    });
    expect(await readdir(folder)).toEqual(['answers.json']);
  });

  it('says so where the answers are no JSON, or not there', async () => {
    await answer('{ "/line/widthMm": 25,, }');
    expect(await survey('--answers', 'answers.json')).toMatchObject({
      exitCode: 2,
      stderr: expect.stringContaining('answers.json: This is not JSON: line 1, column 23') as string,
    });
    expect(await survey('--answers', 'none.json')).toMatchObject({
      exitCode: 2,
      stderr: expect.stringContaining('none.json: There is no such file') as string,
    });
  });

  it('leaves the old sheet as it was when it is ended while writing', async () => {
    await survey('--defaults');
    const before = await readFile(join(folder, 'tray-cart.json'), 'utf8');
    await answer('{ "/line/widthMm": 25 }');
    // A file may grow to one block of 1024 bytes; the sheet is longer, and the system then ends the process.
    const script = `ulimit -f 1; exec "$0" "$@"`;
    const words = [`${ROOT}/bin/fairlead.js`, 'survey', '--answers', 'answers.json', '--replace'];
    const { signal } = spawnSync('bash', ['-c', script, process.execPath, ...words], { cwd: folder });
    expect(signal).toBe('SIGXFSZ');
    expect(await readFile(join(folder, 'tray-cart.json'), 'utf8')).toBe(before);
  });
});
