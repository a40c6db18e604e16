/** What is to be told after an answer: what the answers amount to, and what does not fit together. Pure. */
import { checkSheet } from '../sheet/check.js';
import { withDefaults } from '../sheet/defaults.js';
import type { Problem } from '../sheet/problem.js';
import { schemaProblems } from '../sheet/schema-problems.js';
import type { Sheet } from '../sheet/sheet-types.js';
import { assemble } from './assemble.js';
import { feedbackAfter } from './feedback.js';
import { factsOf, type FlowState, visibleEntries } from './flow.js';
import type { GroupId } from './questions.js';
import { concerned } from './review.js';

export interface Remarks {
  /** Short sentences. */
  feedback: string[];
  /** What is wrong with the answers so far. */
  problems: Problem[];
}

/** These groups end before there is anything to hold their answers against. */
const TOO_EARLY: readonly GroupId[] = ['vehicle', 'line'];

/** Remarks after the question `id` was answered; `state` is the one after the answer. */
export function remarksAfter(id: string, state: FlowState): Remarks {
  const entries = visibleEntries(state);
  const index = entries.findIndex((entry) => entry.id === id);
  const entry = entries[index];
  if (entry === undefined) return { feedback: [], problems: [] };
  const sheet = assemble(factsOf(state));
  if (schemaProblems('sheet', sheet).length > 0) return { feedback: [], problems: [] };
  const resolved = withDefaults(sheet as unknown as Sheet);
  const feedback = feedbackAfter(id, resolved);
  const endsGroup = entries[index + 1]?.group !== entry.group;
  if (!endsGroup || TOO_EARLY.includes(entry.group)) return { feedback, problems: [] };
  const soFar = entries.slice(0, index + 1);
  const problems = checkSheet(sheet).problems.filter(({ pointer }) => {
    const about = concerned(pointer, entries);
    return about !== undefined && soFar.includes(about);
  });
  return { feedback: [...feedback, ...feedbackAfter(`end of ${entry.group}`, resolved)], problems };
}
