/** Shared by the tests of the questionnaire's flow. */
import { assemble } from '../../src/survey/assemble.js';
import { accept, begin, current, factsOf, type FlowState, visibleEntries } from '../../src/survey/flow.js';
import type { Json } from '../../src/survey/json-tree.js';

/** Accepts defaults up to a question. */
export function until(id: string, state: FlowState = begin({})): FlowState {
  let now = state;
  while (now.at !== id) {
    const entry = current(now);
    if (entry === undefined) throw new Error(`the questionnaire ended before ${id}`);
    now = accept(now, entry.make(factsOf(now)).defaultValue);
  }
  return now;
}

/** Answers one question on the way. */
export function answering(id: string, value: Json, state: FlowState = begin({})): FlowState {
  return accept(until(id, state), value);
}

/** Names of the questions that are asked. */
export const ids = (state: FlowState): string[] => visibleEntries(state).map(({ id }) => id);
/** The sheet that the answers make. */
export const sheetOf = (state: FlowState) => assemble(factsOf(state));
