/** The version of this package, as its package.json says it. */
import { readFileSync } from 'node:fs';

interface PackageFile {
  version: string;
}

const text = readFileSync(new URL('../package.json', import.meta.url), 'utf8');

export const VERSION = (JSON.parse(text) as PackageFile).version;
