/** Writing firmware: what is planned, what is kept, and what a refusing disk leaves behind. */
import { mkdirSync, mkdtempSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { MANIFEST_NAME, sha256 } from '../../src/firmware/manifest.js';
import { isUpToDate, planRender } from '../../src/firmware/plan.js';
import type { RenderedFile } from '../../src/firmware/render.js';
import { writePlan } from '../../src/firmware/write.js';
import { NEW, OLD, VERSION_1, VERSION_2 } from './two-versions.js';

let out: string;
beforeEach(() => {
  out = mkdtempSync(join(tmpdir(), 'fairlead-write-'));
});
afterEach(() => {
  rmSync(out, { recursive: true, force: true });
});

const at = (name: string) => join(out, 'cart', name);
const read = (name: string) => readFileSync(at(name), 'utf8');
const contents = () =>
  Object.fromEntries(readdirSync(join(out, 'cart')).map((name) => [name, readFileSync(at(name), 'utf8')]));

async function write(files: readonly RenderedFile[], sheet = OLD): Promise<void> {
  await writePlan(await planRender(files, sheet, out));
}

async function statuses(files: readonly RenderedFile[], sheet = OLD): Promise<Record<string, string>> {
  const plan = await planRender(files, sheet, out);
  return Object.fromEntries(plan.files.map(({ path, status }) => [path.replace('cart/', ''), status]));
}

describe('planning', () => {
  it('knows new, same, changed, obsolete and kept files', async () => {
    expect(new Set(Object.values(await statuses(VERSION_1)))).toEqual(new Set(['new']));
    await write(VERSION_1);
    const plan = await planRender(VERSION_1, OLD, out);
    expect(isUpToDate(plan)).toBe(true);
    expect(await statuses(VERSION_2, NEW)).toEqual({
      'a.h': 'same',
      'b.cpp': 'changed',
      'new.h': 'new',
      'user_hooks.cpp': 'kept',
      'gone.h': 'obsolete',
      [MANIFEST_NAME]: 'changed',
    });
  });

  it('counts lines', async () => {
    await write(VERSION_1);
    const { files } = await planRender(VERSION_2, NEW, out);
    expect(files.find(({ path }) => path === 'cart/b.cpp')?.changes).toEqual({ added: 2, removed: 1 });
  });

  it('takes a missing manifest for a difference', async () => {
    await write(VERSION_1);
    rmSync(at(MANIFEST_NAME));
    expect(isUpToDate(await planRender(VERSION_1, OLD, out))).toBe(false);
  });

  it('refuses a manifest that is none', async () => {
    await write(VERSION_1);
    writeFileSync(
      at(MANIFEST_NAME),
      '{ "manifestVersion": 1, "files": [{ "path": "../../x", "sha256": "0" }] }',
    );
    await expect(planRender(VERSION_1, OLD, out)).rejects.toMatchObject({ exitCode: 4 });
  });
});

describe('writing', () => {
  it('writes all files and a manifest with their digests', async () => {
    await write(VERSION_1);
    expect(read('b.cpp')).toBe('one\ntwo\n');
    const manifest = JSON.parse(read(MANIFEST_NAME)) as {
      sheetSha256: string;
      files: { path: string; sha256: string }[];
    };
    expect(manifest.sheetSha256).toBe(OLD.digest);
    expect(manifest.files).toContainEqual({ path: 'b.cpp', sha256: sha256('one\ntwo\n') });
    expect(manifest.files.map(({ path }) => path)).not.toContain('user_hooks.cpp');
    expect(readdirSync(out)).toEqual(['cart']);
  });

  it("replaces, removes and adds; the user's files stay", async () => {
    await write(VERSION_1);
    writeFileSync(at('user_hooks.cpp'), 'mine\n');
    writeFileSync(at('notes.txt'), 'mine too\n');
    await write(VERSION_2, NEW);
    expect(Object.keys(contents()).sort()).toEqual([
      'a.h',
      'b.cpp',
      MANIFEST_NAME,
      'new.h',
      'notes.txt',
      'user_hooks.cpp',
    ]);
    expect(read('b.cpp')).toBe('one\nTWO\nthree\n');
    expect(read('user_hooks.cpp')).toBe('mine\n');
    expect(await statuses(VERSION_2, NEW)).not.toContain('changed');
  });

  it('refuses hand edits, names them all, and writes nothing', async () => {
    await write(VERSION_1);
    writeFileSync(at('a.h'), 'one, edited\n');
    writeFileSync(at('gone.h'), 'x, edited\n');
    const before = contents();
    const failure = write(VERSION_2, NEW);
    await expect(failure).rejects.toMatchObject({ exitCode: 4 });
    const problems = await failure.catch(
      (error: unknown) => (error as { problems: { message: string }[] }).problems,
    );
    expect(problems).toHaveLength(2);
    expect(JSON.stringify(problems)).toContain(at('gone.h'));
    expect(contents()).toEqual(before);
  });

  it('refuses to overwrite a file that it has never written', async () => {
    mkdirSync(join(out, 'cart'));
    writeFileSync(at('a.h'), 'somebody else\n');
    await expect(write(VERSION_1)).rejects.toMatchObject({ exitCode: 4 });
    expect(readdirSync(join(out, 'cart'))).toEqual(['a.h']);
  });

  it('goes on after having been killed between two renames', async () => {
    await write(VERSION_1);
    const oldFiles = contents();
    await write(VERSION_2, NEW);
    // As a kill after the first rename leaves it: transition manifest, one file new, the rest old.
    const manifest = JSON.parse(read(MANIFEST_NAME)) as { files: { path: string; before?: string }[] };
    for (const entry of manifest.files) {
      const old = oldFiles[entry.path];
      if (old !== undefined) entry.before = sha256(old);
    }
    writeFileSync(at(MANIFEST_NAME), JSON.stringify(manifest));
    writeFileSync(at('a.h'), oldFiles['a.h'] ?? '');
    mkdirSync(join(out, '.fairlead-staging-999999999-abc'));
    await write(VERSION_1);
    expect(contents()).toMatchObject({ 'a.h': 'one\n', 'b.cpp': 'one\ntwo\n', 'gone.h': 'x\n' });
    expect(readdirSync(out)).toEqual(['cart']);
  });
});
