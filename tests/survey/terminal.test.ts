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
let socket: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'fairlead-terminal-'));
  socket = join(folder, 'tmux');
});
afterEach(() => {
  spawnSync('tmux', ['-S', socket, 'kill-server']);
  rmSync(folder, { recursive: true });
});

const tmux = (...words: string[]): string =>
  execFileSync('tmux', ['-S', socket, ...words], { encoding: 'utf8' });
const screen = (): string => tmux('capture-pane', '-p', '-S', '-200', '-t', 'survey');
const files = (): string[] => readdirSync(folder).filter((name) => name !== 'tmux');

/** Starts the questionnaire in a terminal of the given width; the shell stays, so that the screen can be read. */
function start(columns: number): void {
  const command = `cd '${folder}' && '${process.execPath}' '${FAIRLEAD}' survey cart.json; echo "exit $?"; sleep 60`;
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

/** Types keys, then waits until the screen has changed. */
async function type(...keys: string[]): Promise<void> {
  const before = screen();
  tmux('send-keys', '-t', 'survey', ...keys);
  const until = performance.now() + PATIENCE_MS;
  while (screen() === before && performance.now() < until) await sleep(POLL_MS);
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
  await type('2.5', ' ', 'cm', 'Enter');
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
  await shows('exit ');
  expect(screen()).not.toContain('exit 0');
  expect(screen()).not.toMatch(/\bat .*\.js:\d+/);
  expect(files()).not.toContain('cart.json');
  tmux('kill-server');
  start(80);
  await enterUntil('Longest gap,');
  await enterUntil('exit 0');
  expect(sheet()['line']!['tightestRadiusMm']).toBe(150);
  expect(files().toSorted()).toEqual(['cart.json', 'sheet.schema.json']);
}, 60_000);
