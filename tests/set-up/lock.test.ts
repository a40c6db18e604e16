import { spawnSync } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { withLock } from '../../bin/lock.js';

let folder = '';
beforeEach(() => (folder = mkdtempSync(join(tmpdir(), 'fairlead-lock-'))));
afterEach(() => rmSync(folder, { recursive: true }));

it('lets one holder in at a time and leaves no lock behind', async () => {
  const lock = join(folder, 'cache', 'a.lock');
  const order: string[] = [];
  const work = (name: string) => async () => {
    order.push(`${name} in`);
    await new Promise((resolve) => setTimeout(resolve, 50));
    order.push(`${name} out`);
  };
  await Promise.all([withLock(lock, work('first')), withLock(lock, work('second'))]);
  expect(order).toEqual(['first in', 'first out', 'second in', 'second out']);
  expect(existsSync(lock)).toBe(false);
});

it('takes over the lock of a process that has died', async () => {
  const lock = join(folder, 'a.lock');
  const dead = spawnSync(process.execPath, ['-e', '']).pid;
  writeFileSync(lock, String(dead));
  expect(await withLock(lock, () => 'done')).toBe('done');
});

it('releases the lock when the work fails', async () => {
  const lock = join(folder, 'a.lock');
  const failing = withLock(lock, () => {
    throw new Error('no space');
  });
  await expect(failing).rejects.toThrow('no space');
  expect(existsSync(lock)).toBe(false);
});
