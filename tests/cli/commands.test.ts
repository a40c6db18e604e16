import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ROOT, runFairlead } from './run-fairlead.js';

const SHEET = join(ROOT, 'examples/tray-cart/tray-cart.json');
const COURSE = join(ROOT, 'examples/tray-cart/nursery-lane.json');

let folder = '';
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fairlead-commands-'));
});
afterAll(() => rm(folder, { recursive: true }));

/** A sheet in the test's folder that differs from the demo's in one text. */
async function sheetWith(name: string, from: string, to: string): Promise<string> {
  const text = await readFile(SHEET, 'utf8');
  expect(text).toContain(from);
  await writeFile(join(folder, name), text.replace(from, to));
  return join(folder, name);
}

describe('--json', () => {
  it.each([
    ['check', [SHEET]],
    ['derive', [SHEET]],
    ['render', [SHEET, '--out', 'firmware']],
    ['rehearse', [SHEET, '--course', COURSE]],
    ['survey', ['new-cart.json', '--defaults']],
  ])('%s: one document on stdout, nothing on stderr, exit 0', async (command, words) => {
    const { exitCode, stdout, stderr } = await runFairlead([command, ...words, '--json'], { folder });
    expect({ exitCode, stderr }).toEqual({ exitCode: 0, stderr: '' });
    expect(JSON.parse(stdout)).toBeTypeOf('object');
  });

  it.each(['check', 'derive', 'render', 'rehearse'])(
    '%s: one document of problems where the sheet is bad',
    async (command) => {
      const bad = await sheetWith('bad.json', '"pitchMm": 10', '"pitchMm": 95');
      const words = { render: ['--out', 'bad-out'], rehearse: ['--course', COURSE] }[command] ?? [];
      const { exitCode, stdout, stderr } = await runFairlead([command, bad, ...words, '--json'], { folder });
      expect({ exitCode, stderr }).toEqual({ exitCode: 2, stderr: '' });
      const document = JSON.parse(stdout) as { ok: boolean; problems: { pointer: string }[] };
      expect(document.ok).toBe(false);
      expect(document.problems.map(({ pointer }) => pointer)).toContain('/sensors/pitchMm');
    },
  );
});

describe('exit codes', () => {
  it('2: a bad sheet, each problem on a line of its own on stderr', async () => {
    const bad = await sheetWith('bad.json', '"pitchMm": 10', '"pitchMm": 95');
    expect(await runFairlead(['derive', bad])).toEqual({
      exitCode: 2,
      stdout: '',
      stderr: `${bad} /sensors/pitchMm: 95 mm is outside 3 to 30 mm. Measure centre to centre between neighbouring sensors.\n`,
    });
  });

  it('2: a folder that cannot be made', async () => {
    await writeFile(join(folder, 'a-file'), '');
    const { exitCode, stderr } = await runFairlead(['render', SHEET, '--out', 'a-file/firmware'], { folder });
    expect(exitCode).toBe(2);
    expect(stderr).toContain('a-file');
    expect(stderr).not.toContain('defect');
  });

  it('3: speeds for which there is no design, with the file, the limits and what to do', async () => {
    const classes = '"classes": [{ "name": "fast", "minRadiusMm": 120, "speedMps": 1.4 }]';
    const fast = await sheetWith('fast.json', '"classes": "auto"', classes);
    await writeFile(
      fast,
      (await readFile(fast, 'utf8')).replace('"aheadOfAxleMm": 75', '"aheadOfAxleMm": 15'),
    );
    const { exitCode, stdout, stderr } = await runFairlead(['derive', fast]);
    expect({ exitCode, stdout }).toEqual({ exitCode: 3, stdout: '' });
    expect(stderr).toMatch(
      /fast\.json \/speeds\/classes: class fast, bends of 120 mm radius: at 1\.40 m\/s no steering law keeps.* control limit 0\.\d+ m\/s\. Smallest changes.* \/sensors\/aheadOfAxleMm from 15 to \d+ mm/,
    );
  });

  it('4: firmware that is not what the sheet gives', async () => {
    const { exitCode, stderr } = await runFairlead(['render', SHEET, '--out', 'nowhere', '--verify'], {
      folder,
    });
    expect(exitCode).toBe(4);
    expect(stderr).toMatch(/constants\.h is not what .*tray-cart\.json gives\./);
  });

  it('5: the emulated chip without a compiler, with what to type', async () => {
    const surroundings = { folder, environment: { PATH: folder } };
    const words = ['rehearse', SHEET, '--course', COURSE, '--on', 'chip'];
    const { exitCode, stdout, stderr } = await runFairlead(words, surroundings);
    expect({ exitCode, stdout }).toEqual({ exitCode: 5, stdout: '' });
    expect(stderr).toBe(
      'missing: gcc-avr. On Debian or Ubuntu, type: sudo apt-get update && sudo apt-get install gcc-avr\n',
    );
  });
});

it('asks nothing where there is no terminal, but says how to go on without', async () => {
  const { exitCode, stdout, stderr } = await runFairlead(['survey', 'cart.json'], { folder });
  expect({ exitCode, stdout }).toEqual({ exitCode: 2, stdout: '' });
  expect(stderr).toMatch(/terminal.*--answers.*--defaults/s);
});
