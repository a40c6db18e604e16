/** Questions answered with several values in one line: readings of the sensors, their positions, speed classes. */
import { typicalReadings } from '../sheet/typical-readings.js';
import type { Unit } from '../sheet/units.js';
import { counted, describeValue, quote } from '../sheet/words.js';
import type { Facts } from './facts.js';
import { common, judgedNumber, limits, readNumber, unitOf } from './fields.js';
import { isObject, type Json } from './json-tree.js';
import { plainly, type Question, type Read } from './question.js';
import { nodeAt, type SchemaNode } from './schema-node.js';

/**
 * Takes a line apart into values: "25 15 -5", "25, 15; -5 mm", "1,5 cm 0,5 cm". Blanks and semicolons separate, and
 * commas that no digit follows; a unit at the very end holds for every value without one.
 */
export function splitValues(text: string): string[] {
  const plain = /^[^\s;]*,[^\s;]*,[^\s;]*$/.test(text.trim()) ? text.replaceAll(',', ' ') : text;
  const values: string[] = [];
  for (const part of plain.split(/[\s;]+|,(?!\d)/).filter(Boolean)) {
    const last = values.length - 1;
    if (/\d/.test(part) || last < 0) values.push(part);
    else values[last] = `${values[last] ?? ''} ${part}`;
  }
  const unit = /[^\d\s.,].*$/.exec((values.at(-1) ?? '').replace(/^[+-]/, ''))?.[0] ?? '';
  return values.map((value) => (/\d\s*$/.test(value) && unit !== '' ? `${value} ${unit}` : value));
}

/** The values in a line, by the units of the list at the pointer; one alone is no list. */
export function readValues(pointer: string, text: string): { values: Json } | { problem: string } {
  const read = readEach(nodeAt(`${pointer}/0`), text);
  if ('problem' in read) return read;
  const [first, second] = read.values;
  return { values: first !== undefined && second === undefined ? first : read.values };
}

function readEach(node: SchemaNode, text: string): { values: Json[] } | { problem: string } {
  const values: Json[] = [];
  for (const part of splitValues(text)) {
    const read = readNumber(node, part);
    if ('problem' in read) return read;
    values.push(read.value);
  }
  return { values };
}

function showValues(values: Json, unit: Unit): string {
  const list = Array.isArray(values) ? values : [values];
  return `${list.map((value) => describeValue(value)).join(' ')} ${unit}`;
}

/** The first refusal among values, else the whole. */
function judgedAll(node: SchemaNode, values: readonly Json[], whole: Json): Read {
  const refused = values.map((value) => judgedNumber(node, value)).find((read) => 'problem' in read);
  return refused ?? { value: whole };
}

function typicalReading(pointer: string, facts: Facts): number {
  const dark = facts.text('/line/polarity') === 'dark-on-light';
  const { ground, line } = typicalReadings(facts.board, dark ? 'dark-on-light' : 'light-on-dark');
  return pointer.endsWith('/line') ? line : ground;
}

/** One reading for all sensors, or one for each. */
export function readingsQuestion(pointer: string, facts: Facts): Question {
  const node = nodeAt(pointer);
  const item = { ...nodeAt(`${pointer}/0`), maximum: facts.board.adcMaxCount };
  const count = facts.analogCount;
  const forms = `one for all, or ${count} with blanks between`;
  const judged = (value: Json): Read => {
    if (!Array.isArray(value)) return judgedNumber(item, value);
    if (value.length === count) return judgedAll(item, value, value);
    return { problem: `${counted(value.length, 'reading')} for ${count} sensors; allowed: ${forms}.` };
  };
  const given = facts.given(pointer);
  const usual = given === undefined || 'problem' in judged(given) ? typicalReading(pointer, facts) : given;
  return {
    ...common(node),
    allowed: `${limits(item)}, ${forms}`,
    defaultValue: shortened(usual),
    show: (value) => showValues(shortened(value), 'counts'),
    read: (text) => {
      const read = readValues(pointer, text);
      return 'problem' in read ? read : judged(read.values);
    },
    judged,
  };
}

/** A list of equal readings as the one reading. */
function shortened(value: Json): Json {
  if (!Array.isArray(value) || value.length === 0) return value;
  return value.every((each) => each === value[0]) ? (value[0] ?? null) : value;
}

/** The readings as the sheet holds them: one for each analog sensor. */
export function spread(value: Json, count: number): Json {
  return typeof value === 'number' ? new Array<Json>(count).fill(value) : value;
}

