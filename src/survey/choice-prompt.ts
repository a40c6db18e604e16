/**
 * Asks for one of a few choices, each shown with what it means: arrows or its number move, Enter takes it, `?`
 * explains; the last choice goes back.
 */
import { createPrompt, isDownKey, isEnterKey, isUpKey, useKeypress, useState } from '@inquirer/core';
import type { Choice } from './question.js';
import {
  answeredLine,
  hintText,
  type PromptConfig,
  questionLines,
  type Reply,
  useClosed,
} from './prompt-frame.js';
import { sameJson } from './json-tree.js';
import { wrap } from './wrap.js';

/** ECMA-48: the cursor would blink at a place that means nothing; the prompt's end shows it again. */
const HIDE_CURSOR = '\u001b[?25l';

const BACK = 'back';

function choiceLines(config: PromptConfig, choice: Choice, index: number, active: boolean): string[] {
  const { columns, style } = config;
  const name = choice.meaning === undefined ? choice.label : `${choice.label}: ${choice.meaning}`;
  const lines = wrap(`${active ? '>' : ' '} ${index + 1} ${name}`.trimStart(), columns, active ? 0 : 2, 4);
  return active ? lines.map((line) => style('cyan', line)) : lines;
}

export const choicePrompt = createPrompt<Reply, PromptConfig>((config, done) => {
  const { question, canGoBack } = config;
  const offered = question.choices ?? [];
  const choices: Choice[] = canGoBack
    ? [...offered, { value: BACK, label: BACK, meaning: 'the question before' }]
    : [...offered];
  const start = offered.findIndex((choice) => sameJson(choice.value, question.defaultValue));
  const [active, setActive] = useState(Math.max(start, 0));
  const [explained, setExplained] = useState(false);
  const [shown, setShown] = useState('');
  useClosed(done);

  const indexOf = (start: string): number =>
    choices.findIndex(({ label }, index) => {
      return start !== '' && (String(index + 1) === start || label.toLowerCase().startsWith(start));
    });
  const goBack = (): void => {
    setShown('(back)');
    done({ kind: 'back' });
  };

  useKeypress((key, readline) => {
    const typed = readline.line.trim().toLowerCase();
    if (isEnterKey(key) || isUpKey(key) || isDownKey(key) || typed === '') readline.clearLine(0);
    if (isEnterKey(key)) {
      const choice = choices[active];
      if (choice === undefined) return;
      if (active >= offered.length) goBack();
      else {
        setShown(choice.label);
        done({ kind: 'answer', value: choice.value });
      }
    } else if (isUpKey(key)) setActive((active - 1 + choices.length) % choices.length);
    else if (isDownKey(key)) setActive((active + 1) % choices.length);
    else if (typed.endsWith('?')) {
      readline.clearLine(0);
      setExplained(true);
    } else if (typed.endsWith('<') && canGoBack) goBack();
    else {
      // A word may be typed letter by letter; what fits no choice begins a new word.
      const word = [typed, typed.slice(-1)].find((start) => indexOf(start) >= 0) ?? '';
      if (word !== typed) {
        readline.clearLine(0);
        readline.write(word);
      }
      if (word !== '') setActive(indexOf(word));
    }
  });

  if (shown !== '') return answeredLine(config, shown);
  const lines = choices.flatMap((choice, index) => choiceLines(config, choice, index, index === active));
  const hint = hintText(config, ['arrows or number, then Enter', '?: more']);
  return `${[...questionLines(config, explained), ...lines, hint].join('\n')}${HIDE_CURSOR}`;
});
