/**
 * The conversation: asks question after question, keeps every answer at once, tells what the answers amount to, and ends
 * with an agreed sheet or with kept answers.
 */
import { checkSheet } from '../sheet/check.js';
import type { Surface } from './ask.js';
import { assemble } from './assemble.js';
import { accept, back, canGoBack, current, factsOf, type FlowState, jump } from './flow.js';
import type { JsonObject } from './json-tree.js';
import { plainly } from './question.js';
import { type Entry, type GroupId, GROUPS } from './questions.js';
import { remarksAfter } from './remarks.js';
import { actionQuestion, CHANGE, changeQuestion, problemText, reviewLines, STOP, WRITE } from './review.js';
import { wrap } from './wrap.js';

/** How a conversation ended. */
export type Ending = { kind: 'agreed'; sheet: JsonObject } | { kind: 'left'; interrupted: boolean };

export interface Conversation {
  surface: Surface;
  /** Where it begins. */
  start: FlowState;
  /** Keeps the answers; called after every step, and waited for. */
  keep(state: FlowState): Promise<void>;
  /** Name of the file that a sheet would go to. */
  fileFor(sheet: JsonObject): string;
  /** What the sheet changes in the one at hand, for the review. */
  changesIn(sheet: JsonObject): string[];
}

type Step = { kind: 'on'; state: FlowState } | Ending;

/** Runs until the sheet is agreed or the person leaves. */
export async function converse(talk: Conversation): Promise<Ending> {
  const told = new Set<string>();
  let state = talk.start;
  let group: GroupId | undefined;
  for (;;) {
    const entry = current(state);
    if (entry && entry.group !== group && !state.reviewing) sayHeading(entry.group, talk.surface);
    group = entry?.group;
    const step = entry ? await askEntry(entry, state, talk, told) : await review(state, talk);
    if (step.kind !== 'on') return step;
    state = step.state;
    await talk.keep(state);
  }
}

function sayHeading(group: GroupId, surface: Surface): void {
  const ids = Object.keys(GROUPS);
  const title = `${ids.indexOf(group) + 1}/${ids.length} ${GROUPS[group]}`;
  surface.say(`\n${surface.style('bold', title)}\n`);
}

async function askEntry(
  entry: Entry,
  state: FlowState,
  { surface }: Conversation,
  told: Set<string>,
): Promise<Step> {
  const reply = await surface.ask(entry.make(factsOf(state)), canGoBack(state));
  if (reply.kind === 'closed') return { kind: 'left', interrupted: true };
  if (reply.kind === 'back') return { kind: 'on', state: back(state) };
  const next = accept(state, reply.value);
  const { feedback, problems } = remarksAfter(entry.id, next);
  const fresh = problems.map(problemText).filter((text) => !told.has(text));
  for (const text of feedback) say(surface, `= ${text}`, 'cyan');
  for (const text of fresh) say(surface, `! ${text}`, 'red');
  for (const text of fresh) told.add(text);
  return { kind: 'on', state: next };
}

function say(surface: Surface, text: string, look: 'cyan' | 'red'): void {
  const lines = wrap(text, surface.columns, 2, 2).map((line) => surface.style(look, line));
  surface.say(`${lines.join('\n')}\n`);
}

async function review(state: FlowState, talk: Conversation): Promise<Step> {
  const { surface } = talk;
  const sheet = assemble(factsOf(state));
  const check = checkSheet(sheet);
  const changes = talk.changesIn(sheet);
  const lines = [
    '',
    surface.style('bold', 'Review'),
    ...reviewLines(state, check, surface),
    ...(changes.length > 0 ? ['', surface.style('bold', `Changes in ${talk.fileFor(sheet)}`)] : []),
    ...changes.flatMap((change) => wrap(change, surface.columns, 1, 2)),
    '',
  ];
  surface.say(`${lines.join('\n')}\n`);
  const reply = await surface.ask(actionQuestion(state, check, talk.fileFor(sheet)), false);
  if (reply.kind !== 'answer') return { kind: 'left', interrupted: true };
  if (reply.value === STOP) return { kind: 'left', interrupted: false };
  if (reply.value === WRITE) return { kind: 'agreed', sheet };
  if (reply.value !== CHANGE) return { kind: 'on', state: jump(state, plainly(reply.value)) };
  const which = await surface.ask(changeQuestion(state), true);
  if (which.kind === 'closed') return { kind: 'left', interrupted: true };
  return { kind: 'on', state: which.kind === 'back' ? state : jump(state, plainly(which.value)) };
}
