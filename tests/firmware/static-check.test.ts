/**
 * cppcheck finds nothing to say about the generated files: warnings, style, performance and portability. What it may not say, each for
 * one file, with the reason:
 *
 * - arithmetic.h, constParameter: it looks at the AVR branch of addProduct(), and cannot see that the assembly changes the sum.
 * - board.cpp, badBitmaskCheck: the converter's channel 0 is written as `| 0`, so that the table shows every channel.
 * - sensing.cpp, shiftNegativeLHS: the static_assert that refuses a compiler whose shifts lose the sign.
 * - sensing.cpp, arrayIndexOutOfBoundsCond: it does not see that a run of sensors ends with the highest bit; the parity tests run these
 *   lines under the sanitiser for addresses.
 */
import { spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { basename, join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { renderFirmware } from '../../src/firmware/render.js';
import { CARTS, SHEET, cart, quickDesign } from './cart.js';

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'fairlead-cppcheck-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

const FLAGS = [
  '--enable=warning,style,performance,portability',
  '--error-exitcode=1',
  '--std=c++11',
  '--platform=avr8',
  '--quiet',
  '--language=c++',
  ...[
    'constParameter:arithmetic.h',
    'badBitmaskCheck:board.cpp',
    'shiftNegativeLHS:sensing.cpp',
    'arrayIndexOutOfBoundsCond:sensing.cpp',
  ].map((quiet) => `--suppress=${quiet}`),
];

/** What cppcheck says about files in a folder. */
function check(
  files: readonly { path: string; text: string }[],
  name: string,
): { status: number; said: string } {
  const place = join(folder, name.replaceAll(/\W/g, '-'));
  mkdirSync(place);
  for (const { path, text } of files) writeFileSync(join(place, basename(path)), text);
  const sources = files.map(({ path }) => basename(path)).filter((file) => /\.(cpp|ino)$/.test(file));
  const { status, stderr, stdout } = spawnSync('cppcheck', [...FLAGS, ...sources], { cwd: place });
  return { status: status ?? -1, said: `${String(stdout)}${String(stderr)}` };
}

describe('cppcheck has nothing to say about', () => {
  it.each(Object.keys(CARTS))('%s', async (name) => {
    const files = await renderFirmware(SHEET, quickDesign(cart(CARTS[name])));
    expect(check(files, name)).toEqual({ status: 0, said: '' });
  });
});

it('would say something about a fault', () => {
  const text = 'int three[3];\nint readPastTheEnd() {\n  return three[3];\n}\n';
  expect(check([{ path: 'fault.cpp', text }], 'fault')).toMatchObject({ status: 1 });
});
