/** Renders one question as the terminal would show it. */
import { render } from '@inquirer/testing';
import { choicePrompt } from '../../src/survey/choice-prompt.js';
import { Facts } from '../../src/survey/facts.js';
import type { PromptConfig } from '../../src/survey/prompt-frame.js';
import type { Question } from '../../src/survey/question.js';
import { entriesFor } from '../../src/survey/questions.js';
import { textPrompt } from '../../src/survey/text-prompt.js';

/** The question of that id with nothing answered yet. */
export function questionOf(id: string, facts = new Facts({}, {})): Question {
  const entry = entriesFor(facts).find((each) => each.id === id);
  if (entry === undefined) throw new Error(`there is no question ${id}`);
  return entry.make(facts);
}

/** What the keys of a terminal send. */
export const KEY = {
  enter: '\r',
  tab: '\t',
  down: '\u001b[B',
  up: '\u001b[A',
  ctrlC: '\u0003',
  ctrlU: '\u0015',
};

/** Shows a question plainly, as after the first one; `press` sends keys as the terminal would. */
export async function show(question: Question, config: Partial<PromptConfig> = {}) {
  const full: PromptConfig = {
    question,
    canGoBack: true,
    columns: 80,
    style: (_format, text) => text,
    ...config,
  };
  const { answer, input, getScreen } = await render(question.choices ? choicePrompt : textPrompt, full);
  return {
    answer,
    getScreen,
    press: (...keys: string[]) => {
      for (const key of keys) input.write(key);
    },
    end: () => {
      input.end();
    },
  };
}
