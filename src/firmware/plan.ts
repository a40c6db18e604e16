/**
 * Compares rendered files with what is on disk, before anything is written.
 *
 *   new       not there yet                        same      already as rendered
 *   changed   an older version of ours             edited    neither ours as it was written nor as rendered
 *   obsolete  ours, no longer part of the sketch   kept      the user's own, there already
 */
import { readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { type LineChanges, lineChanges } from './line-changes.js';
import {
  MANIFEST_NAME,
  type Manifest,
  manifestOf,
  manifestText,
  parseManifest,
  pathWithin,
  sha256,
} from './manifest.js';
import type { RenderedFile, SheetIdentity } from './render.js';

export type FileStatus = 'new' | 'same' | 'changed' | 'edited' | 'obsolete' | 'kept';

export interface PlannedFile {
  /** Relative to the output folder. */
  path: string;
  status: FileStatus;
  /** Lines added and removed by writing it; none for edited and kept files. */
  changes: LineChanges;
  /** What is to be written; absent for obsolete files. */
  file?: RenderedFile;
}

export interface RenderPlan {
  /** Output folder, and the firmware's folder in it. */
  out: string;
  folder: string;
  /** All files, the manifest last. */
  files: PlannedFile[];
  /** The manifest to be written, and the one on disk. */
  manifest: Manifest;
  previous: Manifest | undefined;
}

const NONE: LineChanges = { added: 0, removed: 0 };

/** The file's text; undefined when there is none. */
async function readIfThere(path: string): Promise<string | undefined> {
  try {
    return await readFile(path, 'utf8');
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return undefined;
    throw error;
  }
}

function planFile(file: RenderedFile, onDisk: string | undefined, known: ReadonlySet<string>): PlannedFile {
  const { path, text, owner } = file;
  if (onDisk === undefined) return { path, file, status: 'new', changes: lineChanges('', text) };
  if (owner === 'user') return { path, file, status: 'kept', changes: NONE };
  if (onDisk === text) return { path, file, status: 'same', changes: NONE };
  if (!known.has(sha256(onDisk))) return { path, file, status: 'edited', changes: NONE };
  return { path, file, status: 'changed', changes: lineChanges(onDisk, text) };
}

/** Digests that a file of ours may have. */
function knownDigests(previous: Manifest | undefined, path: string): Set<string> {
  const entries = previous?.files.filter((entry) => entry.path === path) ?? [];
  return new Set(entries.flatMap(({ sha256: digest, before }) => [digest, before ?? digest]));
}

async function planObsolete(plan: RenderPlan, names: ReadonlySet<string>): Promise<PlannedFile[]> {
  const planned: PlannedFile[] = [];
  for (const { path } of plan.previous?.files ?? []) {
    const onDisk = names.has(path) ? undefined : await readIfThere(join(plan.out, plan.folder, path));
    if (onDisk === undefined) continue;
    const untouched = knownDigests(plan.previous, path).has(sha256(onDisk));
    planned.push({
      path: `${plan.folder}/${path}`,
      status: untouched ? 'obsolete' : 'edited',
      changes: untouched ? lineChanges(onDisk, '') : NONE,
    });
  }
  return planned;
}

/** The manifest is written whenever it is not as it should be; parseManifest has refused what is not a manifest. */
function planManifest(plan: RenderPlan, onDisk: string | undefined): PlannedFile {
  const path = `${plan.folder}/${MANIFEST_NAME}`;
  const file: RenderedFile = { path, text: manifestText(plan.manifest), owner: 'tool' };
  const status = onDisk === undefined ? 'new' : onDisk === file.text ? 'same' : 'changed';
  return { path, file, status, changes: lineChanges(onDisk ?? '', file.text) };
}

/**
 * What writing the files into a folder would do.
 *
 * @param files one firmware, all below one folder
 * @param out output folder; need not exist
 */
export async function planRender(
  files: readonly RenderedFile[],
  sheet: SheetIdentity,
  out: string,
): Promise<RenderPlan> {
  const folder = files[0]!.path.split('/')[0]!;
  const manifestPath = join(out, folder, MANIFEST_NAME);
  const text = await readIfThere(manifestPath);
  const previous = text === undefined ? undefined : parseManifest(text, manifestPath);
  const plan: RenderPlan = { out, folder, files: [], manifest: manifestOf(files, sheet), previous };
  for (const file of files) {
    const onDisk = await readIfThere(join(out, file.path));
    plan.files.push(planFile(file, onDisk, knownDigests(previous, pathWithin(file))));
  }
  plan.files.push(...(await planObsolete(plan, new Set(files.map(pathWithin)))));
  plan.files.push(planManifest(plan, text));
  return plan;
}

/** Whether the files on disk are those of the sheet: nothing to write, nothing edited. */
export function isUpToDate(plan: RenderPlan): boolean {
  return plan.files.every(({ status }) => status === 'same' || status === 'kept');
}
