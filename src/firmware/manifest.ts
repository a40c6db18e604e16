/**
 * The manifest beside the firmware: which sheet and version the files came from, and the digest of each as it was written.
 *
 * By the digests a hand edit is told from an old version. While files are being replaced, the manifest admits the old and the new
 * digest of each (`before`), so that an interruption leaves nothing that looks edited. The sheet itself is not copied into it:
 * it has its own place, and the digest says whether it is the one.
 */
import { createHash } from 'node:crypto';
import { EXIT, FairleadError } from '../sheet/problem.js';
import { VERSION } from '../version.js';
import type { RenderedFile, SheetIdentity } from './render.js';

export const MANIFEST_NAME = 'fairlead.manifest.json';

interface ManifestEntry {
  /** Within the firmware's folder, with forward slashes. */
  path: string;
  /** SHA-256, hexadecimal. */
  sha256: string;
  /** Digest that the file may still have, while files are being replaced. */
  before?: string;
}

export interface Manifest {
  manifestVersion: 1;
  /** Version of fairlead that wrote the files. */
  fairlead: string;
  /** SHA-256 of the build sheet. */
  sheetSha256: string;
  /** The tool's files; the user's own are not its business. */
  files: ManifestEntry[];
}

export function sha256(text: string | Uint8Array): string {
  return createHash('sha256').update(text).digest('hex');
}

/** The part of a rendered path within the firmware's folder. */
export function pathWithin(file: RenderedFile): string {
  return file.path.slice(file.path.indexOf('/') + 1);
}

/** The manifest of a set of files. */
export function manifestOf(files: readonly RenderedFile[], sheet: SheetIdentity): Manifest {
  const entries = files
    .filter(({ owner }) => owner === 'tool')
    .map((file) => ({ path: pathWithin(file), sha256: sha256(file.text) }));
  entries.sort((a, b) => (a.path < b.path ? -1 : 1));
  return { manifestVersion: 1, fairlead: VERSION, sheetSha256: sheet.digest, files: entries };
}

export function manifestText(manifest: Manifest): string {
  return `${JSON.stringify(manifest, null, 2)}\n`;
}

/**
 * The manifest while files are being replaced: that of the new files, admitting the old digests as well, and the files that
 * are about to go.
 */
export function transitionManifest(next: Manifest, previous: Manifest | undefined): Manifest {
  const old = new Map(previous?.files.map((entry) => [entry.path, entry.sha256]));
  const kept = next.files.map((entry) => {
    const before = old.get(entry.path);
    return before === undefined ? entry : { ...entry, before };
  });
  const names = new Set(next.files.map(({ path }) => path));
  const going = previous?.files.filter(({ path }) => !names.has(path)) ?? [];
  return { ...next, files: [...kept, ...going] };
}

function isEntry(value: unknown): value is ManifestEntry {
  if (typeof value !== 'object' || value === null) return false;
  const entry = value as Partial<Record<keyof ManifestEntry, unknown>>;
  // A path that leaves the folder is nobody's: files that the manifest names may be deleted.
  return (
    typeof entry.path === 'string' &&
    /^[A-Za-z0-9_-]+(\.[A-Za-z0-9]+)+$/.test(entry.path) &&
    typeof entry.sha256 === 'string'
  );
}

/**
 * Reads a manifest.
 *
 * @throws FairleadError when it is not one of ours, or of a later version
 */
export function parseManifest(text: string, file: string): Manifest {
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    value = undefined;
  }
  const { manifestVersion, files } = (value ?? {}) as Partial<Record<keyof Manifest, unknown>>;
  if (manifestVersion !== 1 || !Array.isArray(files) || !files.every(isEntry))
    throw new FairleadError(
      `${file} is damaged or of a later version. Restore it from your version control, or move its folder away and render again.`,
      { exitCode: EXIT.filesDiffer, file },
    );
  return value as Manifest;
}
