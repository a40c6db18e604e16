/** How rules are tested: changes to the demo sheet, and the lines that the rule then says. */
import { expect, test } from 'vitest';
import { RULES } from '../../src/sheet/rules/index.js';
import { schemaProblems } from '../../src/sheet/schema-problems.js';
import { changedContext, changedSheet, type Changes } from './example-sheet.js';

export interface RuleCase {
  /** What is changed, in words. */
  when: string;
  changes: Changes;
  /** "pointer: message"; empty where the rule is content. */
  want: readonly string[];
}

/** Registers a test for each case of each rule named. */
export function testRules(cases: Readonly<Record<string, readonly RuleCase[]>>): void {
  for (const [name, list] of Object.entries(cases)) {
    const rule = RULES.find((each) => each.name === name);
    for (const { when, changes, want } of list) {
      test(`${name}: ${when}`, () => {
        expect(schemaProblems('sheet', changedSheet(changes)), 'the case has to fit the schema').toEqual([]);
        const found = rule?.check(changedContext(changes)) ?? [];
        expect(found.map(({ pointer, message }) => `${pointer}: ${message}`)).toEqual(want);
        for (const { message, got, allowed, fix } of found) {
          expect(message).toMatch(/\.$/);
          expect(fix).toMatch(/^[A-Z0-9].*\.$/);
          if (rule?.level === 'problem') {
            expect(got).not.toBe(undefined);
            expect(allowed).not.toBe(undefined);
          }
        }
      });
    }
    test(`${name}: is a rule, and content with the demo sheet or only noting`, () => {
      expect(rule?.why).toMatch(/\.$/);
      if (rule?.level === 'problem') expect(rule.check(changedContext({}))).toEqual([]);
    });
  }
}
