/** The review: every answer by group, with what is wrong beside it, and what can be done next. Pure. */
import type { SheetCheck } from '../sheet/check.js';
import type { Problem } from '../sheet/problem.js';
import { counted } from '../sheet/words.js';
import { factsOf, type FlowState, visibleEntries } from './flow.js';
import { ABOUT_PINS } from './pins.js';
import type { PromptConfig } from './prompt-frame.js';
import { type Choice, plainly, type Question, type Read } from './question.js';
import { type Entry, GROUPS } from './questions.js';
import { choiceQuestion } from './fields.js';
import { wrap } from './wrap.js';

/** What is wrong, and what to do about it, in one or two sentences. */
export function problemText({ message, fix }: Problem): string {
  return fix === undefined ? message : `${message} ${fix}`;
}

/** The question that a problem is about: the one of that value, of the whole it belongs to, or of a part of it. */
export function concerned(pointer: string, entries: readonly Entry[]): Entry | undefined {
  const plan = ABOUT_PINS.test(pointer) ? ['#pins', '#fit-pins'] : [];
  const ids = [
    ...entries.map(({ id }) => id).filter((id) => pointer === id || pointer.startsWith(`${id}/`)),
    ...plan,
    ...(pointer === '/target/language' ? ['/target/board'] : []),
    ...entries.map(({ id }) => id).filter((id) => pointer !== '' && id.startsWith(`${pointer}/`)),
  ];
  return ids.map((id) => entries.find((entry) => entry.id === id)).find((entry) => entry !== undefined);
}

/** The review as lines: numbered answers under their groups, problems ("!") and notes ("note:") below the answer. */
export function reviewLines(
  state: FlowState,
  check: SheetCheck,
  { columns, style }: Pick<PromptConfig, 'columns' | 'style'>,
): string[] {
  const facts = factsOf(state);
  const entries = visibleEntries(state);
  const lines: string[] = [];
  const remarks = (about: Entry | undefined, indent: number): void => {
    const tell = (problem: Problem, start: string, look: 'red' | 'dim'): void => {
      if (concerned(problem.pointer, entries) !== about) return;
      const text = wrap(`${start} ${problemText(problem)}`, columns, indent, 2);
      lines.push(...text.map((line) => style(look, line)));
    };
    for (const problem of check.problems) tell(problem, '!', 'red');
    for (const note of check.notes) tell(note, 'note:', 'dim');
  };
  let group = '';
  for (const [index, entry] of entries.entries()) {
    if (entry.group !== group) lines.push('', style('bold', GROUPS[entry.group]));
    group = entry.group;
    const { title, show, defaultValue, lines: plan = [] } = entry.make(facts);
    const number = index + 1;
    lines.push(...wrap(`${number} ${title}: ${show(defaultValue)}`, columns, number < 10 ? 2 : 1, 4));
    lines.push(...plan.flatMap((line) => wrap(line, columns, 4, 2)));
    remarks(entry, 4);
  }
  remarks(undefined, 0);
  return lines;
}

/** What to do at the review: a name, or the id of a question to go to. */
export const WRITE = '#write';
export const CHANGE = '#change';
export const STOP = '#stop';
const MOST_JUMPS = 4;

export function actionQuestion(state: FlowState, check: SheetCheck, file: string): Question {
  const facts = factsOf(state);
  const entries = visibleEntries(state);
  const wrong = new Set(check.problems.map(({ pointer }) => concerned(pointer, entries)));
  const jumps = [...wrong].slice(0, MOST_JUMPS).flatMap((entry): Choice[] => {
    return entry ? [{ value: entry.id, label: `go to ${entry.make(facts).title}` }] : [];
  });
  const fine = check.problems.length === 0;
  const choices: Choice[] = [
    ...(fine ? [{ value: WRITE, label: 'write', meaning: file }] : jumps),
    { value: CHANGE, label: 'change', meaning: 'an answer, by its number or name' },
    { value: STOP, label: 'stop', meaning: 'the answers are kept' },
  ];
  const title = fine
    ? 'All answers fit together'
    : `${counted(check.problems.length, 'problem')} to be solved`;
  const why = fine ? '' : 'The sheet can be written once there is none.';
  return choiceQuestion({ title, why, help: [], allowed: '' }, choices, choices[0]?.value ?? STOP);
}

/** Which answer to change: by its number in the review or a part of its name. */
export function changeQuestion(state: FlowState): Question {
  const facts = factsOf(state);
  const entries = visibleEntries(state);
  const titles = entries.map((entry) => entry.make(facts).title);
  const judged = (text: string): Read => {
    const number = Number(text);
    const numbered = entries[number - 1];
    if (numbered) return { value: numbered.id };
    const wanted = text.toLowerCase();
    const exact = titles.findIndex((title) => title.toLowerCase() === wanted);
    const hits = titles.flatMap((title, index) => (title.toLowerCase().includes(wanted) ? [index] : []));
    const [hit, another] = exact >= 0 ? [exact] : hits;
    if (hit !== undefined && another === undefined) return { value: entries[hit]?.id ?? '' };
    const candidates = hits.map((index) => `${index + 1} ${titles[index] ?? ''}`);
    return {
      problem:
        hits.length > 1 ? `Which one: ${candidates.join(', ')}?` : 'No answer has that number or name.',
    };
  };
  return {
    title: 'Which answer',
    why: '',
    help: ['Some letters of the name will do if they are found in one name only.'],
    allowed: `1 to ${entries.length}, or a name`,
    defaultValue: '1',
    show: (value) => titles[entries.findIndex(({ id }) => id === value)] ?? plainly(value),
    read: (text) => judged(text.trim()),
    judged: (value) => judged(plainly(value)),
  };
}
