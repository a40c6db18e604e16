/** Compiles the emitted control law into the harness: for the host with the sanitiser, and for the chip. */
import { execFileSync } from 'node:child_process';
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { basename, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import type { RenderedFile } from '../../src/firmware/render.js';

const cpp = (name: string) => fileURLToPath(new URL(`cpp/${name}`, import.meta.url));

/** The parts of the firmware that are pure arithmetic. */
const PURE = /^(arithmetic|constants|rule_table|sensing|steering|wheel_loop|calibration|sweep)\.(h|cpp)$/;

const WARNINGS = ['-Wall', '-Wextra', '-Wconversion', '-Wshadow', '-Werror'];

function writePure(
  files: readonly RenderedFile[],
  folder: string,
  change = (text: string) => text,
): string[] {
  mkdirSync(folder, { recursive: true });
  const pure = files.filter(({ path }) => PURE.test(basename(path)));
  for (const { path, text } of pure) writeFileSync(join(folder, basename(path)), change(text));
  // The harness includes sensing.cpp itself.
  return pure
    .map(({ path }) => basename(path))
    .filter((name) => name.endsWith('.cpp') && name !== 'sensing.cpp');
}

/** Casts to 16 bits, each of which has to leave the number as it is (cpp/host/exact.h). */
const watchCasts = (text: string): string => text.replaceAll('static_cast<int16_t>(', 'exact<int16_t>(');

/**
 * A program for this machine that fails on undefined behaviour, on access out of bounds, and on a number that a cast to 16 bits would
 * change; returns its path.
 */
export function compileForHost(files: readonly RenderedFile[], folder: string): string {
  const sources = writePure(files, folder, watchCasts);
  const includes = [`-I${cpp('host')}`, `-I${folder}`, '-include', cpp('host/exact.h')];
  const flags = [
    '-std=gnu++11',
    '-O1',
    '-fsanitize=undefined,address',
    '-fno-sanitize-recover=all',
    ...includes,
  ];
  execFileSync('g++', [...flags, ...WARNINGS, '-fsyntax-only', join(folder, 'sensing.cpp')]);
  const inputs = [cpp('harness.cpp'), ...sources.map((name) => join(folder, name))];
  execFileSync('g++', [...flags, ...WARNINGS, ...inputs, '-o', join(folder, 'harness')]);
  return join(folder, 'harness');
}

/** A program for the ATmega328P, from flash address 0. */
export function compileForChip(files: readonly RenderedFile[], folder: string): Uint8Array {
  const sources = writePure(files, folder);
  const includes = [`-I${cpp('chip')}`, `-I${folder}`];
  const chip = ['-std=gnu++11', '-Os', '-mmcu=atmega328p', '-flto', '-fno-exceptions', ...includes];
  const inputs = [cpp('harness.cpp'), ...sources.map((name) => join(folder, name))];
  execFileSync('avr-g++', [...chip, ...WARNINGS, ...inputs, '-o', 'harness.elf'], { cwd: folder });
  execFileSync('avr-objcopy', ['-O', 'binary', 'harness.elf', 'harness.bin'], { cwd: folder });
  return new Uint8Array(readFileSync(join(folder, 'harness.bin')));
}
