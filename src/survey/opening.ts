/** How a questionnaire begins: with what is kept of an earlier one, with a sheet at hand, or from the first question. */
import { counted } from '../sheet/words.js';
import type { Surface } from './ask.js';
import type { Draft } from './draft.js';
import { choiceQuestion } from './fields.js';
import { begin, current, factsOf, type FlowState, REVIEW } from './flow.js';
import type { JsonObject } from './json-tree.js';
import { wrap } from './wrap.js';

/** Said once: how to answer. */
export function sayWelcome(surface: Surface, file: string | undefined): void {
  const lines = [
    surface.style('bold', file === undefined ? 'A build sheet for your vehicle' : `Build sheet ${file}`),
    'Enter takes the value that is offered. A length may have a unit: 6.5 cm.',
    '? explains a question, < goes back to the one before.',
    'Ctrl-C stops; your answers are kept, and the next survey goes on from there.',
  ];
  surface.say(`${lines.flatMap((line) => wrap(line, surface.columns)).join('\n')}\n`);
}

/** The state to begin with; undefined if the person leaves at once. */
export async function openingState(
  surface: Surface,
  base: JsonObject,
  draft: Draft | undefined,
  name: string | undefined,
): Promise<FlowState | undefined> {
  if (draft && Object.keys(draft.answers).length > 0) {
    const resumed = begin(base, draft.answers, draft.at);
    const fresh = await asksAfresh(surface, resumed);
    if (fresh === undefined) return undefined;
    if (!fresh) return resumed;
  }
  if (Object.keys(base).length > 0) return ofSheet(surface, base);
  return begin(name === undefined ? base : { name });
}

async function asksAfresh(surface: Surface, resumed: FlowState): Promise<boolean | undefined> {
  const next = current(resumed)?.make(factsOf(resumed)).title ?? 'the review';
  const kept = counted(Object.keys(resumed.answers).length, 'answer');
  const choices = [
    { value: 'on', label: 'go on', meaning: `with ${next}` },
    { value: 'afresh', label: 'begin afresh', meaning: `${kept} will be dropped` },
  ];
  const why = `${kept} of an earlier survey ${kept === '1 answer' ? 'is' : 'are'} kept.`;
  const question = choiceQuestion({ title: 'Unfinished survey', why, help: [], allowed: '' }, choices, 'on');
  const reply = await surface.ask(question, false);
  return reply.kind === 'answer' ? reply.value === 'afresh' : undefined;
}

/** With a sheet at hand a person may want to change one thing only. */
async function ofSheet(surface: Surface, base: JsonObject): Promise<FlowState | undefined> {
  const choices = [
    { value: 'review', label: 'review', meaning: 'see all answers and change single ones' },
    { value: 'all', label: 'all questions', meaning: 'one by one, with the values of the sheet offered' },
  ];
  const base0 = { title: 'This sheet has values already', why: '', help: [], allowed: '' };
  const reply = await surface.ask(choiceQuestion(base0, choices, 'review'), false);
  if (reply.kind !== 'answer') return undefined;
  return begin(base, {}, reply.value === 'review' ? REVIEW : undefined);
}
