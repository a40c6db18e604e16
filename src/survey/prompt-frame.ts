/** What the two prompts have in common: their look, the reply they give, and the end of the input. */
import { useEffect } from '@inquirer/core';
import type { Json } from './json-tree.js';
import type { Question } from './question.js';
import { wrap } from './wrap.js';

/** How a person left a prompt; `closed` is the end of the input, as with Ctrl-D. */
export type Reply = { kind: 'answer'; value: Json } | { kind: 'back' } | { kind: 'closed' };

/** What a prompt needs beside its question. */
export interface PromptConfig {
  question: Question;
  /** Whether there is a question to go back to. */
  canGoBack: boolean;
  columns: number;
  readonly style: (format: 'bold' | 'dim' | 'red' | 'cyan', text: string) => string;
}

/** Title, limits and reason; with `explained`, description and what else there is to say. */
export function questionLines(config: PromptConfig, explained: boolean): string[] {
  const { question, columns, style } = config;
  const heading = question.allowed === '' ? question.title : `${question.title}, ${question.allowed}`;
  const [first = '', ...rest] = wrap(heading, columns);
  return [
    '',
    style('bold', first),
    ...rest.map((line) => style('bold', line)),
    ...wrap(question.why, columns, 2),
    ...(question.lines ?? []).flatMap((line) => wrap(line, columns, 2, 2)),
    ...(explained ? question.help.flatMap((text) => wrap(text, columns, 2)) : []),
  ];
}

/** The line that stays once a question is answered. */
export function answeredLine(config: PromptConfig, shown: string): string {
  return wrap(`${config.question.title}: ${shown}`, config.columns, 0, 2).join('\n');
}

export function errorText(config: PromptConfig, problem: string): string {
  return wrap(`! ${problem}`, config.columns, 0, 2)
    .map((line) => config.style('red', line))
    .join('\n');
}

export function hintText(config: PromptConfig, hints: readonly string[]): string {
  const shown = config.canGoBack ? [...hints, '<: back'] : hints;
  return wrap(shown.join(', '), config.columns)
    .map((line) => config.style('dim', line))
    .join('\n');
}

/** Ends the prompt when its input ends; it would wait for ever otherwise. */
export function useClosed(done: (reply: Reply) => void): void {
  useEffect((readline) => {
    const onClose = (): void => {
      done({ kind: 'closed' });
    };
    readline.on('close', onClose);
    return () => {
      readline.removeListener('close', onClose);
    };
  }, []);
}
