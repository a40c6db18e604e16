/** A question of the questionnaire, as the prompts see it; made afresh from the schema and the answers so far. */
import { visible } from '../sheet/words.js';
import { describeValue } from '../sheet/words.js';
import type { Json } from './json-tree.js';

export interface Choice {
  value: Json;
  label: string;
  meaning?: string;
}

/** What became of an answer: a value in the sheet's unit, or one sentence on what is wrong and what is allowed. */
export type Read = { value: Json } | { problem: string };

export interface Question {
  title: string;
  /** Why it is asked; one or two sentences, may be empty. */
  why: string;
  /** Shown on request: description, default, how to write an answer. */
  help: readonly string[];
  /** Limits with unit, e.g. "3 to 30 mm"; "" where there are none to state in brief. */
  allowed: string;
  /** Lines to look at before answering, e.g. a plan of pins. */
  lines?: readonly string[];
  /** Present where one of a few answers is to be chosen. */
  choices?: readonly Choice[];
  defaultValue: Json;
  /** The value as a person reads it, with its unit; `read` understands it. */
  readonly show: (value: Json) => string;
  /** Turns what was typed into a value. */
  readonly read: (text: string) => Read;
  /** Accepts or refuses a value that is there already: a default, or one from a file. */
  readonly judged: (value: Json) => Read;
}

/** A value in a word: text without quotes and safe to show, anything else by kind. */
export function plainly(value: Json | undefined): string {
  return typeof value === 'string' ? visible(value) : describeValue(value);
}
