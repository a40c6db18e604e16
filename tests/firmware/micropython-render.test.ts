/** What every rendered MicroPython program has in common, over vehicles that use every branch of the templates. */
import { beforeAll, describe, expect, it } from 'vitest';
import { LINE_WIDTH } from '../../src/firmware/format.js';
import { isIdentifier } from '../../src/firmware/identifiers.js';
import type { PythonFile } from '../../src/rehearsal/micropython-interpreter.js';
import { VERSION } from '../../src/version.js';
import { SHEET, cart, quickDesign } from './cart.js';
import { MICROPYTHON_CARTS } from './micropython-carts.js';
import { boardFiles } from './micropython-stand.js';

const UNITS =
  /_(Q\d+|255THS|US|SAMPLES|COUNTS|BITS|ENTRIES|COUNT|LEVEL|LIMIT|EDGE|CLASSES|INDEX|FLAGS|CLASS)$/;
/** What the board's interpreter brings. */
const BUILT_IN = ['array', 'gc', 'machine', 'micropython', 'time'];

interface Import {
  module: string;
  /** Names that the file has from it: the module's own, or those taken out of it. */
  names: string[];
}

function importsOf(text: string): Import[] {
  const whole = [...text.matchAll(/^ *import (\w+)/gm)].map(([, module]) => ({
    module: module!,
    names: [module!],
  }));
  const parts = [...text.matchAll(/^from (\w+) import (?:\(([^)]*)\)|(.+))$/gm)].map(
    ([, module, list, line]) => ({
      module: module!,
      names: (list ?? line!).split(',').flatMap((name) => name.trim() || []),
    }),
  );
  return [...whole, ...parts];
}

/** Text without comments, docstrings and strings. */
function codeOf(text: string): string {
  return text.replace(/"""[^"]*"""/g, '').replace(/"[^"]*"|#.*$/gm, '');
}

const uses = (text: string, name: string) => new RegExp(`\\b${name}\\b`).test(codeOf(text));

describe.each(Object.keys(MICROPYTHON_CARTS))('the program of %s', (name) => {
  const design = quickDesign(cart(MICROPYTHON_CARTS[name]));
  let files: PythonFile[];
  let text: (path: string) => string;
  beforeAll(async () => {
    files = await boardFiles(design);
    text = (path) => files.find((file) => file.path === path)?.text ?? '';
  });

  const definedIn = (path: string) => [...text(path).matchAll(/^([A-Z]\w+) = /gm)].map((match) => match[1]!);

  it('defines constants that end in a unit, comments them, and uses every one of them', () => {
    const names = definedIn('constants.py');
    expect(names.length).toBeGreaterThan(25);
    const lines = text('constants.py').split('\n');
    for (const each of names) {
      expect(each).toMatch(UNITS);
      expect(isIdentifier(each, 'python')).toBe(true);
      const users = files.filter(({ path, text: code }) => path !== 'constants.py' && uses(code, each));
      expect(users, each).not.toEqual([]);
      const line = lines.findIndex((code) => code.startsWith(`${each} = `));
      if (each !== 'LAST_CLASS') expect(lines[line - 1], each).toMatch(/^# \S/);
    }
  });

  it('uses every pin and every reason that it names', () => {
    for (const each of [...definedIn('pins.py'), ...definedIn('states.py')]) {
      const users = files.filter(({ path, text: code }) => !/pins|states/.test(path) && uses(code, each));
      expect(users, each).not.toEqual([]);
    }
  });

  it('imports only what is there and what it uses, and has no module that nobody imports', () => {
    const own = files.map(({ path }) => path.replace('.py', ''));
    for (const file of files) {
      for (const { module, names } of importsOf(file.text)) {
        expect([...own, ...BUILT_IN]).toContain(module);
        const rest = file.text.replace(/^ *(from .* import (\([^)]*\)|.+)|import .+)$/gm, '');
        for (const each of names) expect(uses(rest, each), `${each} in ${file.path}`).toBe(true);
        if (!own.includes(module)) continue;
        for (const each of names.filter((taken) => taken !== module))
          expect(text(`${module}.py`), `${each} of ${module}`).toMatch(
            new RegExp(`^(${each} =|(def|class) ${each}\\b)`, 'm'),
          );
      }
    }
    const imported = files.flatMap((file) => importsOf(file.text).map(({ module }) => module));
    for (const each of own.filter((module) => module !== 'main')) expect(imported).toContain(each);
  });

  it('divides nowhere but in the calibration, and has no fractions', () => {
    for (const { path, text: source } of files) {
      const code = codeOf(source);
      expect(code.match(/\/\/?/g)?.length ?? 0, path).toBe(path === 'calibration.py' ? 1 : 0);
      expect(code, path).not.toMatch(/\d\.\d|float/);
    }
  });

  it('keeps to the line width and to ASCII', () => {
    for (const file of files) {
      expect(file.text).toMatch(/^[\n\x20-\x7e]+$/);
      for (const line of file.text.split('\n')) expect(line.length, line).toBeLessThanOrEqual(LINE_WIDTH);
    }
  });

  it('says in its main file what it is, what to be careful about, how to copy and how to start it', () => {
    const header = text('main.py').split('\nimport')[0]!;
    const flowing = header.replace(/\n# ?/g, ' ');
    for (const words of [
      'tray-cart',
      SHEET.digest,
      VERSION,
      'no safety function',
      'ISO 3691-4',
      'wheels off the floor',
    ])
      expect(flowing).toContain(words);
    expect(flowing).toContain('press the button');
    const copied = [...header.matchAll(/^# mpremote cp (.+) :$/gm)].flatMap(([, list]) => list!.split(' '));
    expect(copied.toSorted()).toEqual(files.map(({ path }) => path).toSorted());
    expect(copied.at(-1)).toBe('main.py');
  });

  it('switches the motors off before anything else, and at the end whatever happens', () => {
    const code = text('main.py')
      .replace(/^#.*$|\s+#.*$/gm, '')
      .trim();
    expect(code.split('\n')[0]).toBe('import motors');
    expect(code).toMatch(/finally:\n {4}motors\.off\(\)$/);
  });

  it('is the same again', async () => {
    expect(await boardFiles(design)).toEqual(files);
  });
});

describe('the LED', () => {
  it('is left out where the vehicle uses its pin', async () => {
    const files = await boardFiles(quickDesign(cart(MICROPYTHON_CARTS['esp32, digital on the LED pin'])));
    expect(files.map(({ text }) => text).join('\n')).not.toMatch(/\bLED|blink|\bflash(es)?\b/i);
  });
});
