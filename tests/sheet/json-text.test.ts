import fc from 'fast-check';
import { expect, test } from 'vitest';
import { findJsonFault } from '../../src/sheet/json-text.js';

test.each([
  ['{"a": 1,}', 1, 9, 'found "}" where a key in double quotes should be'],
  ["{'a': 1}", 1, 2, 'found "\'" where a key in double quotes should be'],
  ['{\n  "a": 1\n  "b": 2\n}', 3, 3, 'found "\\"" where "," or "}" should be'],
  ['{"a" 1}', 1, 6, 'found "1" where ":" after the key should be'],
  ['{"a": }', 1, 7, 'found "}" where a value should be'],
  ['[1, 2', 1, 6, 'the file ends here where "," or "]" should be'],
  ['{"a": 01}', 1, 8, 'found "1" where "," or "}" should be'],
  ['{"a": .5}', 1, 7, 'found "." where a value should be'],
  ['{"a": NaN}', 1, 7, 'found "N" where a value should be'],
  [
    '{"a": "x\ny"}',
    1,
    7,
    'this text has no closing quote on its line, or a wrong escape or control character in it',
  ],
  [
    '{"a": "\\q"}',
    1,
    7,
    'this text has no closing quote on its line, or a wrong escape or control character in it',
  ],
  ['{} {}', 1, 4, 'found "{" where the end of the file should be'],
  ['// note\n{}', 1, 1, 'found "/" where a value should be'],
  ['', 1, 1, 'the file ends here where a value should be'],
  ['{"a": 1,\n "b": 2,\n "a": 3}', 3, 2, 'the key "a" stands here a second time'],
  ['{"a": {"\\u0061": 1, "a": 2}}', 1, 21, 'the key "a" stands here a second time'],
  ['\u001b[31m', 1, 1, 'found "\\u001b" where a value should be'],
])('%j', (text, line, column, what) => {
  expect(findJsonFault(text)).toMatchObject({ line, column, what });
});

test('one key may stand in two objects', () => {
  expect(findJsonFault('[{"a": 1}, {"a": 1}, {"__proto__": 1, "constructor": 2}]')).toBe(undefined);
});

test('nesting is bounded', () => {
  expect(findJsonFault(`${'['.repeat(64)}${']'.repeat(64)}`)).toBe(undefined);
  expect(findJsonFault('['.repeat(500_000))).toMatchObject({ what: 'nesting is deeper than 64 levels' });
});

test('a text of a megabyte is no trouble', () => {
  expect(findJsonFault(JSON.stringify('x\\"'.repeat(250_000)))).toBe(undefined);
});

const isJson = (text: string): boolean => {
  try {
    JSON.parse(text);
    return true;
  } catch {
    return false;
  }
};

/** Objects have no repeated keys in these, so that JSON.parse and the scanner have to agree. */
const value = fc.jsonValue({ maxDepth: 5 });

test('agrees with JSON.parse on JSON', () => {
  fc.assert(
    fc.property(value, fc.constantFrom(0, 2), (data, indent) => {
      expect(findJsonFault(JSON.stringify(data, null, indent))).toBe(undefined);
    }),
  );
});

test('agrees with JSON.parse on damaged JSON', () => {
  const damage = fc.record({
    at: fc.nat(),
    drop: fc.nat({ max: 3 }),
    put: fc.string({ maxLength: 2, unit: 'binary' }),
  });
  fc.assert(
    fc.property(value, damage, (data, { at, drop, put }) => {
      const text = JSON.stringify(data);
      const start = at % (text.length + 1);
      const damaged = text.slice(0, start) + put + text.slice(start + drop);
      const fault = findJsonFault(damaged);
      // Damage may make two keys equal; JSON.parse does not mind that.
      if (fault?.what.endsWith('a second time')) return;
      expect(fault === undefined).toBe(isJson(damaged));
    }),
    { numRuns: 500 },
  );
});
