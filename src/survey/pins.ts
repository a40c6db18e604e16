/** The pins in the questionnaire: which are needed, what is proposed, and which labels the sheet gets. */
import type { BoardId } from '../vehicle/board-facts.js';
import { proposePins, type PinPlan, type PinRequest } from '../vehicle/pin-plan.js';
import type { PinRole } from '../vehicle/pin-roles.js';
import { DRIVERS, type DriverSchemeId } from '../vehicle/drivers.js';
import type { Problem } from '../sheet/problem.js';
import { encoderChannels, hasEncoders } from './encoders.js';
import type { Facts } from './facts.js';
import { type Json, valueAt } from './json-tree.js';
import { nodeAt } from './schema-node.js';
import { hasStopInput } from './stop-input.js';

/** One pin that the vehicle needs. */
export interface PinNeed {
  pointer: string;
  /** For the heading of a question and for messages. */
  title: string;
  role: PinRole;
}

/** Pointers of the pins. */
export const IS_PIN =
  /^\/(sensors\/pins|drive\/driver\/(left|right)\/(pwm|dir|in1|in2)|drive\/driver\/standbyPin|encoders\/(left|right)\/(a|b)|start\/buttonPin|stopPin)(\/|$)/;

/** Pointers of the pins and of what holds nothing else to ask for. */
export const ABOUT_PINS =
  /^\/(sensors\/pins|drive\/driver\/(left|right|standbyPin)|encoders\/(left|right)|start\/buttonPin|stopPin)(\/|$)/;

/** How the pins come about: as proposed, as the sheet at hand has them, or one by one. */
export type PinMode = 'proposed' | 'kept' | 'by-hand';

export function schemeOf(facts: Facts): DriverSchemeId {
  const id = facts.text('/drive/driver/scheme');
  return Object.hasOwn(DRIVERS, id) ? (id as DriverSchemeId) : 'pwm-in-in';
}

/** Whether the driver has a standby pin to be wired. */
export function hasStandby(facts: Facts): boolean {
  if (!DRIVERS[schemeOf(facts)].standby) return false;
  const answer = facts.answers['#standby'];
  return typeof answer === 'boolean' ? answer : valueAt(facts.base, '/drive/driver/standbyPin') !== undefined;
}

/** Every pin that the vehicle needs, in the order in which people wire them. */
export function pinNeeds(facts: Facts): PinNeed[] {
  const { kinds } = facts;
  const sensors = Array.from({ length: facts.count }, (_, index): PinNeed => {
    const title = `Sensor ${index + 1} of ${facts.count}, ${nodeAt('/sensors/pins/0').title.toLowerCase()}`;
    return {
      pointer: `/sensors/pins/${index}`,
      title,
      role: kinds[index] === 'analog' ? 'analog sensor' : 'digital sensor',
    };
  });
  const motors = ['left', 'right'].flatMap((side) =>
    DRIVERS[schemeOf(facts)].motorPins.map(({ key, pwm }): PinNeed => {
      const motor = `/drive/driver/${side}`;
      const pointer = `${motor}/${key}`;
      const title = `${nodeAt(motor).title}, ${nodeAt(pointer).title}`;
      return { pointer, title, role: pwm ? 'PWM output' : 'output' };
    }),
  );
  const encoders = ['left', 'right'].flatMap((side) =>
    encoderChannels(facts).map((key): PinNeed => {
      const pointer = `/encoders/${side}/${key}`;
      const title = `${nodeAt(`/encoders/${side}`).title}, ${nodeAt(pointer).title}`;
      return { pointer, title, role: 'encoder' };
    }),
  );
  const single = (pointer: string, role: PinRole): PinNeed => ({
    pointer,
    title: nodeAt(pointer).title,
    role,
  });
  return [
    ...sensors,
    ...motors,
    ...(hasStandby(facts) ? [single('/drive/driver/standbyPin', 'output')] : []),
    ...encoders,
    single('/start/buttonPin', 'button'),
    ...(hasStopInput(facts) ? [single('/stopPin', 'stop input')] : []),
  ];
}

/** Plans made so far: every step of the questionnaire asks for the same one several times. */
const plans = new Map<string, PinPlan | Problem>();

/** The plan of pins, or why there is none; with some answers changed, or for another board. */
export function planWith(
  facts: Facts,
  changes: Partial<PinRequest> = {},
  board: BoardId = facts.board.id,
): PinPlan | Problem {
  const request: PinRequest = {
    sensorKind: facts.sensorKind,
    ...(facts.sensorKind === 'mixed' && { sensorKinds: facts.kinds }),
    sensorCount: facts.count,
    scheme: schemeOf(facts),
    standby: hasStandby(facts),
    encoderChannels: encoderChannels(facts).length,
    stopInput: hasStopInput(facts),
    ...changes,
  };
  const key = JSON.stringify([board, request]);
  const plan = plans.get(key) ?? proposePins(board, request);
  plans.set(key, plan);
  return plan;
}

