/**
 * Asks for a value in words: Enter takes the default, `?` explains, `<` or `back` goes back, Tab puts the default
 * into the line to be edited.
 */
import { createPrompt, isEnterKey, isTabKey, useKeypress, useState } from '@inquirer/core';
import type { Json } from './json-tree.js';
import {
  answeredLine,
  errorText,
  hintText,
  type PromptConfig,
  questionLines,
  type Reply,
  useClosed,
} from './prompt-frame.js';

/** Words that mean a wish, not a value. */
const BACK = new Set(['<', 'back']);
const EXPLAIN = '?';

export const textPrompt = createPrompt<Reply, PromptConfig>((config, done) => {
  const { question, canGoBack } = config;
  const shownDefault = question.show(question.defaultValue);
  const [line, setLine] = useState('');
  const [problem, setProblem] = useState('');
  const [explained, setExplained] = useState(false);
  const [shown, setShown] = useState('');
  useClosed(done);

  const accept = (value: Json): void => {
    setShown(question.show(value));
    done({ kind: 'answer', value });
  };

  useKeypress((key, readline) => {
    if (isTabKey(key)) {
      const typed = readline.line.trim();
      readline.clearLine(0);
      readline.write(typed === '' ? shownDefault : typed);
      setLine(readline.line);
    } else if (!isEnterKey(key)) {
      setLine(readline.line);
      setProblem('');
    } else {
      const typed = line.trim();
      readline.clearLine(0);
      setLine('');
      if (typed === EXPLAIN) setExplained(true);
      else if (BACK.has(typed.toLowerCase())) {
        if (canGoBack) {
          setShown('(back)');
          done({ kind: 'back' });
        } else setProblem('This is the first question.');
      } else {
        const read = typed === '' ? question.judged(question.defaultValue) : question.read(typed);
        if ('value' in read) accept(read.value);
        else {
          // Left in the line, so that it can be put right instead of typed again.
          readline.write(typed);
          setLine(typed);
          setProblem(read.problem);
        }
      }
    }
  });

  if (shown !== '') return answeredLine(config, shown);
  const hint = hintText(config, [`Enter: ${shownDefault}`, '?: more']);
  return [
    [...questionLines(config, explained), `> ${line}`].join('\n'),
    problem === '' ? hint : `${errorText(config, problem)}\n${hint}`,
  ];
});
