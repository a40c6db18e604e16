/** The questionnaire in a real terminal: tmux types and reads the screen. */
import { execFileSync, spawnSync } from 'node:child_process';
import { mkdtempSync, readFileSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import { fileURLToPath } from 'node:url';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { checkSheet } from '../../src/sheet/check.js';

const FAIRLEAD = fileURLToPath(new URL('../../bin/fairlead.js', import.meta.url));
const POLL_MS = 25;
const PATIENCE_MS = 15_000;

let folder: string;
let sockets: string[];
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'fairlead-terminal-'));
  sockets = [];
});
afterEach(() => {
  for (const socket of sockets) spawnSync('tmux', ['-S', socket, 'kill-server']);
  rmSync(folder, { recursive: true });
});

/** Tells the latest tmux something. */
const tmux = (...words: string[]): string =>
  execFileSync('tmux', ['-S', sockets.at(-1) ?? '', ...words], { encoding: 'utf8' });
const screen = (): string => tmux('capture-pane', '-p', '-S', '-200', '-t', 'survey');
const files = (): string[] => readdirSync(folder).filter((name) => !/^tmux\d$/.test(name));

/**
 * Starts the questionnaire in a new terminal of the given width; the shell stays, so that the screen can be read. Each
 * terminal has a tmux of its own, as one that is about to end takes no new ones.
 */
function start(columns: number, environment = ''): void {
  sockets.push(join(folder, `tmux${sockets.length}`));
  const survey = `${environment} '${process.execPath}' '${FAIRLEAD}' survey cart.json`;
  const command = `cd '${folder}' && ${survey}; echo "exit $?"; sleep 60`;
  tmux('new-session', '-d', '-s', 'survey', '-x', String(columns), '-y', '50', command);
}

/** Waits until the screen shows a text. */
async function shows(text: string): Promise<void> {
  const until = performance.now() + PATIENCE_MS;
  while (!screen().includes(text)) {
    if (performance.now() > until) throw new Error(`"${text}" never came up:\n${screen()}`);
    await sleep(POLL_MS);
  }
}

/** What the last line says while somebody is expected to type, or once all is over. */
const READY = /(\?: more|<: back|^back)$|^exit \d+$/;
const isReady = (text: string): boolean => READY.test(text.trimEnd().split('\n').at(-1) ?? '');

/**
 * Types keys, one after the other: waits until the screen has changed and a question stands open again. Keys typed between
 * two questions would be lost, as the prompts drop what comes before them.
 */
async function type(...keys: string[]): Promise<void> {
  for (const key of keys) {
    const before = screen();
    tmux('send-keys', '-t', 'survey', key);
    const until = performance.now() + PATIENCE_MS;
    for (let now = before; now === before || !isReady(now); now = screen()) {
      if (performance.now() > until) throw new Error(`nothing came of ${key}:\n${now}`);
      await sleep(POLL_MS);
    }
  }
}

/** Presses Enter until the screen shows a text. */
async function enterUntil(text: string): Promise<void> {
  for (let i = 0; i < 80 && !screen().includes(text); i++) await type('Enter');
  expect(screen()).toContain(text);
}

const sheet = () =>
  JSON.parse(readFileSync(join(folder, 'cart.json'), 'utf8')) as Record<string, Record<string, unknown>>;

it('Enter all the way writes a sound sheet', async () => {
  start(100);
  await shows('Vehicle name');
  await enterUntil('exit 0');
  expect(checkSheet(sheet()).problems).toEqual([]);
  expect(files().toSorted()).toEqual(['cart.json', 'sheet.schema.json']);
}, 60_000);

it('an answer is changed on the way back, in a narrow terminal', async () => {
  start(44);
  await shows('Vehicle name');
  await enterUntil('Tightest bend,');
  await type('<', 'Enter');
  await shows('Line width,');
  await type('2.5 cm', 'Enter');
  await enterUntil('exit 0');
  expect(sheet()['line']!['widthMm']).toBe(25);
}, 60_000);

it('Ctrl-C keeps the answers, and the next survey goes on there', async () => {
  start(80);
  await shows('Vehicle name');
  await enterUntil('Tightest bend,');
  await type('150', 'Enter');
  await shows('Longest gap,');
  await type('C-c');
  await shows('exit 130');
  expect(screen()).toContain(
    'Your answers are kept in .cart.draft.json.\nTo go on, type: fairlead survey cart.json\n',
  );
  expect(screen()).not.toMatch(/\bat .*\.js:\d+/);
  expect(files()).not.toContain('cart.json');
  tmux('kill-server');
  start(80);
  await shows('Unfinished survey');
  await enterUntil('Longest gap,');
  await enterUntil('exit 0');
  expect(sheet()['line']!['tightestRadiusMm']).toBe(150);
  expect(files().toSorted()).toEqual(['cart.json', 'sheet.schema.json']);
}, 60_000);

it('a closed terminal keeps the answers as well', async () => {
  start(80);
  await shows('Vehicle name');
  await enterUntil('Line width,');
  await type('2.5 cm', 'Enter');
  tmux('kill-server');
  start(80);
  await shows('Unfinished survey');
  await type('Enter');
  expect(screen()).toContain('Tightest bend,');
  await enterUntil('exit 0');
  expect(sheet()['line']!['widthMm']).toBe(25);
}, 60_000);

it('the end of the input ends the survey', async () => {
  start(80);
  await shows('Vehicle name');
  await type('C-d');
  await shows('exit 130');
  expect(screen()).toContain('Stopped. There was no answer to keep.');
  expect(files()).toEqual([]);
}, 60_000);

it('needs no colour: with NO_COLOR the screen has none, and says the same', async () => {
  start(80, 'NO_COLOR=1');
  await shows('Vehicle name');
  await type('9', 'Enter');
  const styled = tmux('capture-pane', '-p', '-e', '-t', 'survey');
  expect(styled).toContain('! "9" does not fit.');
  expect(styled).not.toContain('\u001b[');
}, 60_000);
