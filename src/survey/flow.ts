/**
 * The questionnaire as a state machine: which question is the current one, and what an answer, a step back or a jump
 * makes of it. Pure; asking is somebody else's job.
 *
 * On the way out the questions come in their order. From the review (`reviewing`) a person jumps to single ones; then only
 * questions that an answer has raised or reopened follow, and the review again.
 */
import { type Answers, Facts, IS_READING } from './facts.js';
import { isObject, type Json, type JsonObject, sameJson } from './json-tree.js';
import { pinNeeds } from './pins.js';
import { type Entry, entriesFor } from './questions.js';

/** The place after the last question. */
export const REVIEW = '#review';

export interface FlowState {
  readonly base: JsonObject;
  readonly answers: Answers;
  /** The current question, or the review. */
  readonly at: string;
  readonly reviewing: boolean;
  /** Questions to be asked again before the review is shown. */
  readonly pending: readonly string[];
}

export function factsOf(state: FlowState): Facts {
  return new Facts(state.base, state.answers);
}

export function visibleEntries(state: FlowState): Entry[] {
  return entriesFor(factsOf(state));
}

/** The first question, or the review where a sheet is at hand and only single values are to change. */
export function begin(base: JsonObject, answers: Answers = {}, at?: string): FlowState {
  const facts = new Facts(base, answers);
  const kept = accepted(facts);
  const state = { base, answers: kept, at: at ?? '', reviewing: at === REVIEW, pending: [] };
  const entries = visibleEntries(state);
  if (at === REVIEW) return { ...state, at: unsettled(state)?.id ?? REVIEW };
  return entries.some(({ id }) => id === at) ? state : { ...state, at: entries[0]?.id ?? REVIEW };
}

/** The current question; undefined at the review. */
export function current(state: FlowState): Entry | undefined {
  return visibleEntries(state).find(({ id }) => id === state.at);
}

/** The state after an answer to the current question, in the sheet's unit. */
export function accept(state: FlowState, value: Json): FlowState {
  const before = visibleEntries(state).map(({ id }) => id);
  const here = before.indexOf(state.at);
  const answers = accepted(new Facts(state.base, answered(state, value)));
  const next = { ...state, answers };
  if (state.reviewing) return nextOfReview(next, value);
  // The current question may be gone with its answer; then the nearest one before it marks the place.
  const after = visibleEntries(next).map(({ id }) => id);
  const place = before.slice(0, here + 1).findLast((id) => after.includes(id));
  const following = after[place === undefined ? 0 : after.indexOf(place) + 1];
  return following === undefined ? { ...next, at: REVIEW, reviewing: true } : { ...next, at: following };
}

/** From the review only what an answer raises is asked, before it is shown again. */
function nextOfReview(state: FlowState, value: Json): FlowState {
  const pinByPin = state.at === '#pins' && value === 'by-hand';
  const wanted = pinByPin ? pinNeeds(factsOf(state)).map(({ pointer }) => pointer) : state.pending;
  const ids = visibleEntries(state).map(({ id }) => id);
  const pending = wanted.filter((id) => id !== state.at && ids.includes(id));
  return { ...state, pending, at: pending[0] ?? unsettled(state)?.id ?? REVIEW };
}

export function canGoBack(state: FlowState): boolean {
  return state.reviewing || visibleEntries(state)[0]?.id !== state.at;
}

/** The question before, across groups; from a question that was jumped to, the review. */
export function back(state: FlowState): FlowState {
  if (state.reviewing) return { ...state, at: REVIEW, pending: [] };
  const ids = visibleEntries(state).map(({ id }) => id);
  return { ...state, at: ids[Math.max(ids.indexOf(state.at) - 1, 0)] ?? REVIEW };
}

/** From the review to one question. */
export function jump(state: FlowState, id: string): FlowState {
  return { ...state, at: id, reviewing: true, pending: [] };
}

/** Pins fit a certain board, kind and number of sensors, and driver. */
const DECIDES_PINS = new Set([
  '/target/board',
  '/sensors/kind',
  '/sensors/count',
  '/drive/driver/scheme',
  '#standby',
  '#encoders',
  '#stopInput',
  '/encoders/channels',
]);

/** The answers with one more, without those that it overtakes. */
function answered(state: FlowState, value: Json): Answers {
  // An answer such as "another board" is given as the answers that it stands for.
  const given = isObject(value) && state.at.startsWith('#fit') ? value : { [state.at]: value };
  const facts = factsOf(state);
  const changed = Object.keys(given).filter((id) => !sameJson(facts.get(id), given[id]));
  let kept = Object.entries(state.answers);
  if (changed.some((id) => DECIDES_PINS.has(id))) kept = kept.filter(([id]) => id !== '#pins');
  const answers = { ...Object.fromEntries(kept), ...given };
  const rescaled = new Facts(state.base, answers).board.adcMaxCount !== facts.board.adcMaxCount;
  return rescaled ? without(answers, IS_READING) : answers;
}

function without(answers: Answers, pattern: RegExp): Answers {
  return Object.fromEntries(Object.entries(answers).filter(([id]) => !pattern.test(id)));
}

/** The answers that their questions still accept, as far as they are asked at all. */
function accepted(facts: Facts): Answers {
  const refused = entriesFor(facts).filter(({ id, make }) => {
    const answer = facts.answers[id];
    return answer !== undefined && 'problem' in make(facts).judged(answer);
  });
  const gone = new Set(refused.map(({ id }) => id));
  return Object.fromEntries(Object.entries(facts.answers).filter(([id]) => !gone.has(id)));
}

/** The first question that has neither an answer nor an acceptable value in the sheet at hand. */
function unsettled(state: FlowState): Entry | undefined {
  const facts = factsOf(state);
  return entriesFor(facts).find((entry) => !isSettled(entry, facts));
}

function isSettled({ id, make, settled }: Entry, facts: Facts): boolean {
  if (settled) return settled(facts);
  const given = facts.given(id);
  return given !== undefined && 'value' in make(facts).judged(given);
}
