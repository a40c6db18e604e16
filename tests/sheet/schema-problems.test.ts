import { describe, expect, test } from 'vitest';
import { schemaProblems } from '../../src/sheet/schema-problems.js';
import { changedSheet } from './example-sheet.js';
import { SCHEMA_KEY_CASES } from './schema-key-cases.js';
import { SCHEMA_PROBLEM_CASES } from './schema-problem-cases.js';

test.each([...SCHEMA_PROBLEM_CASES, ...SCHEMA_KEY_CASES])('$when', ({ changes, want }) => {
  expect(schemaProblems('sheet', changedSheet(changes))).toEqual(want);
});

test('the demo sheet has none', () => {
  expect(schemaProblems('sheet', changedSheet())).toEqual([]);
});

test('all problems come at once', () => {
  const changes = { '/name': '', '/sensors/pitchMm': 95, '/power/fullV': 'x', '/start': undefined, '/zz': 1 };
  const pointers = schemaProblems('sheet', changedSheet(changes)).map(({ pointer }) => pointer);
  expect(pointers.sort()).toEqual(['/name', '/power/fullV', '/sensors/pitchMm', '/start', '/zz']);
});

test.each([undefined, null, true, 7, NaN, 'text', [], () => 1])('%s is no sheet', (data) => {
  const [problem, ...others] = schemaProblems('sheet', data);
  expect(others).toEqual([]);
  expect(problem?.message).toMatch(/ is not an object\.$/);
  expect(problem?.fix).toMatch(/^Write an object with the keys sheetVersion, name, target,/);
});

describe('hostile sheets', () => {
  const names = [
    '*/ system("x") /*',
    '../../x',
    '\u{1f3ce}\ufe0f',
    'while(1)',
    'a'.repeat(41),
    '',
    'a\nb',
    '\u202ename',
    'a b',
  ];

  test.each(names)('name %j is refused and quoted', (name) => {
    const [problem, ...others] = schemaProblems('sheet', changedSheet({ '/name': name }));
    expect(others).toEqual([]);
    expect(problem).toMatchObject({
      pointer: '/name',
      got: JSON.stringify(name),
      allowed: 'a letter, then letters, digits, hyphens or underscores, 40 characters at most',
    });
    expect(problem?.message).not.toMatch(/\p{Cc}/u);
  });

  test.each(['while', 'int', 'constructor', 'CON', 'a'.repeat(40)])('name %s is a name', (name) => {
    expect(schemaProblems('sheet', changedSheet({ '/name': name }))).toEqual([]);
  });

  test.each(['__proto__', 'constructor', 'toString', 'a/b~c', '\u001b[2J'])('key %j is unknown', (key) => {
    const text = JSON.stringify(changedSheet()).replace('{', `{${JSON.stringify(key)}:{"polluted":true},`);
    const problems = schemaProblems('sheet', JSON.parse(text));
    const pointer = `/${key.replaceAll('~', '~0').replaceAll('/', '~1')}`;
    expect(problems.map((problem) => problem.pointer)).toEqual([pointer]);
    expect(problems[0]?.message).not.toMatch(/\p{Cc}/u);
    expect({}).not.toHaveProperty('polluted');
  });

  test('a long value is cut in the message', () => {
    const [problem] = schemaProblems('sheet', changedSheet({ '/name': 'x'.repeat(900_000) }));
    expect(problem?.message.length).toBeLessThan(200);
  });

  test('a hundred problems are told, and that there are more', () => {
    const pins = Array.from({ length: 100_000 }, () => ({}));
    const problems = schemaProblems('sheet', changedSheet({ '/sensors/pins': pins }));
    expect(problems).toHaveLength(101);
    expect(problems.at(-1)).toEqual({
      pointer: '',
      message: 'There are more than 100 problems; these are the first.',
      got: 'more than 100 problems',
      allowed: 'none',
      fix: 'Check that this is the right file.',
    });
  });
});
