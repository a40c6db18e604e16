// How long a person waits before anything appears: median wall time of bare node, of `fairlead --help` and of a second
// `npm start -- --version`, and their ratios to bare node in this run.
import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';

const RUNS = 15;
const root = fileURLToPath(new URL('..', import.meta.url));
const node = process.execPath;
const npm = process.env.npm_execpath ? [node, process.env.npm_execpath] : ['npm'];

function medianMs(command, args) {
  const times = Array.from({ length: RUNS }, () => {
    const begun = performance.now();
    const { status } = spawnSync(command, args, { cwd: root });
    if (status !== 0) throw new Error(`${command} ${args.join(' ')} ended with ${status}`);
    return performance.now() - begun;
  });
  return times.sort((a, b) => a - b)[(RUNS - 1) / 2];
}

const bareMs = medianMs(node, ['-e', '0']);
const rows = [
  ['bare node', bareMs],
  ['fairlead --help', medianMs(node, ['bin/fairlead.js', '--help'])],
  ['npm start, set up', medianMs(npm[0], [...npm.slice(1), 'start', '--silent', '--', '--version'])],
];
for (const [name, ms] of rows) {
  console.log(`${name.padEnd(20)} ${ms.toFixed(0).padStart(5)} ms  ${(ms / bareMs).toFixed(1)} x bare node`);
}