export function positionsQuestion(pointer: string, facts: Facts): Question {
  const node = nodeAt(pointer);
  const item = nodeAt(`${pointer}/0`);
  const { count, positionsMm } = facts;
  const judged = (value: Json): Read => {
    const list = Array.isArray(value) ? value : [value];
    if (list.length === count) return judgedAll(item, list, list);
    return {
      problem: `${counted(list.length, 'position')} for ${count} sensors; allowed: ${count}, leftmost first.`,
    };
  };
  return {
    ...common(node),
    why: node.description,
    help: [`For example: ${showValues(positionsMm, 'mm')}.`],
    allowed: `${count} of ${limits(item)}`,
    defaultValue: positionsMm,
    show: (value) => showValues(value, unitOf(item)),
    read: (text) => {
      const read = readValues(pointer, text);
      return 'problem' in read ? read : judged(read.values);
    },
    judged,
  };
}

const CLASS_FORM =
  'name, smallest radius or sharpest bend, speed; for example: wide 400 mm 0.9 m/s; tight 90 deg in 190 mm 0.5 m/s';
const CLASS = /^(.+?)\s+(?:([\d.,]+\s*(?:deg|°)?)\s+in\s+)?([\d.,]+\s*[a-z"]*)\s+([\d.,]+\s*[a-z/]*)$/i;

function readClass(pointer: string, text: string): Read {
  const [, name = '', turn, length = '', speed = ''] = CLASS.exec(text.trim()) ?? [];
  if (!new RegExp(nodeAt(`${pointer}/0/name`).pattern ?? '').test(name)) {
    return { problem: `${quote(text.trim())} is no speed class. Write ${CLASS_FORM}.` };
  }
  const bends = turn === undefined ? readRadius(pointer, length) : readSharpness(pointer, turn, length);
  if ('problem' in bends) return bends;
  const speedMps = readNumber(nodeAt(`${pointer}/0/speedMps`), speed);
  if ('problem' in speedMps) return speedMps;
  return { value: { name, ...bends.value, speedMps: speedMps.value } };
}

type Bends = { value: Record<string, Json> } | { problem: string };

function readRadius(pointer: string, text: string): Bends {
  const read = readNumber(nodeAt(`${pointer}/0/minRadiusMm`), text);
  return 'problem' in read ? read : { value: { minRadiusMm: read.value } };
}

function readSharpness(pointer: string, turn: string, length: string): Bends {
  const turnDeg = readNumber(nodeAt(`${pointer}/0/sharpness/turnDeg`), turn);
  if ('problem' in turnDeg) return turnDeg;
  const withinMm = readNumber(nodeAt(`${pointer}/0/sharpness/withinMm`), length);
  if ('problem' in withinMm) return withinMm;
  return { value: { sharpness: { turnDeg: turnDeg.value, withinMm: withinMm.value } } };
}

/** "auto", or classes with semicolons between. */
export function readClasses(pointer: string, text: string): Read {
  if (text.trim().toLowerCase() === 'auto') return { value: 'auto' };
  const classes = text.split(';').filter((part) => part.trim() !== '');
  const reads = classes.map((part) => readClass(pointer, part));
  const refused = reads.find((read) => 'problem' in read);
  return refused ?? { value: reads.flatMap((read) => ('value' in read ? [read.value] : [])) };
}

/** "auto", or speed classes by hand. */
export function classesQuestion(pointer: string, facts: Facts): Question {
  const node = nodeAt(pointer);
  const show = (value: Json): string => {
    if (!Array.isArray(value)) return plainly(value);
    return value.map((each) => (isObject(each) ? showClass(each) : describeValue(each))).join('; ');
  };
  return {
    ...common(node),
    help: [node.description, `A list is: ${CLASS_FORM}.`],
    allowed: 'auto or a list',
    defaultValue: facts.get(pointer) ?? 'auto',
    show,
    read: (text) => readClasses(pointer, text),
    judged: (value) => ({ value }),
  };
}

function showClass(each: Record<string, Json>): string {
  const { name, minRadiusMm, sharpness, speedMps } = each;
  const bends = isObject(sharpness)
    ? `${describeValue(sharpness['turnDeg'], 'deg')} in ${describeValue(sharpness['withinMm'], 'mm')}`
    : describeValue(minRadiusMm, 'mm');
  return `${plainly(name)} ${bends} ${describeValue(speedMps, 'm/s')}`;
}
