import { describe, expect, it } from 'vitest';
import { DotCanvas, isUtf8Locale } from '../../src/report/dot-canvas.js';

describe('DotCanvas', () => {
  it('sets each dot of a braille character as Unicode numbers them', () => {
    const order = [
      [0, 0, 0x2801],
      [0, 1, 0x2802],
      [0, 2, 0x2804],
      [1, 0, 0x2808],
      [1, 1, 0x2810],
      [1, 2, 0x2820],
      [0, 3, 0x2840],
      [1, 3, 0x2880],
    ] as const;
    for (const [x, y, code] of order) {
      const canvas = new DotCanvas(1, 1, true);
      canvas.dot(x, y);
      expect(canvas.lines()).toEqual([String.fromCharCode(code)]);
    }
  });

  it('draws lines, in ASCII two dots a character', () => {
    const canvas = new DotCanvas(4, 2, false);
    canvas.line(0, 0, 3, 3);
    expect(canvas.lines()).toEqual(["'.", "  '."]);
  });

  it('puts marks over dots and leaves out what lies outside', () => {
    const canvas = new DotCanvas(3, 1, false);
    canvas.line(-5, 0, 10, 0);
    canvas.mark(1, 0, 'X');
    canvas.mark(3, 0, 'Y');
    canvas.dot(Number.NaN, 0);
    expect(canvas.lines()).toEqual(["'X'"]);
  });
});

describe('isUtf8Locale', () => {
  it.each([
    [{ LANG: 'en_GB.UTF-8' }, true],
    [{ LANG: 'C.utf8' }, true],
    [{ LANG: 'en_GB.UTF-8', LC_ALL: 'C' }, false],
    [{ LANG: 'C', LC_CTYPE: 'C.UTF-8' }, true],
    [{ LANG: 'de_DE' }, false],
    [{}, false],
  ])('%j: %s', (environment, expected) => {
    expect(isUtf8Locale(environment)).toBe(expected);
  });
});
