import { readFileSync, readdirSync } from 'node:fs';
import { expect, test } from 'vitest';
import { RULES } from '../../src/sheet/rules/index.js';

const RULE_FILES = readdirSync(new URL('../../src/sheet/rules/', import.meta.url));
const TABLES = readdirSync(new URL('.', import.meta.url))
  .filter((name) => /^rules-.*\.test\.ts$/.test(name))
  .map((name) => readFileSync(new URL(name, import.meta.url), 'utf8'))
  .join('\n');

test.each(RULES.map(({ name }) => name))('rule %s has the name of its file, and a table of cases', (name) => {
  expect(RULE_FILES).toContain(`${name}.ts`);
  expect(TABLES).toContain(`'${name}': [`);
});

test('every rule file is in the index, once', () => {
  const frame = ['bend.ts', 'index.ts', 'rule.ts', 'view.ts'];
  const names = RULE_FILES.filter((file) => !frame.includes(file)).map((file) => file.replace(/\.ts$/, ''));
  expect(RULES.map(({ name }) => name).sort()).toEqual(names.sort());
});