/** Why the board has no pins for these answers, or undefined if it has. */
export function planProblem(facts: Facts): Problem | undefined {
  const plan = planWith(facts);
  return 'message' in plan ? plan : undefined;
}

/** Whether the pins of the sheet at hand are still meant: nothing that decides them has changed. */
export function keptPinsFit(facts: Facts): boolean {
  const { base } = facts;
  const deciding = ['/target/board', '/sensors/kind', '/sensors/count', '/drive/driver/scheme'];
  const sameKinds =
    JSON.stringify(valueAt(base, '/sensors/kinds')) === JSON.stringify(facts.get('/sensors/kinds'));
  if (facts.sensorKind === 'mixed' && !sameKinds) return false;
  if (hasEncoders(facts)) deciding.push('/encoders/channels');
  return (
    deciding.every((pointer) => valueAt(base, pointer) === facts.get(pointer)) &&
    pinNeeds(facts).every(({ pointer }) => valueAt(base, pointer) !== undefined)
  );
}

export function pinMode(facts: Facts): PinMode {
  const answer = facts.answers['#pins'];
  if (answer === 'proposed' || answer === 'by-hand') return answer;
  return keptPinsFit(facts) ? 'kept' : 'proposed';
}

/** Labels by pointer as the planner proposes them; empty where the board has too few pins. */
export function proposedPins(facts: Facts): Map<string, Json> {
  const plan = planWith(facts);
  const labels = new Map<string, Json>();
  if ('message' in plan) return labels;
  const tree = {
    sensors: { pins: plan.sensorPins },
    drive: { driver: { ...plan.driver } },
    ...(plan.encoders && { encoders: { ...plan.encoders } }),
    start: { buttonPin: plan.buttonPin },
    ...(plan.stopPin !== undefined && { stopPin: plan.stopPin }),
  };
  for (const { pointer } of pinNeeds(facts)) {
    const label = valueAt(tree, pointer);
    if (label !== undefined) labels.set(pointer, label);
  }
  return labels;
}

/** The label of every pin that has one so far, by pointer. */
export function currentPins(facts: Facts): Map<string, Json> {
  const mode = pinMode(facts);
  if (mode === 'proposed') return proposedPins(facts);
  const start = keptPinsFit(facts)
    ? new Map(pinNeeds(facts).map(({ pointer }) => [pointer, valueAt(facts.base, pointer) ?? null]))
    : proposedPins(facts);
  if (mode === 'kept') return start;
  for (const { pointer } of pinNeeds(facts)) {
    const answer = facts.answers[pointer];
    if (answer !== undefined) start.set(pointer, answer);
  }
  return start;
}

/** The pins as values for the sheet, the sensors' as one list. */
export function pinValues(facts: Facts): [pointer: string, value: Json][] {
  const pins = [...currentPins(facts)];
  const isSensor = ([pointer]: [string, Json]): boolean => pointer.startsWith('/sensors/pins/');
  const sensors = pins.filter(isSensor).map(([, label]) => label);
  const others = pins.filter((pin) => !isSensor(pin));
  return sensors.length === 0 ? others : [['/sensors/pins', sensors], ...others];
}

/** Other answers with which the board, or another one, has pins for everything. */
export function waysOut(facts: Facts): { answers: Record<string, Json>; label: string }[] {
  const works = (changes: Partial<PinRequest>, board?: BoardId): boolean =>
    !('message' in planWith(facts, changes, board));
  const { enum: boards = [] } = nodeAt('/target/board');
  const fewer = Array.from({ length: facts.count - 2 }, (_, index) => facts.count - 1 - index);
  const most = fewer.find((sensorCount) => works({ sensorCount }));
  return [
    ...(facts.sensorKind !== 'digital' && works({ sensorKind: 'digital' })
      ? [{ answers: { '/sensors/kind': 'digital' }, label: 'digital sensors' }]
      : []),
    ...boards
      .filter((board) => works({}, board as BoardId))
      .map((board) => ({ answers: { '/target/board': board }, label: `board ${board}` })),
    ...(most === undefined ? [] : [{ answers: { '/sensors/count': most }, label: `${most} sensors` }]),
  ];
}

/** Whether a value can stand where a pin label does. */
export function isLabel(value: Json): value is string | number {
  return typeof value === 'string' || typeof value === 'number';
}
