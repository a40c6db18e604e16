/**
 * Writes a planned firmware so that an interruption, a full disk or a read-only folder leaves the old files as they were.
 *
 * Everything is first written, and flushed, into a staging folder beside the firmware, and the old files get a second name there;
 * only then do renames within one file system put the new ones into place, each atomic and needing no space. If one of them
 * fails, those before it are undone. A process that is killed
 * between two renames leaves a manifest that knows the old and the new version of each file (manifest.ts), so that the next
 * run carries on. Hand edits stop everything before the first byte.
 */
import { copyFile, link, mkdir, mkdtemp, open, readdir, rename, rm, rmdir, unlink } from 'node:fs/promises';
import { dirname, join, resolve } from 'node:path';
import { EXIT, FairleadError, type Problem } from '../sheet/problem.js';
import { MANIFEST_NAME, manifestText, transitionManifest } from './manifest.js';
import { type RenderPlan, isUpToDate } from './plan.js';

const STAGING_PREFIX = '.fairlead-staging-';

/** @throws FairleadError with exit code 4 that names every edited file */
export function refuseEdits(plan: RenderPlan): void {
  const edited = plan.files.filter(({ status }) => status === 'edited');
  if (edited.length === 0) return;
  const problems = edited.map(({ path }): Problem => ({
    pointer: '',
    message: `${join(plan.out, path)} was edited by hand, or was not written by fairlead; nothing was written.`,
    fix: 'Put the change into the sheet or into user_hooks and delete or move this file; then render again.',
  }));
  const message = `${edited.length} file(s) were edited by hand.`;
  throw new FairleadError(message, { exitCode: EXIT.filesDiffer, problems });
}

async function writeFlushed(path: string, text: string): Promise<void> {
  const file = await open(path, 'wx');
  try {
    await file.writeFile(text);
    await file.sync();
  } finally {
    await file.close();
  }
}

/** One change of a file in place. */
interface Change {
  target: string;
  /** Staged new version; absent when the file goes. */
  replacement?: string;
  /** Staged copy of the old version; absent when there was none. */
  backup?: string;
}

async function apply({ target, replacement }: Change): Promise<void> {
  if (replacement === undefined) await unlink(target);
  else await rename(replacement, target);
}

async function undo({ target, backup }: Change): Promise<void> {
  if (backup === undefined) await unlink(target);
  else await rename(backup, target);
}

/** Carries out changes in order; when one fails, takes back those before it and passes the failure on. */
async function applyAll(changes: readonly Change[]): Promise<void> {
  const done: Change[] = [];
  try {
    for (const change of changes) {
      await apply(change);
      done.push(change);
    }
  } catch (error) {
    for (const change of done.reverse()) await undo(change);
    throw error;
  }
}

/** A second name for the file, or a copy where the file system has no hard links. */
async function keep(target: string, backup: string): Promise<void> {
  try {
    await link(target, backup);
  } catch {
    await copyFile(target, backup);
  }
}

/** Writes everything that is needed into the staging folder; returns the changes that put it into place. */
async function stage(plan: RenderPlan, staging: string): Promise<Change[]> {
  const changes: Change[] = [];
  const add = async (
    name: string,
    label: string,
    text: string | undefined,
    isThere: boolean,
  ): Promise<void> => {
    const change: Change = { target: join(plan.out, plan.folder, name) };
    if (isThere) await keep(change.target, (change.backup = join(staging, `old-${label}`)));
    if (text !== undefined) await writeFlushed((change.replacement = join(staging, `new-${label}`)), text);
    changes.push(change);
  };
  const transition = manifestText(transitionManifest(plan.manifest, plan.previous));
  await add(MANIFEST_NAME, `transition-${MANIFEST_NAME}`, transition, plan.previous !== undefined);
  for (const { path, status, file } of plan.files) {
    const name = path.slice(plan.folder.length + 1);
    if (name === MANIFEST_NAME) continue;
    if (status === 'new' || status === 'changed') await add(name, name, file?.text, status === 'changed');
    if (status === 'obsolete') await add(name, name, undefined, true);
  }
  // The last change: nothing after it can fail, so it needs no backup.
  changes.push({
    target: join(plan.out, plan.folder, MANIFEST_NAME),
    replacement: join(staging, `new-${MANIFEST_NAME}`),
  });
  await writeFlushed(join(staging, `new-${MANIFEST_NAME}`), manifestText(plan.manifest));
  return changes;
}

function isAlive(processId: number): boolean {
  try {
    process.kill(processId, 0);
    return true;
  } catch {
    return false;
  }
}

/** Removes staging folders of processes that were killed. */
async function removeLeftovers(out: string): Promise<void> {
  for (const name of await readdir(out)) {
    const owner = name.startsWith(STAGING_PREFIX) ? Number.parseInt(name.slice(STAGING_PREFIX.length)) : NaN;
    if (owner > 0 && !isAlive(owner)) await rm(join(out, name), { recursive: true, force: true });
  }
}

/** Removes a folder made for nothing, and those above it up to the first that was made. */
async function removeMade(folder: string, firstMade: string | undefined): Promise<void> {
  if (firstMade === undefined) return;
  const topmost = resolve(firstMade);
  for (let each = resolve(folder); each.startsWith(topmost); each = dirname(each)) {
    try {
      await rmdir(each);
    } catch {
      return;
    }
  }
}

/**
 * Writes what the plan says; nothing when all is as it should be.
 *
 * @throws FairleadError with exit code 4 when files were edited by hand; the system's error when the disk refuses
 */
export async function writePlan(plan: RenderPlan): Promise<void> {
  refuseEdits(plan);
  if (isUpToDate(plan)) return;
  const target = join(plan.out, plan.folder);
  const firstMade = await mkdir(target, { recursive: true });
  try {
    const staging = await mkdtemp(join(plan.out, `${STAGING_PREFIX}${process.pid}-`));
    try {
      await applyAll(await stage(plan, staging));
    } finally {
      await rm(staging, { recursive: true, force: true });
    }
  } catch (error) {
    await removeMade(target, firstMade);
    throw error;
  }
  await removeLeftovers(plan.out);
}
