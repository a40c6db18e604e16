/** Proposes a wiring: which pin for which sensor, motor input and contact; or says why the board cannot have one. */
import { type SensorKind, usualKinds } from '../sheet/sensor-kinds.js';
import type { Problem } from '../sheet/problem.js';
import { counted, joinOr, withUnit } from '../sheet/words.js';
import type { BoardFacts, BoardId, PinFacts } from './board-facts.js';
import { BOARDS, listPins, sheetLabel } from './boards.js';
import { DRIVERS, type DriverSchemeId, type MotorPinKey } from './drivers.js';
import { bestAssignment, type Assignment, type Need } from './pin-match.js';
import { isAble } from './pin-roles.js';

export interface PinRequest {
  sensorKind: 'analog' | 'digital' | 'mixed';
  /** Kind of each sensor of a mixed bar, leftmost first. */
  sensorKinds?: readonly SensorKind[];
  /** 1 to 16. */
  sensorCount: number;
  scheme: DriverSchemeId;
  /** Whether to plan a standby pin; only for schemes that have one. */
  standby?: boolean;
  /** Channels of each wheel's encoder: 0 (none), 1 or 2. */
  encoderChannels?: number;
  /** Whether to plan a stop input. */
  stopInput?: boolean;
}

type Label = number | string;

/** Pin labels as the sheet takes them. */
export interface PinPlan {
  /** Leftmost sensor first. */
  sensorPins: Label[];
  driver: {
    left: Partial<Record<MotorPinKey, Label>>;
    right: Partial<Record<MotorPinKey, Label>>;
    standbyPin?: Label;
  };
  encoders?: { left: EncoderLabels; right: EncoderLabels };
  buttonPin: Label;
  stopPin?: Label;
}

type EncoderLabels = { a: Label; b?: Label };

/** A plan of pins, or the problem why the board has none. */
export function proposePins(boardId: BoardId, request: PinRequest): PinPlan | Problem {
  const board = BOARDS[boardId];
  const assignment = bestAssignment(board, needsOf(request));
  return assignment ? planOf(board, request, assignment) : impossible(board, request);
}

/** Kind of each sensor; a mixed bar of another length than its list is a usual one. */
function kindsOf({ sensorKind, sensorKinds, sensorCount }: PinRequest): readonly SensorKind[] {
  if (sensorKind !== 'mixed') return new Array<SensorKind>(sensorCount).fill(sensorKind);
  return sensorKinds?.length === sensorCount ? sensorKinds : usualKinds(sensorCount);
}

function needsOf(request: PinRequest): Need[] {
  const { scheme, standby, encoderChannels = 0, stopInput } = request;
  const { motorPins, standby: hasStandby } = DRIVERS[scheme];
  const sensors = kindsOf(request).map((kind, index): Need => ({
    key: `sensor${index}`,
    role: kind === 'analog' ? 'analog sensor' : 'digital sensor',
  }));
  const ofRole = (role: Need['role']) => sensors.filter((sensor) => sensor.role === role);
  const motors = (['left', 'right'] as const).flatMap((side) =>
    motorPins.map(({ key, pwm }): Need => ({ key: `${side}.${key}`, role: pwm ? 'PWM output' : 'output' })),
  );
  const others: Need[] = [{ key: 'button', role: 'button' }];
  if (stopInput) others.push({ key: 'stop', role: 'stop input' });
  if (standby && hasStandby) others.unshift({ key: 'standby', role: 'output' });
  const encoders = ['left', 'right'].flatMap((side) =>
    ['a', 'b']
      .slice(0, encoderChannels)
      .map((key): Need => ({ key: `encoder.${side}.${key}`, role: 'encoder' })),
  );
  // Digital inputs can go nearly anywhere, so they choose last.
  return [...ofRole('analog sensor'), ...motors, ...others, ...ofRole('digital sensor'), ...encoders];
}

