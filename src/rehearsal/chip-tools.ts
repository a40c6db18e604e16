/**
 * The tools that compile a sketch: the AVR compiler and the Arduino core, and where what they make is kept.
 *
 * What the core calls a board is in the board's facts. FAIRLEAD_ARDUINO_CORE names another core folder.
 */
import { execFile } from 'node:child_process';
import { existsSync } from 'node:fs';
import { mkdir } from 'node:fs/promises';
import { homedir, tmpdir } from 'node:os';
import { join } from 'node:path';
import { ARDUINO_CORE, howToInstall, missingTools } from '../../bin/toolchain.js';
import { EXIT, FairleadError } from '../sheet/problem.js';
import { joinAnd } from '../sheet/words.js';
import type { BoardId } from '../vehicle/board-facts.js';
import { BOARDS } from '../vehicle/boards.js';

export interface ArduinoCore {
  /** Folder of the core's sources. */
  sources: string;
  /** Folder of the board's pins_arduino.h. */
  variant: string;
  /** The board's macro, without its prefix. */
  boardMacro: string;
  /** The compiler's name of the chip. */
  mcu: string;
  /** Further macros, as NAME=value. */
  defines: readonly string[];
}

/** What the compiler of a host is for; the chip does without it. */
const HOST_TOOLS = ['g++'];

/**
 * The core for a board.
 *
 * @throws FairleadError with exit code 5 when a tool is missing, saying what to install; with 2 for a board without this chip
 */
export function findCore(board: BoardId): ArduinoCore {
  const { core: facts } = BOARDS[board];
  const emulated = Object.values(BOARDS).flatMap(({ id, core }) => (core === undefined ? [] : [id]));
  if (facts === undefined)
    throw new FairleadError(`There is no emulated chip for ${board}, only for ${joinAnd(emulated)}.`, {
      problems: [
        {
          pointer: '/target/board',
          message: 'There is no emulated chip for this board.',
          got: board,
          allowed: emulated.join(', '),
          fix: 'Rehearse on micropython or on the twin.',
        },
      ],
    });
  const elsewhere = process.env['FAIRLEAD_ARDUINO_CORE'];
  const missing = missingTools().filter(
    (name) => !HOST_TOOLS.includes(name) && !(elsewhere && name === 'arduino-core-avr'),
  );
  if (missing.length > 0) throw new FairleadError(howToInstall(missing), { exitCode: EXIT.toolMissing });
  const root = elsewhere ?? ARDUINO_CORE;
  const core: ArduinoCore = {
    sources: join(root, 'cores', 'arduino'),
    variant: join(root, 'variants', facts.variant),
    boardMacro: facts.macro,
    mcu: facts.mcu,
    defines: facts.defines ?? [],
  };
  if (!existsSync(join(core.sources, 'Arduino.h')))
    throw new FairleadError(
      `FAIRLEAD_ARDUINO_CORE: ${root} holds no Arduino core (cores/arduino/Arduino.h).`,
      {
        exitCode: EXIT.toolMissing,
      },
    );
  return core;
}

/** What a tool said. */
export interface ToolOutput {
  stdout: string;
  stderr: string;
}

/**
 * Runs a tool without a shell.
 *
 * @throws Error with the tool's own words when it fails
 */
export async function runTool(command: string, args: readonly string[], folder: string): Promise<ToolOutput> {
  return new Promise((resolve, reject) => {
    execFile(command, args, { cwd: folder, maxBuffer: 16 * 2 ** 20 }, (error, stdout, stderr) => {
      if (error === null) resolve({ stdout, stderr });
      else reject(new Error(`${command} failed:\n${stderr || error.message}`, { cause: error }));
    });
  });
}

/** Runs tasks two at a time: what a small machine has. Results in the order of the tasks. */
export async function inPairs<T>(tasks: readonly (() => Promise<T>)[]): Promise<T[]> {
  const results: T[] = [];
  let next = 0;
  const worker = async (): Promise<void> => {
    for (let i = next++; i < tasks.length; i = next++) results[i] = await tasks[i]!();
  };
  await Promise.all([worker(), worker()]);
  return results;
}

/** A folder for what can be made again: the user's cache, or the system's folder for passing files where there is none. */
export async function cacheFolder(): Promise<string> {
  const base = process.env['XDG_CACHE_HOME'] ?? join(homedir(), '.cache');
  for (const folder of [join(base, 'fairlead'), join(tmpdir(), 'fairlead-cache')]) {
    try {
      await mkdir(folder, { recursive: true });
      return folder;
    } catch {
      // A home that cannot be written to is no reason to fail; the next place will do.
    }
  }
  throw new FairleadError(
    `Neither ${base} nor ${tmpdir()} can be written to. Set XDG_CACHE_HOME to a folder that can.`,
  );
}
