#!/usr/bin/env node
// The command line's entry. A package holds the compiled files; a fresh checkout is set up first.
import { existsSync } from 'node:fs';

const main = new URL('../dist/cli/main.js', import.meta.url);
if (!existsSync(main)) {
  const { build, dependencies, setUp } = await import('./set-up.js');
  await setUp(dependencies, build);
}
const { run } = await import(main.href);
await run(process.argv);
