import { describe, expect, it } from 'vitest';
import { lineChanges } from '../../src/firmware/line-changes.js';

describe('line changes', () => {
  it.each([
    ['nothing changed', 'a\nb\n', 'a\nb\n', 0, 0],
    ['a new file', '', 'a\nb\n', 2, 0],
    ['a file that goes', 'a\nb\n', '', 0, 2],
    ['one line replaced', 'a\nb\nc\n', 'a\nx\nc\n', 1, 1],
    ['a line moved', 'a\nb\nc\nd\n', 'b\nc\na\nd\n', 1, 1],
    ['repeated lines', 'a\na\na\n', 'a\na\n', 0, 1],
    ['the last line end', 'a\nb', 'a\nb\n', 0, 0],
  ])('%s', (_what, before, after, added, removed) => {
    expect(lineChanges(before, after)).toEqual({ added, removed });
  });
});
