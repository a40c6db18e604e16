/** Questions about pins: the plan as a whole, single pins, and what to do when the board has too few. */
import { quote } from '../sheet/words.js';
import type { PinFacts } from '../vehicle/board-facts.js';
import { findPin, listPins, sheetLabel } from '../vehicle/boards.js';
import { isAble } from '../vehicle/pin-roles.js';
import type { Facts } from './facts.js';
import { choiceQuestion } from './fields.js';
import type { Json } from './json-tree.js';
import {
  currentPins,
  isLabel,
  keptPinsFit,
  pinMode,
  type PinNeed,
  pinNeeds,
  planProblem,
  proposedPins,
  waysOut,
} from './pins.js';
import { type Choice, plainly, type Question, type Read } from './question.js';
import { nodeAt } from './schema-node.js';

/** The plan in a few lines. */
function planLines(pins: ReadonlyMap<string, Json>): string[] {
  const label = (pointer: string): string => plainly(pins.get(pointer));
  const under = (start: string): string[] => [...pins.keys()].filter((pointer) => pointer.startsWith(start));
  const motor = (side: string): string => {
    const start = `/drive/driver/${side}`;
    const inputs = under(`${start}/`).map((pointer) => `${nodeAt(pointer).title} ${label(pointer)}`);
    return `${nodeAt(start).title}: ${inputs.join(', ')}`;
  };
  const encoder = (side: string): string[] => {
    const channels = under(`/encoders/${side}/`).map(label);
    return channels.length === 0 ? [] : [`${nodeAt(`/encoders/${side}`).title}: ${channels.join(', ')}`];
  };
  const single = (pointer: string): string[] =>
    pins.has(pointer) ? [`${nodeAt(pointer).title}: ${label(pointer)}`] : [];
  return [
    `${nodeAt('/sensors/pins').title}, left to right: ${under('/sensors/pins/').map(label).join(' ')}`,
    motor('left'),
    motor('right'),
    ...single('/drive/driver/standbyPin'),
    ...['left', 'right'].flatMap((side) => encoder(side)),
    ...single('/start/buttonPin'),
    ...single('/stopPin'),
  ];
}

/** Accept the plan, or go through it pin by pin. */
export function planQuestion(facts: Facts): Question {
  const kept = keptPinsFit(facts);
  const mode = pinMode(facts);
  // Once answered so, the single pins follow.
  const answered = mode === 'by-hand';
  const choices: Choice[] = [
    ...(kept ? [{ value: 'kept', label: 'keep', meaning: 'the pins of the sheet' }] : []),
    ...(kept ? [] : [{ value: 'proposed', label: 'accept', meaning: 'these pins' }]),
    { value: 'by-hand', label: 'by hand', meaning: 'pin by pin, beginning with these' },
    ...(kept ? [{ value: 'proposed', label: 'propose', meaning: 'pins anew' }] : []),
  ];
  const node = nodeAt('/sensors/pins');
  return {
    ...choiceQuestion(
      {
        title: kept ? 'Pins in the sheet' : `Pins proposed for ${facts.board.title}`,
        why: node.why ?? '',
        help: [],
        allowed: '',
      },
      choices,
      mode,
    ),
    ...(answered ? {} : { lines: planLines(currentPins(facts)) }),
  };
}

/** One pin. Those asked for before it are taken. */
export function pinQuestion(need: PinNeed, facts: Facts): Question {
  const { board } = facts;
  const takenBy = new Map<PinFacts, string>();
  for (const { pointer, title } of pinNeeds(facts)) {
    if (pointer === need.pointer) break;
    const label = currentPins(facts).get(pointer);
    const pin = label !== undefined && isLabel(label) ? findPin(board, label) : undefined;
    if (pin) takenBy.set(pin, title);
  }
  const able = board.pins.filter((pin) => pin.reserved === undefined && isAble(pin, need.role));
  const free = able.filter((pin) => !takenBy.has(pin));
  const read = (label: string | number): Read => {
    const pin = findPin(board, label);
    const choice = `Free pins that can do it: ${listPins(free)}.`;
    if (pin === undefined) return { problem: `${board.title} has no pin ${quote(String(label))}. ${choice}` };
    const other = takenBy.get(pin);
    if (other !== undefined) return { problem: `Pin ${pin.label} is taken: ${other}. ${choice}` };
    if (able.includes(pin)) return { value: sheetLabel(pin) };
    const reason = pin.reserved ?? `it cannot serve as ${need.role}`;
    return { problem: `Pin ${pin.label} is not possible: ${reason}. ${choice}` };
  };
  const judged = (value: Json): Read => (isLabel(value) ? read(value) : { problem: 'This is no pin.' });
  const wish = [
    facts.answers[need.pointer],
    currentPins(facts).get(need.pointer),
    proposedPins(facts).get(need.pointer),
  ];
  const start = wish.find((label) => label !== undefined && 'value' in judged(label));
  const [first] = free;
  const node = nodeAt(need.pointer);
  const isSensor = need.pointer.startsWith('/sensors/');
  return {
    title: need.title,
    why: isSensor ? nodeAt('/sensors/pins').description : node.description,
    help: free.flatMap(({ label, caution }) => (caution === undefined ? [] : [`${label}: ${caution}.`])),
    allowed: listPins(free),
    defaultValue: start ?? (first ? sheetLabel(first) : null),
    show: plainly,
    read: (text) => read(text.trim()),
    judged,
  };
}

/** The board has too few pins of some kind: what to change? */
export function fitQuestion(facts: Facts): Question {
  const problem = planProblem(facts);
  const choices = waysOut(facts).map(({ answers, label }): Choice => ({
    value: answers,
    label: `take ${label}`,
  }));
  return choiceQuestion(
    {
      title: 'Too few pins',
      why: problem?.message ?? '',
      help: problem?.fix === undefined ? [] : [problem.fix],
      allowed: '',
    },
    choices,
    choices[0]?.value ?? null,
  );
}