function planOf(board: BoardFacts, request: PinRequest, assignment: Assignment): PinPlan {
  const labelOf = (key: string): Label => {
    const pin = assignment.get(key);
    if (pin === undefined) throw new Error(`the plan has no pin for ${key}`);
    return sheetLabel(pin);
  };
  const side = (name: 'left' | 'right'): Partial<Record<MotorPinKey, Label>> =>
    Object.fromEntries(DRIVERS[request.scheme].motorPins.map(({ key }) => [key, labelOf(`${name}.${key}`)]));
  const encoder = (name: 'left' | 'right'): EncoderLabels => ({
    a: labelOf(`encoder.${name}.a`),
    ...(assignment.has(`encoder.${name}.b`) ? { b: labelOf(`encoder.${name}.b`) } : {}),
  });
  // Neighbouring sensors of a kind get neighbouring pins.
  const kinds = kindsOf(request);
  const sensorPins = new Array<PinFacts>(kinds.length);
  for (const wanted of ['analog', 'digital'] as const) {
    const places = kinds.flatMap((kind, place) => (kind === wanted ? [place] : []));
    const own = new Set(places.map((place) => assignment.get(`sensor${place}`)));
    board.pins
      .filter((pin) => own.has(pin))
      .forEach((pin, i) => {
        sensorPins[places[i]!] = pin;
      });
  }
  return {
    sensorPins: sensorPins.map(sheetLabel),
    driver: {
      left: side('left'),
      right: side('right'),
      ...(assignment.has('standby') ? { standbyPin: labelOf('standby') } : {}),
    },
    ...(assignment.has('encoder.left.a')
      ? { encoders: { left: encoder('left'), right: encoder('right') } }
      : {}),
    buttonPin: labelOf('button'),
    ...(assignment.has('stop') ? { stopPin: labelOf('stop') } : {}),
  };
}

function isPossible(board: BoardFacts, request: PinRequest): boolean {
  return bestAssignment(board, needsOf(request)) !== undefined;
}

function impossible(board: BoardFacts, request: PinRequest): Problem {
  const { sensorKind, sensorCount, scheme, stopInput } = request;
  const contacts = stopInput ? ', the button and the stop input' : ' and the button';
  const measured = kindsOf(request).filter((kind) => kind === 'analog').length;
  const usable = board.pins.filter((pin) => pin.reserved === undefined);
  const analog = usable.filter((pin) => isAble(pin, 'analog sensor'));
  const tooFewAnalog = analog.length < measured;
  const message = tooFewAnalog
    ? `${board.title} has ${counted(analog.length, 'analog pin')} (${listPins(analog)}), too few for ${counted(measured, 'analog sensor')}.`
    : `${board.title} has ${counted(usable.length, 'usable pin')}; ${counted(sensorCount, sensorKind === 'mixed' ? 'sensor' : `${sensorKind} sensor`)}, the ${scheme} driver${contacts} need ${counted(needsOf(request).length, 'pin')} of the right kinds.`;
  const fewer = Array.from({ length: sensorCount - 1 }, (_, index) => sensorCount - 1 - index);
  const most = fewer.find((count) => isPossible(board, { ...request, sensorCount: count }));
  const others = Object.values(BOARDS).filter((other) => isPossible(other, request));
  const ways = [
    ...(sensorKind !== 'digital' && isPossible(board, { ...request, sensorKind: 'digital' })
      ? ['take digital sensors']
      : []),
    ...(most === undefined ? [] : [`take ${counted(most, 'sensor')} at most`]),
    ...(others.length === 0 ? [] : [`take another board: ${joinOr(others.map(({ id }) => id))}`]),
  ];
  const advice = joinOr(ways);
  return {
    pointer: '/sensors/count',
    message,
    got: withUnit(sensorCount, 'sensors'),
    ...(most === undefined ? {} : { allowed: `at most ${withUnit(most, 'sensors')}` }),
    fix: `${advice.charAt(0).toUpperCase()}${advice.slice(1)}.`,
  };
}
