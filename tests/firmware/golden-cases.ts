/** The golden cases: a build sheet beside the firmware that it gives. */
import { mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { renderFirmware, type RenderedFile } from '../../src/firmware/render.js';
import { designFor } from '../../src/pipeline.js';
import { loadSheet } from '../../src/sheet/load.js';

const HERE = fileURLToPath(new URL('../goldens/', import.meta.url));

export const CASES = readdirSync(HERE, { withFileTypes: true })
  .filter((entry) => entry.isDirectory())
  .map(({ name }) => name);

export async function renderCase(name: string): Promise<RenderedFile[]> {
  const { sheet, digest } = await loadSheet(join(HERE, name, 'sheet.json'));
  return renderFirmware({ digest }, designFor(sheet));
}

/** The golden files of a case, by path, as they are on disk. */
export function goldenFiles(name: string): Record<string, string> {
  const names = readdirSync(join(HERE, name), { recursive: true, withFileTypes: true });
  const files = names.filter((entry) => entry.isFile() && entry.name !== 'sheet.json');
  return Object.fromEntries(
    files.map(({ parentPath, name: file }) => {
      const path = join(parentPath, file);
      return [path.slice(join(HERE, name).length + 1), readFileSync(path, 'utf8')];
    }),
  );
}

/** Replaces the golden files of a case; what changed is for `git diff` and a reader. */
export function replaceGolden(name: string, files: readonly RenderedFile[]): void {
  for (const path of Object.keys(goldenFiles(name))) rmSync(join(HERE, name, path));
  for (const { path, text } of files) {
    mkdirSync(dirname(join(HERE, name, path)), { recursive: true });
    writeFileSync(join(HERE, name, path), text);
  }
}
