// One process at a time: a lock file that holds its owner's process id. A lock whose owner has died is taken over.
import { mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { dirname } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';

const POLL_MS = 200;

function ownerIsAlive(path) {
  try {
    process.kill(Number(readFileSync(path, 'utf8')), 0);
    return true;
  } catch (error) {
    return error.code === 'EPERM';
  }
}

function take(path) {
  try {
    writeFileSync(path, String(process.pid), { flag: 'wx' });
    return true;
  } catch (error) {
    if (error.code !== 'EEXIST') throw error;
    return false;
  }
}

/** Waits for the lock at `path`, runs `work`, releases the lock. */
export async function withLock(path, work) {
  mkdirSync(dirname(path), { recursive: true });
  let announced = false;
  while (!take(path)) {
    if (!ownerIsAlive(path)) rmSync(path, { force: true });
    else if (announced) await sleep(POLL_MS);
    else process.stderr.write(`waiting for another process that holds ${path}\n`);
    announced = true;
  }
  try {
    return await work();
  } finally {
    rmSync(path, { force: true });
  }
}
