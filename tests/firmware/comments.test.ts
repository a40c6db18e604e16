/** No text can end its comment: shown on the text, and by compiling and parsing it. */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { comment, inertText } from '../../src/firmware/comments.js';
import { formatCode } from '../../src/firmware/format.js';
import { HOSTILE } from './hostile-texts.js';

describe('inert text', () => {
  it.each<[string, string]>([
    ['*/ x /*', '* / x / *'],
    ['*/*', '* / *'],
    ['back\\slash', 'back<U+005C>slash'],
    ['a\nb', 'a<U+000A>b'],
    ['\u{1f331}', '<U+1F331>'],
    ['what??/', 'what? ?/'],
    ['"""', '" ""'],
    ['coding: x', 'coding : x'],
    ['5 % of 12.5 mm, (left)', '5 % of 12.5 mm, (left)'],
  ])('%j becomes %j', (text, inert) => {
    expect(inertText(text)).toBe(inert);
  });

  it('is one line of printable ASCII, whatever it was', () => {
    for (const text of HOSTILE) expect(inertText(text)).toMatch(/^[\x20-\x5b\x5d-\x7e]*$/);
  });
});

describe('comment lines', () => {
  it("wrap at words and carry the language's mark", () => {
    const text = 'word '.repeat(40).trim();
    const lines = comment(text, 'python').split('\n');
    expect(lines).toHaveLength(3);
    for (const line of lines) {
      expect(line.length).toBeLessThanOrEqual(96);
      expect(line).toMatch(/^# word( word)*$/);
    }
  });

  it('are one empty comment for an empty text', () => {
    expect(comment('', 'cpp')).toBe('//');
  });
});

describe('hostile text', () => {
  const cpp = HOSTILE.map((text, i) => `${comment(text, 'cpp')}\nint kept${i};`).join('\n');
  const python = HOSTILE.map((text, i) => `${comment(text, 'python')}\nkept${i} = ${i}`).join('\n');

  it('leaves every C++ declaration as it is, without a warning', async () => {
    const folder = mkdtempSync(join(tmpdir(), 'fairlead-hostile-'));
    try {
      const uses = HOSTILE.map((_text, i) => `kept${i}`).join(' + ');
      writeFileSync(
        join(folder, 'a.cpp'),
        await formatCode(`${cpp}\nint main() { return ${uses}; }`, 'a.cpp', 'cpp'),
      );
      const flags = ['-std=gnu++11', '-trigraphs', '-Wall', '-Wextra', '-Werror', '-fsyntax-only'];
      expect(execFileSync('g++', [...flags, 'a.cpp'], { cwd: folder }).toString()).toBe('');
    } finally {
      rmSync(folder, { recursive: true });
    }
  });

  it('leaves every Python statement as it is', async () => {
    const formatted = await formatCode(python, 'a.py', 'python');
    const statements = formatted.split('\n').filter((line) => line !== '' && !line.startsWith('#'));
    expect(statements).toEqual(HOSTILE.map((_text, i) => `kept${i} = ${i}`));
  });
});
