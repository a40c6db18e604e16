import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { Command } from 'commander';
import { afterAll, afterEach, beforeAll, expect, test } from 'vitest';
import { register } from '../../src/cli/check.js';
import type { Io } from '../../src/cli/io.js';
import { failureText, toFailure } from '../../src/cli/problem-text.js';
import { changedSheet, type Changes } from '../sheet/example-sheet.js';

const EXAMPLE = fileURLToPath(new URL('../../examples/tray-cart/tray-cart.json', import.meta.url));

let folder = '';
beforeAll(async () => {
  folder = await mkdtemp(join(tmpdir(), 'check-'));
});
afterAll(() => rm(folder, { recursive: true, force: true }));
afterEach(() => {
  process.exitCode = undefined;
});

/** The command as main.ts runs it, with an Io that collects. */
async function check(...words: string[]): Promise<{ exitCode: unknown; out: string; err: string }> {
  let out = '';
  let err = '';
  const io: Io = {
    stdout: (text) => void (out += text),
    stderr: (text) => void (err += text),
    progress: () => undefined,
    json: (value) => void (out += JSON.stringify(value)),
    isTerminalIn: false,
    isTerminalOut: false,
    isTerminalErr: false,
    color: false,
    columns: 80,
    style: (_, text) => text,
    styleErr: (_, text) => text,
  };
  const program = new Command().exitOverride();
  register(program, io);
  let exitCode: unknown;
  try {
    await program.parseAsync(['check', ...words], { from: 'user' });
    exitCode = process.exitCode;
  } catch (error) {
    const failure = toFailure(error);
    exitCode = failure.exitCode;
    err += `${failureText(failure)}\n`;
  }
  return { exitCode, out, err };
}

async function sheetFile(changes: Changes, name = 'cart.json'): Promise<string> {
  const path = join(folder, name);
  await writeFile(path, JSON.stringify(changedSheet(changes)));
  return path;
}

test('a sound sheet: says so on stdout, with its notes', async () => {
  const { exitCode, out, err } = await check(EXAMPLE);
  expect({ exitCode, err }).toEqual({ exitCode: undefined, err: '' });
  expect(out.split('\n')).toEqual([
    `${EXAMPLE}: The sheet is sound.`,
    `Note: ${EXAMPLE} /drive/driver/left/pwm: PWM on 5 and 6 comes from timer 0, which also drives the millisecond clock: its frequency stays at 976.6 Hz. Leave it so if the whine does not matter; never retime it.`,
    `Note: ${EXAMPLE} /sensors/pins/4: Each of pins A4 (sensor 5) and A5 (sensor 6): it is also a line of the I2C bus, so no I2C part can be added later. Take another pin if that matters to you.`,
    '',
  ]);
});

test('a sheet with problems: a line each on stderr, exit 2', async () => {
  const path = await sheetFile({ '/sensors/pitchMm': 95, '/power/fullV': 'x' });
  expect(await check(path)).toEqual({
    exitCode: 2,
    out: '',
    err: [
      `${path} /sensors/pitchMm: 95 mm is outside 3 to 30 mm. Measure centre to centre between neighbouring sensors.`,
      `${path} /power/fullV: "x" is not a number of V. Allowed: 1 to 60 V. Measure at the motor driver's supply terminals.`,
      '',
    ].join('\n'),
  });
});

test('--json: one document with problems and notes, exit 2', async () => {
  const { exitCode, out, err } = await check(await sheetFile({ '/power/emptyV': 6.5 }), '--json');
  expect({ exitCode, err }).toEqual({ exitCode: 2, err: '' });
  expect(JSON.parse(out)).toMatchObject({
    ok: false,
    problems: [
      {
        pointer: '/power/emptyV',
        message: 'Empty at 6.5 V is above the nominal 6 V.',
        got: '6.5 V',
        allowed: 'at most 6 V',
        fix: 'Give the voltage at which the battery has to be charged.',
      },
    ],
    notes: [{ pointer: '/drive/driver/left/pwm' }, { pointer: '/sensors/pins/4' }],
  });
});

test('--json: a sound sheet', async () => {
  const { exitCode, out } = await check(EXAMPLE, '--json');
  expect(exitCode).toBe(undefined);
  expect(JSON.parse(out)).toMatchObject({ ok: true, problems: [], notes: [{}, {}] });
});

test('a file that is not there: exit 2', async () => {
  const path = join(folder, 'none.json');
  expect(await check(path, '--json')).toEqual({
    exitCode: 2,
    out: '',
    err: `${path}: There is no such file; a JSON file is needed. Check the path. A new sheet is made with "fairlead survey".\n`,
  });
});

test('nothing from the sheet or its name can steer the terminal', async () => {
  const evil = '\u001b]0;owned\u0007\u001b[2J\u202e';
  const path = await sheetFile(
    { '/name': evil, [`/${evil}`]: 1, '/target/board': evil },
    'e\u001b[31mvil.json',
  );
  const { err } = await check(path);
  expect(err.split('\n')).toHaveLength(4);
  expect(err.replaceAll('\n', '')).not.toMatch(/[\p{Cc}\u202e]/u);
  expect(err).toContain('\\u{1b}[31mvil.json');
});
