#!/usr/bin/env node
// Brings a checkout to the state in which it can run: packages, build, toolchain. Uses Node's own modules only,
// because it runs before node_modules exists. Each step first looks whether it is needed (a few milliseconds).
// Run directly: `node bin/set-up.js` does packages and build, `node bin/set-up.js --toolchain` the toolchain too.
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { withLock } from './lock.js';
import { howToInstall, missingForTests } from './toolchain.js';

export const root = fileURLToPath(new URL('..', import.meta.url));
const at = (...parts) => join(root, ...parts);
const digestFile = at('dist', '.sources-digest');

/** A step that cannot be done here; the message says what to type. */
export class SetUpError extends Error {
  constructor(message, exitCode) {
    super(message);
    this.exitCode = exitCode;
  }
}

/** Runs a program with its output on our stderr, so that stdout stays free for the job itself. */
function run([command, ...args], options = {}) {
  const result = spawnSync(command, args, { cwd: root, stdio: ['ignore', 2, 2], ...options });
  return result.status === 0;
}

function say(text) {
  process.stderr.write(`set-up: ${text}\n`);
}

/** Whether node_modules holds exactly what package-lock.json asks for (npm keeps its own copy of the lock there). */
function dependenciesAreCurrent() {
  const installedFile = at('node_modules', '.package-lock.json');
  if (!existsSync(installedFile)) return false;
  const wanted = JSON.parse(readFileSync(at('package-lock.json'), 'utf8')).packages;
  const installed = JSON.parse(readFileSync(installedFile, 'utf8')).packages;
  for (const [path, entry] of Object.entries(wanted)) {
    if (path === '' || (entry.optional && !installed[path])) continue;
    if (installed[path]?.version !== entry.version || installed[path].integrity !== entry.integrity)
      return false;
  }
  return Object.keys(installed).every((path) => path in wanted);
}

/** Installs the locked packages where they are missing or differ. */
export async function dependencies() {
  if (dependenciesAreCurrent()) return;
  await withLock(at('.cache', 'packages.lock'), () => {
    if (dependenciesAreCurrent()) return;
    say('installing packages (npm ci)');
    const npm = process.env.npm_execpath ? [process.execPath, process.env.npm_execpath] : ['npm'];
    const shell = npm.length === 1 && process.platform === 'win32';
    if (!run([...npm, 'ci', '--no-audit', '--no-fund', '--loglevel=error'], { shell })) {
      throw new SetUpError('npm ci failed (it needs the package registry). Type: npm ci', 5);
    }
  });
}

/** Digest of everything that the compiled files depend on. */
function sourcesDigest() {
  const hash = createHash('sha256');
  const sources = readdirSync(at('src'), { recursive: true }).filter((name) => name.endsWith('.ts'));
  for (const name of sources.sort()) hash.update(`${name}\n`).update(readFileSync(at('src', name)));
  for (const name of ['tsconfig.json', 'tsconfig.build.json', 'package-lock.json'])
    hash.update(readFileSync(at(name)));
  return hash.digest('hex');
}

function buildIsCurrent(digest) {
  return existsSync(digestFile) && readFileSync(digestFile, 'utf8') === digest;
}

/** Removes compiled files whose source is gone; tsc leaves them. */
function removeOrphans() {
  for (const name of readdirSync(at('dist'), { recursive: true })) {
    const source = name.match(/^(.*?)(\.d\.ts|\.js)$/);
    if (source && !existsSync(at('src', `${source[1]}.ts`))) rmSync(at('dist', name));
  }
}

/** Compiles src/ to dist/ where a source has changed. */
export async function build() {
  if (buildIsCurrent(sourcesDigest())) return;
  await withLock(at('.cache', 'build.lock'), () => {
    const digest = sourcesDigest();
    if (buildIsCurrent(digest)) return;
    say('building (tsc)');
    rmSync(digestFile, { force: true });
    const tsc = at('node_modules', 'typescript', 'bin', 'tsc');
    if (!run([process.execPath, tsc, '-p', 'tsconfig.build.json'])) {
      throw new SetUpError('the sources do not compile (see above)', 1);
    }
    mkdirSync(at('dist'), { recursive: true });
    removeOrphans();
    writeFileSync(digestFile, digest);
  });
}

/** How this process may install system packages: as root, through a sudo that asks for nothing, or not at all. */
function installer() {
  if (spawnSync('apt-get', ['--version']).status !== 0) return undefined;
  if (process.getuid?.() === 0) return [];
  return spawnSync('sudo', ['-n', 'true']).status === 0 ? ['sudo', '-n'] : undefined;
}

/** Installs the compilers that the rehearsal on the emulated chip and the tests need. */
export async function toolchain() {
  if (missingForTests().length === 0) return;
  const prefix = installer();
  if (prefix) {
    await withLock(at('.cache', 'toolchain.lock'), () => {
      const missing = missingForTests();
      if (missing.length === 0) return;
      say(`installing ${missing.join(' ')} (apt-get)`);
      const apt = [...prefix, 'env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get', '-qq'];
      const install = [...apt, 'install', '-y', '--no-install-recommends', ...missing];
      // A fresh machine has no package lists yet: then the first try fails, and not worth telling.
      if (run(install, { stdio: 'ignore' })) return;
      run([...apt, 'update']);
      run(install);
    });
  }
  const missing = missingForTests();
  if (missing.length === 0) return;
  throw new SetUpError(howToInstall(missing), 5);
}

/** Runs the steps in order; a step that cannot be done ends the process with one line that says what to type. */
export async function setUp(...steps) {
  try {
    for (const step of steps) await step();
  } catch (error) {
    if (!(error instanceof SetUpError)) throw error;
    process.stderr.write(`set-up: ${error.message}\n`);
    process.exit(error.exitCode);
  }
}

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href) {
  const wanted = process.argv.includes('--toolchain') ? [toolchain] : [];
  await setUp(dependencies, build, ...wanted);
}
