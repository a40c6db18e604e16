/** Questions made from the schema: numbers with units, choices, yes or no, and plain text. */
import type { SchemaNode as AnyNode } from '../sheet/schema.js';
import { allowedBy } from '../sheet/schema-words.js';
import { type Unit, isUnit, parseQuantity } from '../sheet/units.js';
import { describeValue, quote } from '../sheet/words.js';
import type { Facts } from './facts.js';
import { type Json, sameJson } from './json-tree.js';
import { type Choice, plainly, type Question, type Read } from './question.js';
import { meanings, nodeAt, type SchemaNode } from './schema-node.js';

/** What is common to every question made from one field of the sheet. */
export function common(node: SchemaNode): Pick<Question, 'title' | 'why' | 'help' | 'allowed'> {
  const help = [node.description, node.fix].filter((text) => text !== undefined);
  return { title: node.title, why: node.why ?? '', help, allowed: '' };
}

/** The unit of a field; "1" for a bare number. */
export function unitOf(node: SchemaNode): Unit {
  return isUnit(node.unit) ? node.unit : '1';
}

/** Limits of a number with their unit: "3 to 30 mm". */
export function limits(node: SchemaNode): string {
  return allowedBy({ ...(node as AnyNode), type: 'number' });
}

/** Accepts a number within its limits. */
export function judgedNumber(node: SchemaNode, value: Json): Read {
  if (typeof value !== 'number') return { problem: `${describeValue(value)} is not a number.` };
  const { minimum = -Infinity, maximum = Infinity, fix } = node;
  const found = describeValue(value, node.unit);
  if (node.type === 'integer' && !Number.isInteger(value)) {
    return { problem: `${found} is not a whole number; allowed: ${limits(node)}.` };
  }
  if (value >= minimum && value <= maximum) return { value };
  return { problem: [`${found} is outside ${limits(node)}.`, fix].filter(Boolean).join(' ') };
}

export function readNumber(node: SchemaNode, text: string): Read {
  const quantity = parseQuantity(text, unitOf(node));
  return quantity.ok ? judgedNumber(node, quantity.value) : { problem: quantity.message };
}

function numberQuestion(pointer: string, facts: Facts): Question {
  const node = nodeAt(pointer);
  const base = common(node);
  const show = (value: Json): string => describeValue(value, node.unit);
  const usual = node.default === undefined ? '' : ` Default: ${show(node.default)}.`;
  return {
    ...base,
    allowed: limits(node),
    help: [...base.help, `Allowed: ${limits(node)}.${usual}`],
    defaultValue: facts.get(pointer) ?? null,
    show,
    read: (text) => readNumber(node, text),
    judged: (value) => judgedNumber(node, value),
  };
}

/** A question with a few answers to choose from; `read` takes a choice's label or value. */
export function choiceQuestion(
  base: Pick<Question, 'title' | 'why' | 'help' | 'allowed'>,
  choices: readonly Choice[],
  defaultValue: Json,
): Question {
  const labels = choices.map(({ label }) => label).join(', ');
  const refusal = (found: string): Read => ({ problem: `${found} is none of: ${labels}.` });
  return {
    ...base,
    choices,
    defaultValue,
    show: (value) => choices.find((choice) => sameJson(choice.value, value))?.label ?? describeValue(value),
    read: (text) => {
      const wanted = text.trim().toLowerCase();
      const found = choices.find(({ value, label }) => label === wanted || value === wanted);
      return found ? { value: found.value } : refusal(quote(text));
    },
    judged: (value) => {
      return choices.some((choice) => sameJson(choice.value, value))
        ? { value }
        : refusal(describeValue(value));
    },
  };
}

function enumQuestion(pointer: string, facts: Facts): Question {
  const node = nodeAt(pointer);
  const means = meanings(node);
  const choices = (node.enum ?? []).map((value): Choice => {
    const meaning = means.get(value);
    return { value, label: value, ...(meaning !== undefined && { meaning }) };
  });
  const usual = node.default === undefined ? [] : [`Default: ${plainly(node.default)}.`];
  const base = common(node);
  return choiceQuestion(
    { ...base, help: [...base.help, ...usual] },
    choices,
    facts.get(pointer) ?? choices[0]?.value ?? null,
  );
}

/** Yes or no. */
export function yesNoQuestion(
  base: Pick<Question, 'title' | 'why' | 'help' | 'allowed'>,
  defaultValue: boolean,
): Question {
  return choiceQuestion(
    base,
    [
      { value: true, label: 'yes' },
      { value: false, label: 'no' },
    ],
    defaultValue,
  );
}

function textQuestion(pointer: string, facts: Facts): Question {
  const node = nodeAt(pointer);
  const pattern = new RegExp(node.pattern ?? '');
  const judged = (value: Json): Read => {
    if (typeof value === 'string' && pattern.test(value)) return { value };
    const allowed = [`Allowed: ${allowedBy(node as AnyNode)}.`, node.fix].filter(Boolean).join(' ');
    return { problem: `${describeValue(value)} does not fit. ${allowed}` };
  };
  return {
    ...common(node),
    defaultValue: facts.get(pointer) ?? '',
    show: plainly,
    read: (text) => judged(text.trim()),
    judged,
  };
}

/** The question for a field of the sheet, whatever its type. */
export function fieldQuestion(pointer: string, facts: Facts): Question {
  const node = nodeAt(pointer);
  if (node.enum) return enumQuestion(pointer, facts);
  if (node.type === 'boolean') return yesNoQuestion(common(node), facts.get(pointer) === true);
  return node.type === 'string' ? textQuestion(pointer, facts) : numberQuestion(pointer, facts);
}
