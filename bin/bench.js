#!/usr/bin/env node
// `npm run bench`: set-up, then every file of bench/ in turn, or those named (`npm run bench -- start-up`).
import { spawnSync } from 'node:child_process';
import { readdirSync } from 'node:fs';
import { basename, join } from 'node:path';
import { build, dependencies, root, setUp } from './set-up.js';

await setUp(dependencies, build);
const named = process.argv.slice(2);
const files = readdirSync(join(root, 'bench')).filter((file) => file.endsWith('.js'));
const wanted = files.filter((file) => named.length === 0 || named.includes(basename(file, '.js')));
if (wanted.length === 0)
  console.error(`No such benchmark; there are: ${files.map((file) => basename(file, '.js')).join(', ')}`);
for (const file of wanted.sort()) {
  console.log(`\n${basename(file, '.js')}`);
  const { status } = spawnSync(process.execPath, [join(root, 'bench', file)], {
    cwd: root,
    stdio: 'inherit',
  });
  if (status !== 0) process.exitCode = 1;
}
if (wanted.length === 0) process.exitCode = 2;
