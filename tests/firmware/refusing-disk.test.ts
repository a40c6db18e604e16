/** A disk that refuses to write, at every point at which it can: the old files stay as they were. */
import { mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs';
import type * as FileSystem from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { planRender } from '../../src/firmware/plan.js';
import type { RenderedFile } from '../../src/firmware/render.js';
import { writePlan } from '../../src/firmware/write.js';
import { NEW, OLD, VERSION_1, VERSION_2 } from './two-versions.js';

/** What the disk still lets through. */
const disk = vi.hoisted(() => ({ writesLeft: Infinity, renamesLeft: Infinity, hasLinks: true }));

vi.mock('node:fs/promises', async (original) => {
  const real = await original<typeof FileSystem>();
  const failure = (code: string) => Object.assign(new Error(code), { code });
  return {
    ...real,
    async open(path: string, flags: string) {
      const file = await real.open(path, flags);
      const writeWhole = file.writeFile.bind(file);
      file.writeFile = async (data) => {
        if (disk.writesLeft-- > 0) return writeWhole(data);
        await writeWhole(String(data).slice(0, 1));
        throw failure('ENOSPC');
      };
      return file;
    },
    async rename(from: string, to: string) {
      // Taking back must work; it is told by where it goes to.
      const isBack = from.includes('old-');
      if (!isBack && disk.renamesLeft-- <= 0) throw failure('EIO');
      await real.rename(from, to);
    },
    async link(from: string, to: string) {
      if (!disk.hasLinks) throw failure('EPERM');
      await real.link(from, to);
    },
  };
});

let out: string;
beforeEach(() => {
  Object.assign(disk, { writesLeft: Infinity, renamesLeft: Infinity, hasLinks: true });
  out = mkdtempSync(join(tmpdir(), 'fairlead-disk-'));
});
afterEach(() => rmSync(out, { recursive: true, force: true }));

const at = (name: string) => join(out, 'cart', name);
const contents = () =>
  Object.fromEntries(readdirSync(join(out, 'cart')).map((name) => [name, readFileSync(at(name), 'utf8')]));

async function write(files: readonly RenderedFile[], sheet = OLD): Promise<void> {
  await writePlan(await planRender(files, sheet, out));
}

describe('a disk that refuses', () => {
  it('leaves everything as it was when it is full half way through a file', async () => {
    await write(VERSION_1);
    const before = contents();
    const plan = await planRender(VERSION_2, NEW, out);
    for (const writesThatFit of [0, 1, 2, 3]) {
      disk.writesLeft = writesThatFit;
      await expect(writePlan(plan)).rejects.toMatchObject({ code: 'ENOSPC' });
      expect(contents()).toEqual(before);
      expect(readdirSync(out)).toEqual(['cart']);
    }
    disk.writesLeft = Infinity;
    await writePlan(plan);
    expect(contents()['new.h']).toBe('y\n');
  });

  it('leaves no folder behind that it made for nothing', async () => {
    const plan = await planRender(VERSION_1, OLD, join(out, 'deep', 'er'));
    disk.writesLeft = 2;
    await expect(writePlan(plan)).rejects.toMatchObject({ code: 'ENOSPC' });
    expect(readdirSync(out)).toEqual([]);
  });

  it('takes back what was done when a rename fails, whichever it is', async () => {
    await write(VERSION_1);
    const before = contents();
    const plan = await planRender(VERSION_2, NEW, out);
    // Transition manifest, b.cpp, new.h and the manifest are renamed into place; gone.h is removed.
    for (const renamesThatWork of [0, 1, 2, 3]) {
      disk.renamesLeft = renamesThatWork;
      await expect(writePlan(plan)).rejects.toMatchObject({ code: 'EIO' });
      expect(contents()).toEqual(before);
      expect(readdirSync(out)).toEqual(['cart']);
    }
    disk.renamesLeft = Infinity;
    await writePlan(plan);
    expect(Object.keys(contents())).not.toContain('gone.h');
  });

  it('does without hard links where there are none', async () => {
    disk.hasLinks = false;
    await write(VERSION_1);
    await write(VERSION_2, NEW);
    expect(contents()['b.cpp']).toBe('one\nTWO\nthree\n');
  });
});
