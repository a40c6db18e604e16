/**
 * Answers without a terminal: from a file, or none at all. The file holds a whole sheet, a part of one, or JSON pointers
 * with their values; where the sheet has a number, text with a unit will do ("6.5 cm").
 */
import { checkSheet } from '../sheet/check.js';
import { unknownKeyProblem } from '../sheet/nearest-key.js';
import type { Problem } from '../sheet/problem.js';
import { SCHEMAS, schemaAt } from '../sheet/schema.js';
import { isUnit, parseQuantity } from '../sheet/units.js';
import { describeValue } from '../sheet/words.js';
import { assemble } from './assemble.js';
import { Facts, IS_READING } from './facts.js';
import { isObject, type Json, type JsonObject, leavesOf, sameJson, valueAt, withValue } from './json-tree.js';
import { readKinds } from './kinds-question.js';
import { readClasses, readValues, spread } from './lists.js';
import { ABOUT_PINS, IS_PIN, planProblem } from './pins.js';
import type { Read } from './question.js';
import { entriesFor } from './questions.js';
import { keyOrder } from './schema-node.js';

export type FromAnswers = { sheet: JsonObject } | { problems: Problem[] };

type Given = [pointer: string, value: Json];

/** The sheet that answers make, on top of the sheet at hand; or everything that is wrong with them. Pure. */
export function sheetFromAnswers(data: unknown, base: JsonObject): FromAnswers {
  if (!isObject(data)) {
    const message = `Answers are an object of values, not ${describeValue(data)}.`;
    const fix = 'Write { "/line/widthMm": 25 }, or a part of a sheet.';
    return { problems: [{ pointer: '', message, fix }] };
  }
  const unreadable: Problem[] = [];
  const given = Object.entries(data)
    .flatMap(([key, value]) => leavesOf(value, key.startsWith('/') ? key : `/${key}`))
    .map(([pointer, value]): Given => {
      const read = readText(pointer, value);
      if ('value' in read) return [pointer, read.value];
      unreadable.push({ pointer, message: read.problem, got: describeValue(value) });
      return [pointer, value];
    });
  const facts = factsFrom(given, base);
  const sheet = assemble(facts);
  const problems = firstOfEach([
    ...unreadable,
    ...given.flatMap(([pointer]) => unknownKey(pointer)),
    ...planAndCheck(facts, sheet),
    ...refused(facts),
    ...withoutEffect(given, facts, sheet),
  ]);
  return problems.length > 0 ? { problems } : { sheet };
}

/** The first key on the way to a value that a sheet cannot have. */
function unknownKey(pointer: string): Problem[] {
  const keys = pointer.split('/').slice(1);
  const pointers = keys.map((_, index) => `/${keys.slice(0, index + 1).join('/')}`);
  const wrong = pointers.findIndex((each) => schemaAt(SCHEMAS.sheet, each) === undefined);
  if (wrong < 0) return [];
  const parent = pointers[wrong - 1] ?? '';
  return [unknownKeyProblem(SCHEMAS.sheet, parent, keys[wrong] ?? '', keyOrder(parent))];
}

/** A value as the sheet takes it: text is read where the sheet wants numbers. */
function readText(pointer: string, value: Json): Read {
  if (typeof value !== 'string') return { value };
  const node = schemaAt(SCHEMAS.sheet, pointer);
  if (pointer === '/speeds/classes') return readClasses(pointer, value);
  if (pointer === '/sensors/kinds') return readKinds(value);
  if (node?.items?.type === 'number' || node?.items?.type === 'integer') {
    const read = readValues(pointer, value);
    return 'problem' in read ? read : { value: read.values };
  }
  if (node?.type !== 'number' && node?.type !== 'integer') return { value };
  const quantity = parseQuantity(value, isUnit(node.unit) ? node.unit : '1');
  return quantity.ok ? { value: quantity.value } : { problem: quantity.message };
}

/** What is asked becomes an answer; what is not, a detail of the sheet. */
function factsFrom(given: readonly Given[], base: JsonObject): Facts {
  const single = given.flatMap(([pointer, value]): Given[] => {
    if (pointer !== '/sensors/pins' || !Array.isArray(value)) return [[pointer, value]];
    return value.map((label, index): Given => [`${pointer}/${index}`, label]);
  });
  const has = (pointer: string): boolean => given.some(([each]) => each === pointer);
  const all = new Facts(base, {
    ...Object.fromEntries(single),
    ...(has('/sensors/pitchMm') && { '#row': 'even' }),
    ...(has('/sensors/positionsMm') && { '#row': 'uneven' }),
    ...(given.some(([pointer]) => pointer.startsWith('/encoders/')) && { '#encoders': true }),
    ...(has('/drive/driver/standbyPin') && { '#standby': true }),
    ...(has('/stopPin') && { '#stopInput': true }),
    ...(single.some(([pointer]) => IS_PIN.test(pointer)) && { '#pins': 'by-hand' }),
  });
  const asked = new Set(entriesFor(all).map(({ id }) => id));
  const details = single.filter(([pointer]) => !asked.has(pointer) && !IS_PIN.test(pointer));
  const detailed = details.reduce((tree, [pointer, value]) => withValue(tree, pointer, value), base);
  return new Facts(detailed, all.answers);
}

function planAndCheck(facts: Facts, sheet: JsonObject): Problem[] {
  const { problems } = checkSheet(sheet);
  const noPlan = planProblem(facts);
  // Without a plan there are no pins to complain of.
  return noPlan ? [noPlan, ...problems.filter(({ pointer }) => !ABOUT_PINS.test(pointer))] : problems;
}

/** Answers that their question would not take. */
function refused(facts: Facts): Problem[] {
  return entriesFor(facts).flatMap(({ id, make }): Problem[] => {
    const answer = facts.answers[id];
    if (answer === undefined || !id.startsWith('/')) return [];
    const { allowed, judged } = make(facts);
    const read = judged(answer);
    if ('value' in read) return [];
    return [{ pointer: id, message: read.problem, got: describeValue(answer), ...(allowed && { allowed }) }];
  });
}

/** Values that the sheet does not hold in the end, as other answers rule them out. */
function withoutEffect(given: readonly Given[], facts: Facts, sheet: JsonObject): Problem[] {
  return given.flatMap(([pointer, value]): Problem[] => {
    const wanted = IS_READING.test(pointer) ? spread(value, facts.analogCount) : value;
    if (sameJson(valueAt(sheet, pointer), wanted)) return [];
    const message = `${describeValue(value)} has no effect here: the other answers leave no room for it.`;
    return [
      { pointer, message, got: describeValue(value), fix: 'Leave it out, or change what it contradicts.' },
    ];
  });
}

/** One problem for a value will do: the first. */
function firstOfEach(problems: readonly Problem[]): Problem[] {
  return problems.filter(
    ({ pointer }, index) => problems.findIndex((problem) => problem.pointer === pointer) === index,
  );
}
