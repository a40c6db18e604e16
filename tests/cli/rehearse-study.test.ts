/** Studies over worker threads, in parts, by GNU parallel, and interrupted: with the built command. */
import { execFileSync, spawn } from 'node:child_process';
import { once } from 'node:events';
import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { ROOT, runFairlead } from './run-fairlead.js';

const SHEET = join(ROOT, 'examples/tray-cart/tray-cart.json');
const COURSE = join(ROOT, 'examples/tray-cart/nursery-lane.json');
const PROGRAM = join(ROOT, 'bin/fairlead.js');
const STUDY = ['rehearse', SHEET, '--course', COURSE, '--laps', '1', '--runs', '60'];

let folder = '';
let whole = '';

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fairlead-study-'));
  whole = (await runFairlead([...STUDY, '--jobs', '1', '--json'])).stdout;
});
afterAll(() => rm(folder, { recursive: true }));

describe('a study', { timeout: 60_000 }, () => {
  it('gives the same bytes with three workers', async () => {
    const { stdout, stderr } = await runFairlead([...STUDY, '--jobs', '3', '--json']);
    expect(stderr).toBe('');
    expect(stdout).toBe(whole);
    expect(JSON.parse(stdout)).toMatchObject({ runs: 60, seed: 1 });
  });

  it('driven in parts by GNU parallel and merged is the whole, to the byte', async () => {
    const words = [...STUDY, '--jobs', '1', '--shard', '{}/3', '--out', join(folder, 'part-{}.json')];
    execFileSync('parallel', ['-j2', process.execPath, PROGRAM, ...words, ':::', '1', '2', '3'], {
      stdio: ['ignore', 'ignore', 'pipe'],
    });
    const parts = [3, 1, 2].map((k) => join(folder, `part-${k}.json`));
    const merged = await runFairlead(['rehearse', '--json', '--merge', ...parts]);
    expect(merged).toEqual({ exitCode: 0, stdout: whole, stderr: '' });
    const text = await runFairlead(['rehearse', '--merge', ...parts]);
    expect(text.stdout).toMatch(/^tray-cart on nursery-lane\.json/);
    const incomplete = await runFairlead(['rehearse', '--merge', parts[0]!, parts[1]!]);
    expect(incomplete.exitCode).toBe(2);
    expect(incomplete.stderr).toContain('Missing of 3 parts: 2.');
    expect(JSON.parse(await readFile(parts[0]!, 'utf8'))).toMatchObject({ shard: { part: 3, of: 3 } });
  });

  it('interrupted ends at once, with a message and without a result', async () => {
    const words = [...STUDY.slice(0, -1), '100000', '--json'];
    const child = spawn(process.execPath, [PROGRAM, ...words], { stdio: 'pipe' });
    let [out, err] = ['', ''];
    child.stdout.on('data', (data) => (out += String(data)));
    child.stderr.on('data', (data) => (err += String(data)));
    // designing takes a second or two; a signal before the drive ends the process by itself
    await new Promise((resolve) => setTimeout(resolve, 8000));
    child.kill('SIGINT');
    const begun = performance.now();
    const [code] = (await once(child, 'close')) as [number | null];
    expect(performance.now() - begun).toBeLessThan(5000);
    expect(code).toBe(130);
    expect(err).toBe('');
    expect(JSON.parse(out)).toMatchObject({ ok: false });
    expect(out).toMatch(/Interrupted after \d+ of 100000 runs; nothing was written\./);
  });
});
