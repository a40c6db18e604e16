/** What every rendered sketch has in common, over vehicles that use every branch of the templates. */
import { hostname } from 'node:os';
import { basename } from 'node:path';
import { beforeAll, describe, expect, it } from 'vitest';
import { isIdentifier } from '../../src/firmware/identifiers.js';
import { LINE_WIDTH } from '../../src/firmware/format.js';
import { type RenderedFile, fillTemplates, renderFirmware } from '../../src/firmware/render.js';
import { VERSION } from '../../src/version.js';
import { CARTS, SHEET, cart, quickDesign } from './cart.js';

const UNITS = /_(Q\d+|255THS|US|SAMPLES|COUNTS|BITS|ENTRIES|COUNT|LEVEL|LIMIT|EDGE|CLASSES|INDEX|FLAGS)$/;

describe.each(Object.keys(CARTS))('the sketch of %s', (name) => {
  let files: RenderedFile[];
  let text: (file: string) => string;
  beforeAll(async () => {
    files = await renderFirmware(SHEET, quickDesign(cart(CARTS[name])));
    text = (file) => files.find(({ path }) => basename(path) === file)?.text ?? '';
  });

  const constants = () =>
    [...text('constants.h').matchAll(/^constexpr \w+ (\w+)(?:\[\])? =/gm)].map((match) => match[1]!);

  it('defines constants that end in a unit, and uses every one of them', () => {
    const names = constants().filter((each) => !/^EDGE_ENTRIES$/.test(each));
    expect(names.length).toBeGreaterThan(25);
    const others = files.filter(({ path }) => !path.endsWith('constants.h'));
    for (const each of names) {
      expect(each).toMatch(UNITS);
      expect(isIdentifier(each, 'cpp')).toBe(true);
      const users = others.filter((file) => new RegExp(`\\b${each}\\b`).test(file.text));
      expect(users, each).not.toEqual([]);
    }
  });

  it('comments every constant', () => {
    const lines = text('constants.h').split('\n');
    for (const [i, line] of lines.entries())
      if (/^constexpr \w+ \w+(\[\])? = /.test(line) && !/EDGE_ENTRIES|CLASS_COUNT/.test(line))
        expect(lines[i - 1], line).toMatch(/^\/\/ \S/);
  });

  it('includes only what is there, and has no file that nobody includes', () => {
    const own = files.map(({ path }) => basename(path));
    const included = files.flatMap((file) =>
      [...file.text.matchAll(/^#include "(.+)"$/gm)].map((match) => match[1]!),
    );
    for (const each of included) expect(own).toContain(each);
    for (const each of own.filter((file) => file.endsWith('.h'))) expect(included).toContain(each);
  });

  it('divides nowhere but in the calibration, and shifts nothing to the left that could be negative', () => {
    const code = files.map((file) => file.text.replace(/\/\/.*$|"[^"]*"/gm, '')).join('\n');
    expect(code.match(/ \/ /g)?.length ?? 0).toBe(divisionsOf(code));
    expect(code).not.toMatch(/[a-z]\w* << /);
  });

  it('tells nothing about the machine that rendered it', () => {
    for (const file of files) {
      expect(file.text).not.toContain(hostname());
      expect(file.text).not.toContain(process.cwd());
      expect(file.text).not.toMatch(/\b20\d\d-\d\d/);
    }
  });

  it('keeps to the line width and to ASCII', () => {
    for (const file of files) {
      expect(file.text).toMatch(/^[\n\x20-\x7e]+$/);
      for (const line of file.text.split('\n')) expect(line.length, line).toBeLessThanOrEqual(LINE_WIDTH);
    }
  });

  it('is the same again', async () => {
    expect(await renderFirmware(SHEET, quickDesign(cart(CARTS[name])))).toEqual(files);
  });
});

/** Divisions that a sketch has: sizes of tables at compile time, and the calibration's one. */
function divisionsOf(code: string): number {
  const ofSizes = code.match(/sizeof \w+ \/ sizeof/g)?.length ?? 0;
  const ofRuns = code.includes('SENSOR_COUNT * (SENSOR_COUNT + 1) / 2') ? 1 : 0;
  // Calibration, and its range check.
  const ofSweep = code.includes('finishCalibration(') ? 2 : 0;
  return ofSizes + ofRuns + ofSweep;
}

describe('the header', () => {
  it('names vehicle, digest, version, cautions and how to start', async () => {
    const files = await renderFirmware(SHEET, quickDesign(cart()));
    const header = files[0]!.text.split('\n#include')[0]!.replace(/\n\/\/ ?/g, ' ');
    for (const words of [
      'tray-cart',
      SHEET.digest,
      VERSION,
      'no safety function',
      'ISO 3691-4',
      'IEC 60204-1',
    ])
      expect(header).toContain(words);
    for (const words of [
      'competent, licensed people',
      'wheels off the floor',
      'Battery',
      'press the button',
      '3 flashes',
    ])
      expect(header).toContain(words);
  });

  it('leaves the LED out where the vehicle uses its pin', async () => {
    const files = await renderFirmware(SHEET, quickDesign(cart(CARTS['a sweep'])));
    expect(files.map(({ text }) => text).join('\n')).not.toMatch(/\bLED|blink|\bflash(es)?\b/i);
  });
});

describe('templates', () => {
  it('may use no name that the view model lacks', async () => {
    const rendering = {
      folder: 'arduino',
      language: 'cpp',
      files: [{ template: 'board.cpp', path: 'x/board.cpp', owner: 'tool', wanted: true }],
      view: { origin: 'x' },
    } as const;
    await expect(fillTemplates(rendering)).rejects.toThrow(
      '{{#if}} takes a boolean of the view model, not undefined',
    );
    const misspelt = { ...rendering, files: [{ ...rendering.files[0], template: 'user_hooks.cpp' }] };
    await expect(fillTemplates(misspelt)).rejects.toThrow('{{comment}} takes a text');
  });

  it('skips what is not wanted', async () => {
    const rendering = {
      folder: 'arduino',
      language: 'cpp',
      files: [{ template: 'no such template', path: 'x/y', owner: 'tool', wanted: false }],
      view: {},
    } as const;
    expect(await fillTemplates(rendering)).toEqual([]);
  });
});
