/** `fairlead render` as a person uses it. */
import { appendFile, mkdtemp, readFile, readdir, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { ROOT, runFairlead } from './run-fairlead.js';

const SHEET = join(ROOT, 'examples/tray-cart/tray-cart.json');

let folder = '';
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fairlead-render-'));
});
afterEach(() => rm(folder, { recursive: true }));

const render = (sheet: string, ...words: string[]) =>
  runFairlead(['render', sheet, '--out', 'out', ...words], { folder });

/** A copy of the demo sheet with one text replaced. */
async function sheetWith(from: string, to: string): Promise<string> {
  const text = await readFile(SHEET, 'utf8');
  expect(text).toContain(from);
  await writeFile(join(folder, 'cart.json'), text.replace(from, to));
  return 'cart.json';
}

const at = (name: string) => join(folder, 'out', 'tray-cart', name);

describe('render', () => {
  it('lists the new files, then finds nothing to change', async () => {
    const first = await render(SHEET);
    expect(first.exitCode).toBe(0);
    expect(first.stdout).toMatch(/tray-cart\/constants\.h +new \(\+\d+ lines\)/);
    expect(first.stdout).toContain('The firmware is in out/tray-cart.');
    const second = await render(SHEET);
    expect(second.stdout).toMatch(/user_hooks\.h +yours, kept/);
    expect(second.stdout).toMatch(/\d+ files unchanged/);
  });

  it('shows what a changed sheet changes, and with --dry-run writes nothing', async () => {
    await render(SHEET);
    const before = await readFile(at('constants.h'), 'utf8');
    const changed = await sheetWith('"runLimitS": 120', '"runLimitS": 60');
    const dry = await render(changed, '--dry-run');
    expect(dry.stdout).toMatch(/constants\.h +changed \(\+2 -2 lines\)/);
    expect(dry.stdout).toContain('Nothing was written.');
    expect(await readFile(at('constants.h'), 'utf8')).toBe(before);
    const verified = await render(changed, '--verify');
    expect(verified.exitCode).toBe(4);
    expect(verified.stderr).toContain('constants.h is not what cart.json gives.');
    expect((await render(changed)).exitCode).toBe(0);
    expect(await readFile(at('constants.h'), 'utf8')).toContain('RUN_LIMIT_SAMPLES = 30000UL;');
    expect((await render(changed, '--verify')).exitCode).toBe(0);
  });

  it('refuses a hand edit, names it and writes nothing; user_hooks may be edited', async () => {
    await render(SHEET);
    await appendFile(at('steering.cpp'), '// tuned by hand\n');
    await appendFile(at('user_hooks.cpp'), '// my own\n');
    const before = await readFile(at('constants.h'), 'utf8');
    const { exitCode, stdout, stderr } = await render(await sheetWith('"runLimitS": 120', '"runLimitS": 60'));
    expect({ exitCode, stdout }).toEqual({ exitCode: 4, stdout: '' });
    expect(stderr).toBe(
      'out/tray-cart/steering.cpp was edited by hand, or was not written by fairlead; nothing was written. Put the change into the sheet or into user_hooks and delete or move this file; then render again.\n',
    );
    expect(await readFile(at('constants.h'), 'utf8')).toBe(before);
    await rm(at('steering.cpp'));
    expect((await render(SHEET)).exitCode).toBe(0);
    expect(await readFile(at('user_hooks.cpp'), 'utf8')).toContain('// my own');
  });

  it.each([['../../x'], ['*/ system(\\"x\\") /*'], ['\u{1f331}'], ['con'], ['']])(
    'writes nothing for a vehicle named %j',
    async (name) => {
      const { exitCode, stderr } = await render(await sheetWith('"name": "tray-cart"', `"name": "${name}"`));
      expect(exitCode).toBe(2);
      expect(stderr).toContain('/name');
      expect(await readdir(folder)).toEqual(['cart.json']);
    },
  );

  it('takes a C++ keyword for a name, as it names a folder only', async () => {
    const { exitCode } = await render(await sheetWith('"name": "tray-cart"', '"name": "switch"'));
    expect(exitCode).toBe(0);
    expect(await readdir(join(folder, 'out', 'switch'))).toContain('switch.ino');
  });
});
