/** The whole check of a sheet: the schema first, then, on a sheet that fits it, all rules across fields. */
import { withDefaults, type ResolvedSheet } from './defaults.js';
import type { Problem } from './problem.js';
import { RULES } from './rules/index.js';
import { ruleContext } from './rules/rule.js';
import { schemaProblems } from './schema-problems.js';
import type { Sheet } from './sheet-types.js';

export interface SheetCheck {
  /** With every default filled in; present if there is no problem. */
  sheet?: ResolvedSheet;
  /** All that stands in the way of a design. */
  problems: Problem[];
  /** What is worth knowing; none while the sheet does not fit the schema. */
  notes: Problem[];
}

/** Checks parsed JSON of any kind. Pure; never throws. */
export function checkSheet(data: unknown): SheetCheck {
  const misfits = schemaProblems('sheet', data);
  if (misfits.length > 0) return { problems: misfits, notes: [] };
  const given = data as Sheet;
  const sheet = withDefaults(given);
  const context = ruleContext(sheet, given);
  const found = (level: 'problem' | 'note'): Problem[] =>
    RULES.filter((rule) => rule.level === level).flatMap((rule) => rule.check(context));
  const problems = found('problem');
  const notes = found('note');
  return problems.length > 0 ? { problems, notes } : { sheet, problems, notes };
}
