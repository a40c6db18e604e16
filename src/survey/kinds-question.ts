/** The question which sensors of a mixed bar are analog and which digital. */
import { counted, quote } from '../sheet/words.js';
import type { Facts } from './facts.js';
import { common } from './fields.js';
import type { Json } from './json-tree.js';
import { plainly, type Question, type Read } from './question.js';
import { nodeAt } from './schema-node.js';

const KINDS = ['analog', 'digital'];

/** A line such as "digital analog analog digital" or "d a a d", leftmost sensor first. */
export function readKinds(text: string): Read {
  const words = text
    .toLowerCase()
    .split(/[\s,;]+/)
    .filter(Boolean);
  const kinds = words.map((word) => KINDS.find((kind) => kind.startsWith(word)));
  const odd = kinds.indexOf(undefined);
  if (odd >= 0) return { problem: `${quote(words[odd] ?? '')} is no kind; allowed: analog or digital.` };
  return { value: kinds as string[] };
}

export function kindsQuestion(facts: Facts): Question {
  const { count, kinds } = facts;
  const judged = (value: Json): Read => {
    const list = (Array.isArray(value) ? value : [value]).map(plainly);
    if (list.length !== count)
      return {
        problem: `${counted(list.length, 'kind')} for ${count} sensors; allowed: ${count}, leftmost first.`,
      };
    const strange = list.find((each) => !KINDS.includes(each));
    if (strange !== undefined)
      return { problem: `${quote(strange)} is no kind; allowed: analog or digital.` };
    if (new Set(list).size < 2)
      return { problem: `Every sensor is ${list[0]}; allowed: some of each, or a bar of one kind.` };
    return { value: list };
  };
  return {
    ...common(nodeAt('/sensors/kinds')),
    help: [`For example: ${kinds.join(' ')}. The first letter is enough.`],
    allowed: `${count} of analog or digital`,
    defaultValue: kinds,
    show: (value) => (Array.isArray(value) ? value : [value]).map(plainly).join(' '),
    read: (text) => {
      const read = readKinds(text);
      return 'problem' in read ? read : judged(read.value);
    },
    judged,
  };
}
