import { mkdtemp, readFile, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Command } from 'commander';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Io } from '../../src/cli/io.js';
import { register } from '../../src/cli/rehearse.js';
import type { RehearsalReport } from '../../src/rehearsal/metrics.js';

const SHEET = 'examples/tray-cart/tray-cart.json';
const COURSE = 'examples/tray-cart/nursery-lane.json';
let folder = '';

beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'fairlead-rehearse-'));
});
afterAll(() => rm(folder, { recursive: true }));

interface Said {
  out: string;
  json: unknown[];
}

/** Runs the command in this process and collects what it says. */
async function rehearse(words: readonly string[], isTerminalOut = false): Promise<Said> {
  const said: Said = { out: '', json: [] };
  const io: Io = {
    stdout: (text) => (said.out += text),
    stderr: (text) => {
      throw new Error(`stderr: ${text}`);
    },
    progress: () => undefined,
    json: (value) => said.json.push(value),
    isTerminalIn: false,
    isTerminalOut,
    isTerminalErr: false,
    color: false,
    columns: 80,
    style: (_, text) => text,
    styleErr: (_, text) => text,
  };
  const program = new Command('fairlead').exitOverride().configureOutput({ writeErr: () => undefined });
  register(program, io);
  program.commands.forEach((command) =>
    command.exitOverride().configureOutput({ writeErr: () => undefined }),
  );
  await program.parseAsync(['rehearse', ...words], { from: 'user' });
  return said;
}

describe('fairlead rehearse', () => {
  it('drives the demo cart round its lane: the vehicle of the sheet, two laps', async () => {
    const { out, json } = await rehearse([SHEET, '--course', COURSE]);
    expect(out).toMatch(
      /^tray-cart on nursery-lane\.json, with the twin of the controller\n2 laps of 5\.28 m/,
    );
    expect(out).toMatch(
      /Finished +yes\nFlying lap +\d\.\d\d s; 1\.\d\d times the physical bound of 4\.41 s\n/,
    );
    expect(json).toEqual([]);
  });

  it('gives one JSON document with the keys that others rely on', async () => {
    const { out, json } = await rehearse([SHEET, '--course', COURSE, '--runs', '3', '--json']);
    expect(out).toBe('');
    expect(json).toHaveLength(1);
    const report = json[0] as RehearsalReport;
    expect(report).toMatchObject({ runs: 3, seed: 1, engine: 'twin' });
    expect(report.finished + report.lost).toBe(3);
    // 3 of 3: the lower end is the cube root of 0.025
    expect(report.finishRate!.lowPercent).toBeCloseTo(100 * Math.cbrt(0.025), 9);
    expect(report.finishRate).toMatchObject({ highPercent: 100, confidencePercent: 95 });
    expect(report.list.map((run) => run.seed)).toEqual([1, 2, 3]);
    expect(report.ratio).toBeCloseTo(report.lapS! / report.boundLapS, 12);
    expect(Object.keys(report)).toEqual([
      ...['runs', 'finished', 'lost', 'lapS', 'boundLapS', 'ratio'],
      ...['rmsLateralMm', 'maxLateralMm', 'finishRate', 'seed', 'engine', 'list', 'notes'],
    ]);
    const alone = await rehearse([SHEET, '--course', COURSE, '--seed', '2', '--json']);
    expect((alone.json[0] as RehearsalReport).list[0]).toEqual(report.list[1]);
  });

  it('draws in a terminal, and writes a picture where asked', async () => {
    const file = join(folder, 'run.svg');
    const { out } = await rehearse([SHEET, '--course', COURSE, '--laps', '1', '--svg', file], true);
    expect(out).toContain('\nDriven path: ');
    expect(out).toContain('Lap from standing');
    expect(out).toContain(`Picture: ${file}`);
    const svg = await readFile(file, 'utf8');
    expect(svg).toMatch(/^<svg /);
    expect(svg).toContain('twin, seed 0: finished');
  });

  it.each([
    [['--course', COURSE, '--runs', '0'], 'It takes a whole number from 1 to 1000000.'],
    [['--course', COURSE, '--seed', '-1'], 'It takes a whole number from 0'],
    [['--course', COURSE, '--laps', '2.5'], 'It takes a whole number from 1 to 100.'],
    [['--course', COURSE, '--svg', SHEET], 'Its name must end in .svg.'],
    [['--course', COURSE, '--on', 'paper'], 'Allowed choices are twin, chip, micropython.'],
    [[], "required option '--course <file>' not specified"],
    [['--course', COURSE, '--shard', '5/4'], 'It takes K/N, part K of N'],
    [[SHEET, SHEET, '--course', COURSE], 'at most two sheets can be compared'],
    [[SHEET, '--course', COURSE, '--shard', '1/2'], '--shard, --svg, --curve and --fault take one sheet'],
    [['--course', COURSE, '--on-second', 'twin'], '--on-second goes with two sheets'],
    [['--course', COURSE, '--curve', '--on', 'chip'], '--curve drives the twin'],
    [['--course', COURSE, '--out', 'part.json'], '--out goes with --shard'],
    [['--course', COURSE, '--merge', 'part.json'], '--merge takes the parts alone'],
  ])('refuses %j', async (words, message) => {
    await expect(rehearse([SHEET, ...words])).rejects.toThrow(message);
  });

  it('compares two sheets on the same seeds, in pairs', { timeout: 120_000 }, async () => {
    const { json } = await rehearse([
      SHEET,
      SHEET,
      '--course',
      COURSE,
      '--runs',
      '2',
      '--laps',
      '1',
      '--json',
    ]);
    expect(json).toHaveLength(1);
    const { first, second, pairs } = json[0] as Record<string, unknown>;
    expect(second).toEqual(first);
    expect(pairs).toMatchObject({ runs: 2, finish: { both: 2, chance: 1 }, lapS: { pairs: 2, mean: 0 } });
  });

  it('drives a curve of finish rate against speed', { timeout: 120_000 }, async () => {
    const file = join(folder, 'curve.svg');
    const words = [SHEET, '--course', COURSE, '--curve', '--runs', '2', '--laps', '1', '--svg', file];
    const { out } = await rehearse(words);
    expect(out).toMatch(/ 0\.70 +2 of 2 +15\.8 to 100\.0 % /);
    expect(out).toContain("times the design's speeds 99.5 % or more finish here.");
    expect((await readFile(file, 'utf8')).match(/class="rate"/g)).toHaveLength(12);
  });

  it('shows what differs between drawn vehicles, with the source of each range', async () => {
    const { out } = await rehearse([SHEET, '--spreads']);
    expect(out).toMatch(
      /speed of the left motor +0\.93 +1\.07 +times the sheet +\/tolerances\/motorGainPercent\n/,
    );
    expect(out).toMatch(/jitter of the loop +0 +0\.00005 +s +common practice\n/);
    const { json } = await rehearse([SHEET, '--spreads', '--json']);
    const { spreads } = json[0] as { spreads: { low: number; high: number; source: string }[] };
    expect(spreads.length).toBeGreaterThan(20);
    for (const { low, high, source } of spreads) expect(low <= high && source !== '').toBe(true);
  });

  it('says which engines fit the board', async () => {
    await expect(rehearse([SHEET, '--course', COURSE, '--on', 'micropython'])).rejects.toThrow(
      `The engine "micropython" runs micropython firmware; the sheet's board uno takes arduino. Use --on twin or --on chip.`,
    );
  });
});
