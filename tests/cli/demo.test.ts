import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { runFairlead, type Outcome } from './run-fairlead.js';

/** Two vehicles, each compiled or interpreted with two controllers. */
const TIME_OUT_MS = 180_000;

interface DemoDocument {
  ok: boolean;
  problems: unknown[];
  vehicles: { name: string; folder: string }[];
  pictures: string[];
  rehearsals: {
    name: string;
    control: string;
    engine: string;
    runs?: number;
    finished?: number;
    missing?: string;
  }[];
}

describe('fairlead without arguments and without a terminal', () => {
  let folder = '';
  let outcome: Outcome;
  beforeAll(async () => {
    folder = await mkdtemp(join(tmpdir(), 'fairlead-demo-'));
    outcome = await runFairlead([], { folder });
  }, TIME_OUT_MS);
  afterAll(() => rm(folder, { recursive: true }));

  it('takes the demo cart through every stage and ends well', () => {
    expect(outcome.stderr).toBe('');
    expect(outcome.exitCode).toBe(0);
    const stages = [...outcome.stdout.matchAll(/^\d {2}(\w+)/gm)].map((match) => match[1]);
    expect(stages).toEqual(['Check', 'Derive', 'Render', 'Rehearse', 'Draw']);
  });

  it('drives the firmware in both languages with both controllers', () => {
    for (const driven of ['chip +pid', 'chip +rules', 'micropython +pid', 'micropython +rules']) {
      expect(outcome.stdout).toMatch(new RegExp(`^ +tray-cart\\S* +${driven} +yes `, 'm'));
    }
  });

  it('leaves firmware and pictures where it says, and writes no colour into a pipe', async () => {
    const demo = join(folder, 'fairlead-demo');
    expect(await readdir(demo)).toEqual([
      'tray-cart',
      'tray-cart-esp32',
      'tray-cart-esp32.svg',
      'tray-cart.svg',
    ]);
    expect(await readdir(join(demo, 'tray-cart'))).toContain('tray-cart.ino');
    expect(await readdir(join(demo, 'tray-cart-esp32'))).toContain('main.py');
    expect(await readFile(join(demo, 'tray-cart.svg'), 'utf8')).toMatch(/^<svg /);
    expect(outcome.stdout).toContain('open fairlead-demo/tray-cart/tray-cart.ino');
    expect(outcome.stdout).not.toContain('\u001b');
  });

  it('says what to do next, and the cautions', () => {
    expect(outcome.stdout).toContain('Your own cart  fairlead survey cart.json');
    expect(outcome.stdout).toContain('wheels off the floor');
    expect(outcome.stdout).toContain('no safety function');
  });

  it(
    'does the same again as one JSON document, and finds its files unchanged',
    async () => {
      const before = await readFile(join(folder, 'fairlead-demo/tray-cart/constants.h'), 'utf8');
      const { exitCode, stdout, stderr } = await runFairlead(['--json', '--runs', '3'], { folder });
      expect(stderr).toBe('');
      expect(exitCode).toBe(0);
      const document = JSON.parse(stdout) as DemoDocument;
      expect(document).toMatchObject({ ok: true, problems: [] });
      expect(document.rehearsals.map(({ engine, control, finished }) => [engine, control, finished])).toEqual(
        [
          ['twin', 'pid', 3],
          ['chip', 'pid', 1],
          ['chip', 'rules', 1],
          ['twin', 'pid', 3],
          ['micropython', 'pid', 1],
          ['micropython', 'rules', 1],
        ],
      );
      expect(await readFile(join(folder, 'fairlead-demo/tray-cart/constants.h'), 'utf8')).toBe(before);
    },
    TIME_OUT_MS,
  );

  it(
    'goes on without the AVR compiler and says what to type',
    async () => {
      const surroundings = { folder, environment: { PATH: folder } };
      const { exitCode, stdout } = await runFairlead(['demo', '--runs', '1'], surroundings);
      expect(exitCode).toBe(0);
      expect(stdout).toMatch(
        /tray-cart +chip +pid +missing: gcc-avr.*type: sudo apt-get update && sudo apt-get install gcc-avr/,
      );
      expect(stdout).toMatch(/tray-cart-esp32 +micropython +pid +yes /);
    },
    TIME_OUT_MS,
  );

  it(
    'refuses to overwrite firmware that was edited by hand',
    async () => {
      const edited = join(folder, 'fairlead-demo/tray-cart/motors.cpp');
      await writeFile(edited, '// mine\n');
      const { exitCode, stderr } = await runFairlead(['demo'], { folder });
      expect(exitCode).toBe(4);
      expect(stderr).toContain('fairlead-demo/tray-cart/motors.cpp was edited by hand');
      expect(await readFile(edited, 'utf8')).toBe('// mine\n');
    },
    TIME_OUT_MS,
  );
});
