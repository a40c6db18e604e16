import { describe, expect, it } from 'vitest';
import { wrap } from '../../src/survey/wrap.js';

describe('wrap', () => {
  it('breaks at words, one character short of the width', () => {
    expect(wrap('aaaa bbbb cccc dddd eeee ffff', 25)).toEqual(['aaaa bbbb cccc dddd eeee', 'ffff']);
  });

  it('indents, and hangs what follows', () => {
    expect(wrap('aaaaaaaa bbbbbbbb cccc', 20, 2, 2)).toEqual(['  aaaaaaaa bbbbbbbb', '    cccc']);
  });

  it('leaves a long word whole', () => {
    expect(wrap(`a ${'x'.repeat(40)} b`, 30)).toEqual(['a', 'x'.repeat(40), 'b']);
  });

  it('makes no line of nothing', () => {
    expect(wrap('', 80)).toEqual([]);
  });
});
