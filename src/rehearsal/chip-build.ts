/**
 * Compiles a rendered sketch for a board with an AVR chip as the usual IDE does: same compiler, core and flags (platform.txt of the
 * Arduino AVR core 1.8: -Os, link-time optimisation, gnu++11, no exceptions).
 *
 * The core is compiled once for each version and set of flags, and kept; the sketch's own files are compiled with -Wall -Wextra -Wconversion -Wshadow,
 * and their warnings are told apart from those of the core's headers.
 */
import { createHash } from 'node:crypto';
import { existsSync } from 'node:fs';
import { mkdir, mkdtemp, readFile, readdir, rename, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { basename, join } from 'node:path';
import type { RenderedFile } from '../firmware/render.js';
import type { BoardId } from '../vehicle/board-facts.js';
import { type StackUse, deepestStack } from './chip-stack.js';
import { type ArduinoCore, cacheFolder, findCore, inPairs, runTool } from './chip-tools.js';

/** A compiled sketch. */
export interface ChipImage {
  /** Flash memory from address 0. */
  program: Uint8Array;
  /** Flash and static RAM used, as the IDE reports them, bytes. */
  flashBytes: number;
  ramBytes: number;
  /** The deepest that the stack can get. */
  stack: StackUse;
  /** The compiler's warnings about the sketch's own files. */
  warnings: string[];
}

const CHIP_FLAGS = ['-DF_CPU=16000000L', '-DARDUINO=10819', '-DARDUINO_ARCH_AVR'];
const COMMON_FLAGS = ['-c', '-Os', '-ffunction-sections', '-fdata-sections', '-flto', '-fno-fat-lto-objects'];
const CPP_FLAGS = ['-std=gnu++11', '-fno-exceptions', '-fno-threadsafe-statics'];
/** What the core's sources need beyond; its own warnings are nobody's concern here. WString.cpp misses DECIMAL_DIG. */
const CORE_CPP_FLAGS = ['-w', '-fpermissive', '-DDECIMAL_DIG=17'];
/** Optimising at link time makes the functions: there the compiler says how much stack each takes, in files that it would put elsewhere. */
const LINK_FLAGS = [
  '-Os',
  '-flto',
  '-fuse-linker-plugin',
  '-Wl,--gc-sections',
  '-fstack-usage',
  '-save-temps',
];
const OWN_WARNINGS = ['-Wall', '-Wextra', '-Wconversion', '-Wshadow', '-fdiagnostics-color=never'];

function flagsFor(core: ArduinoCore): string[] {
  return [
    ...COMMON_FLAGS,
    ...CHIP_FLAGS,
    `-mmcu=${core.mcu}`,
    ...core.defines.map((define) => `-D${define}`),
    `-DARDUINO_${core.boardMacro}`,
    `-I${core.sources}`,
    `-I${core.variant}`,
  ];
}

/** Compiler and flags for one source of the core, by its ending; undefined for what is no source. */
function coreCompiler(name: string): [command: string, flags: string[]] | undefined {
  if (name.endsWith('.cpp')) return ['avr-g++', [...CPP_FLAGS, ...CORE_CPP_FLAGS]];
  if (name.endsWith('.c')) return ['avr-gcc', ['-std=gnu11', '-w']];
  if (name.endsWith('.S')) return ['avr-gcc', ['-x', 'assembler-with-cpp']];
  return undefined;
}

async function coreDigest(core: ArduinoCore, names: readonly string[]): Promise<string> {
  const hash = createHash('sha256');
  hash.update(JSON.stringify([flagsFor(core), CPP_FLAGS, CORE_CPP_FLAGS]));
  hash.update((await runTool('avr-gcc', ['--version'], core.sources)).stdout);
  for (const name of names) hash.update(`${name}\n`).update(await readFile(join(core.sources, name)));
  return hash.digest('hex').slice(0, 16);
}

/** The compiled core, from the cache where it is there; returns the archive's path. */
async function coreArchive(core: ArduinoCore): Promise<string> {
  const names = (await readdir(core.sources)).filter((name) => /\.(cpp|c|S|h)$/.test(name)).sort();
  const folder = join(await cacheFolder(), `avr-core-${await coreDigest(core, names)}`);
  const archive = join(folder, 'core.a');
  if (existsSync(archive)) return archive;
  const making = await mkdtemp(`${folder}-`);
  try {
    const sources = names.filter((name) => coreCompiler(name) !== undefined);
    await inPairs(
      sources.map((name) => async () => {
        const [command, flags] = coreCompiler(name)!;
        const args = [...flags, ...flagsFor(core), join(core.sources, name), '-o', `${name}.o`];
        return runTool(command, args, making);
      }),
    );
    await runTool('avr-gcc-ar', ['rcs', 'core.a', ...sources.map((name) => `${name}.o`)], making);
    // Another process may have been quicker; its archive is the same.
    await mkdir(folder, { recursive: true });
    await rename(join(making, 'core.a'), archive);
  } finally {
    await rm(making, { recursive: true, force: true });
  }
  return archive;
}

/** The warnings of a compiler's output that are about files in the sketch's folder. */
function ownWarnings(stderr: string, folder: string): string[] {
  return stderr
    .split('\n')
    .filter((line) => line.startsWith(folder) && line.includes(' warning: '))
    .map((line) => line.slice(folder.length + 1));
}

/** Sum of sections in the output of `avr-size -A`, bytes. */
function sectionBytes(sizes: string, sections: readonly string[]): number {
  return sizes
    .split('\n')
    .map((line) => line.trim().split(/\s+/))
    .filter(([name]) => name !== undefined && sections.includes(name))
    .reduce((sum, [, bytes]) => sum + Number(bytes), 0);
}

/** Writes the sketch as the IDE hands it to the compiler; returns the names of its sources. */
async function writeSketch(files: readonly RenderedFile[], folder: string): Promise<string[]> {
  const sources: string[] = [];
  for (const { path, text } of files) {
    const name = basename(path);
    const isSketch = name.endsWith('.ino');
    const target = isSketch ? `${name}.cpp` : name;
    const content = isSketch ? `#include <Arduino.h>\n#line 1 "${name}"\n${text}` : text;
    await writeFile(join(folder, target), content);
    if (target.endsWith('.cpp')) sources.push(target);
  }
  return sources;
}

/** What the compiler wrote about the functions' stacks when it linked. */
async function stackUsage(folder: string): Promise<string> {
  const names = (await readdir(folder)).filter((name) => /ltrans.*\.su$/.test(name));
  return (await Promise.all(names.map((name) => readFile(join(folder, name), 'utf8')))).join('\n');
}

/** Bytes of a return address: chips with more than 128 KiB of flash have a program counter of three. */
const returnBytes = (mcu: string): number => (/^atmega256/.test(mcu) ? 3 : 2);

/**
 * Compiles and links a sketch.
 *
 * @param files a rendered Arduino sketch
 * @throws FairleadError with exit code 5 when a tool is missing; Error with the compiler's words when it does not compile
 */
export async function buildSketch(files: readonly RenderedFile[], board: BoardId): Promise<ChipImage> {
  const core = findCore(board);
  const archive = await coreArchive(core);
  const folder = await mkdtemp(join(tmpdir(), 'fairlead-sketch-'));
  try {
    const sources = await writeSketch(files, folder);
    const outputs = await inPairs(
      sources.map((name) => async () => {
        const args = [
          ...CPP_FLAGS,
          ...OWN_WARNINGS,
          ...flagsFor(core),
          join(folder, name),
          '-o',
          `${name}.o`,
        ];
        return runTool('avr-g++', args, folder);
      }),
    );
    const objects = sources.map((name) => `${name}.o`);
    await runTool(
      'avr-gcc',
      [...LINK_FLAGS, `-mmcu=${core.mcu}`, '-o', 'sketch.elf', ...objects, archive, '-lm'],
      folder,
    );
    await runTool('avr-objcopy', ['-O', 'binary', '-R', '.eeprom', 'sketch.elf', 'sketch.bin'], folder);
    const listing = (await runTool('avr-objdump', ['-dC', '--no-show-raw-insn', 'sketch.elf'], folder))
      .stdout;
    const sizes = (await runTool('avr-size', ['-A', 'sketch.elf'], folder)).stdout;
    return {
      program: new Uint8Array(await readFile(join(folder, 'sketch.bin'))),
      flashBytes: sectionBytes(sizes, ['.text', '.data', '.bootloader']),
      ramBytes: sectionBytes(sizes, ['.data', '.bss', '.noinit']),
      stack: deepestStack(listing, await stackUsage(folder), returnBytes(core.mcu)),
      warnings: outputs.flatMap(({ stderr }) => ownWarnings(stderr, folder)),
    };
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}
