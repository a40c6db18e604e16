import { describe, expect, it } from 'vitest';
import {
  type JsonObject,
  leavesOf,
  sameJson,
  valueAt,
  withoutValue,
  withValue,
} from '../../src/survey/json-tree.js';

const tree: JsonObject = { line: { widthMm: 19 }, pins: ['A0', 'A1'], 'a/b': { '~': 1 } };

describe('valueAt', () => {
  it('follows objects, lists and escaped keys', () => {
    expect(valueAt(tree, '/line/widthMm')).toBe(19);
    expect(valueAt(tree, '/pins/1')).toBe('A1');
    expect(valueAt(tree, '/a~1b/~0')).toBe(1);
  });

  it('finds nothing where there is nothing, nor anything inherited', () => {
    for (const pointer of ['/line/gap', '/pins/2', '/pins/length', '/line/widthMm/x', '/constructor']) {
      expect(valueAt(tree, pointer)).toBeUndefined();
    }
  });
});

describe('withValue', () => {
  it('changes a copy and keeps the place of the key', () => {
    const changed = withValue(tree, '/line/widthMm', 25);
    expect(valueAt(changed, '/line/widthMm')).toBe(25);
    expect(Object.keys(changed)).toEqual(['line', 'pins', 'a/b']);
    expect(valueAt(tree, '/line/widthMm')).toBe(19);
  });

  it('makes the objects on the way, also where something else stands', () => {
    expect(withValue({ drive: 3 }, '/drive/motor/rpm', 5)).toEqual({ drive: { motor: { rpm: 5 } } });
  });

  it('takes __proto__ for a key like any other', () => {
    const changed = withValue({}, '/__proto__/polluted', true);
    expect(Object.hasOwn(changed, '__proto__')).toBe(true);
    expect(({} as Record<string, unknown>)['polluted']).toBeUndefined();
  });
});

describe('withoutValue', () => {
  it('removes one value and minds no absence', () => {
    expect(withoutValue({ a: { b: 1, c: 2 } }, '/a/b')).toEqual({ a: { c: 2 } });
    expect(withoutValue({ a: 1 }, '/x/y')).toEqual({ a: 1 });
  });
});

describe('sameJson', () => {
  it('minds the order of lists, not of keys', () => {
    expect(sameJson({ a: [1, { b: 2 }], c: null }, { c: null, a: [1, { b: 2 }] })).toBe(true);
    expect(sameJson([1, 2], [2, 1])).toBe(false);
    expect(sameJson({ a: 1 }, { a: 1, b: 2 })).toBe(false);
    expect(sameJson([], {})).toBe(false);
    expect(sameJson({ a: 1 }, { b: 1 })).toBe(false);
  });
});

describe('leavesOf', () => {
  it('lists values by pointer, plain lists whole', () => {
    expect(leavesOf({ a: { 'b/c': 1 }, pins: [1, 2], classes: [{ name: 'x' }] })).toEqual([
      ['/a/b~1c', 1],
      ['/pins', [1, 2]],
      ['/classes/0/name', 'x'],
    ]);
  });
});
