/** Text from a file cannot steer the terminal: every control character and every one that reorders text is spelt out. */
import { expect, it } from 'vitest';
import { visible } from '../../src/sheet/words.js';

/** Unicode Bidirectional Algorithm (UAX 9), table 4: the explicit formatting characters and the implicit marks. */
const BIDI = [0x061c, 0x200e, 0x200f, 0x202a, 0x202b, 0x202c, 0x202d, 0x202e, 0x2066, 0x2067, 0x2068, 0x2069];

it('spells out all control characters (C0, DEL, C1) and line separators', () => {
  const controls = [
    ...Array(0x20).keys(),
    ...Array.from({ length: 0x21 }, (_, i) => 0x7f + i),
    0x2028,
    0x2029,
  ];
  for (const code of controls)
    expect(visible(`a${String.fromCodePoint(code)}b`)).toBe(`a\\u{${code.toString(16)}}b`);
});

it('spells out every character that reorders text', () => {
  for (const code of BIDI)
    expect(visible(`a${String.fromCodePoint(code)}b`)).toBe(`a\\u{${code.toString(16)}}b`);
});

it('leaves words of every script, and half a pair is spelt out', () => {
  const words = 'Ölkanne 3 µm, тележка, 苗床, \u{1f331}, $(reboot) `x` & <b>';
  expect(visible(words)).toBe(words);
  expect(visible('a\ud800b')).toBe('a\\u{d800}b');
});
