import { describe, expect, it } from 'vitest';
import { fileName, identifier, isIdentifier } from '../../src/firmware/identifiers.js';

describe('identifiers', () => {
  it.each(['SENSOR_COUNT', 'turn', 'x2'])('%s may be a name in both languages', (name) => {
    expect(isIdentifier(name, 'cpp')).toBe(true);
    expect(isIdentifier(name, 'python')).toBe(true);
  });

  it.each([
    'class',
    'alignas',
    'xor',
    'setup',
    'PI',
    'LED_BUILTIN',
    '2nd',
    '',
    'a-b',
    'a__b',
    '_A',
    'é',
    'a b',
  ])('%j may not be a name in C++', (name) => {
    expect(isIdentifier(name, 'cpp')).toBe(false);
  });

  it.each(['def', 'None', 'match', 'lambda', 'const', 'machine', 'a.b'])(
    '%j may not be a name in Python',
    (name) => {
      expect(isIdentifier(name, 'python')).toBe(false);
    },
  );

  it('says what it refuses', () => {
    expect(() => identifier('switch', 'cpp')).toThrow('"switch" cannot be a name in cpp.');
    expect(identifier('lane', 'cpp')).toBe('lane');
  });
});

describe('file names', () => {
  it.each(['tray-cart', 'A', 'seed_cart2'])('%s names a folder', (name) => {
    expect(fileName(name)).toBe(name);
  });

  it.each(['', '..', '../x', 'a/b', 'a\\b', 'a.b', 'CON', 'nul', 'Lpt1', '-a', '\u{1f331}', 'x'.repeat(41)])(
    'refuses %j',
    (name) => {
      expect(() => fileName(name)).toThrow('cannot name a folder on every system');
    },
  );
});
