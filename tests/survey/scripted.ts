/** A terminal played by a script: answers by the question's title, Enter for every other question. */
import type { Surface } from '../../src/survey/ask.js';
import type { Reply } from '../../src/survey/prompt-frame.js';
import type { Question } from '../../src/survey/question.js';

/** What the person types at the question of that title; each line is used once, in this order. */
export type Line = readonly [title: string, typed: string];

export interface Scripted {
  surface: Surface;
  /** Titles in the order in which they were asked. */
  asked: string[];
  /** Everything that was said. */
  said(): string;
  /** Lines of the script that were not used. */
  left(): readonly Line[];
}

function replyTo(question: Question, typed: string): Reply {
  if (typed === '<') return { kind: 'back' };
  if (typed === 'Ctrl-C') return { kind: 'closed' };
  const read = typed === '' ? question.judged(question.defaultValue) : question.read(typed);
  if ('problem' in read) throw new Error(`${question.title}: ${typed} was refused: ${read.problem}`);
  return { kind: 'answer', value: read.value };
}

export function scripted(lines: readonly Line[], columns = 80): Scripted {
  const rest = [...lines];
  const asked: string[] = [];
  let said = '';
  return {
    asked,
    said: () => said,
    left: () => rest,
    surface: {
      columns,
      style: (_format, text) => text,
      say: (text) => {
        said += text;
      },
      ask: async (question) => {
        if (asked.length > 300) throw new Error(`no end in sight: ${asked.slice(-5).join(', ')}`);
        asked.push(question.title);
        const [next] = rest;
        if (next?.[0] !== question.title) return replyTo(question, '');
        rest.shift();
        return replyTo(question, next[1]);
      },
    },
  };
}
