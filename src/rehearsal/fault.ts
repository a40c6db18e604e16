/**
 * Faults that a rehearsal can inject, and how they are written.
 *
 * One fault: WHAT[=WHICH][:HOW]@TIME[+DURATION], e.g. sensor=2:stuck-high@3.0s or line=gone@2s+0.3s. Times run from the moment at which
 * a motor is first driven; without a duration a fault stays to the end.
 */
import { EXIT, FairleadError, type Problem } from '../sheet/problem.js';
import { joinOr, quote, withUnit } from '../sheet/words.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import type { EngineName } from './engine.js';

export const SENSOR_FAULTS = ['stuck-high', 'stuck-low', 'noisy', 'unplugged'] as const;
export type SensorFault = (typeof SENSOR_FAULTS)[number];

export type Fault = { atS: number; durationS?: number } & (
  | { kind: 'sensor'; sensorIndex: number; how: SensorFault }
  /** Light on all sensors, share of the difference between line and ground; positive like more line. */
  | { kind: 'light'; lightShare: number }
  /** Voltage of the battery without load. */
  | { kind: 'battery'; batteryV: number }
  | { kind: 'wheel'; side: 'left' | 'right' }
  /** No line on the floor any more. */
  | { kind: 'line' }
  /** The vehicle is pushed aside, positive left, and turned. */
  | { kind: 'bump'; shiftM: number; turnRad: number }
  /** The program hangs. */
  | { kind: 'program' }
  /** The contact of the stop input opens. */
  | { kind: 'stop' }
  /** The supply breaks down for a moment. */
  | { kind: 'supply' }
);

/** Largest shares, lengths and times that are taken. */
const MOST_LIGHT_PERCENT = 300;
const MOST_V = 60;
const MOST_SHIFT_MM = 500;
const MOST_TURN_DEG = 180;
const MOST_TIME_S = 3600;
const MOST_SENSORS = 16;

/** How each kind is written, for help and problems. */
export const FAULT_FORMS: readonly { form: string; about: string }[] = [
  { form: 'sensor=N:HOW', about: `sensor N, from the left and from 1, is ${joinOr(SENSOR_FAULTS)}` },
  {
    form: 'light=P%',
    about: 'light on all sensors, P % of the difference between line and ground; may be negative',
  },
  { form: 'battery=UV', about: 'the battery has U volts without load, such as 4.8V' },
  { form: 'wheel=SIDE:blocked', about: 'a wheel, left or right, does not turn' },
  { form: 'line=gone', about: 'there is no line on the floor any more' },
  {
    form: 'bump=Xmm[:Ydeg]',
    about: 'the vehicle is pushed X mm to the left and turned by Y degrees to the left',
  },
  { form: 'stop=open', about: 'the contact of the stop input is open; chip and micropython' },
  { form: 'program=hangs', about: 'the program hangs: the watchdog has to act; chip and micropython' },
  {
    form: 'supply=breaks',
    about: 'the supply breaks down and returns: the board starts anew; chip and micropython',
  },
];

const NUMBER = String.raw`([-+]?\d+(?:\.\d+)?)`;
const WHEN = new RegExp(String.raw`^(.*)@${NUMBER}s(?:\+${NUMBER}s)?$`);

type What = Fault extends infer F ? (F extends Fault ? Omit<F, 'atS' | 'durationS'> : never) : never;

class BadFault extends Error {}

function within(text: string | undefined, least: number, most: number, unit: string | undefined): number {
  const value = Number(text);
  if (value < least || value > most)
    throw new BadFault(`${withUnit(value, unit)} is outside ${least} to ${withUnit(most, unit)}`);
  return value;
}

const RAD_PER_DEG = Math.PI / 180;

/** The forms, each with what it stands for. */
const READERS: readonly [RegExp, (parts: readonly (string | undefined)[]) => What][] = [
  [
    /^sensor=(\d+):([a-z-]+)$/,
    ([number, how]) => {
      const kind = SENSOR_FAULTS.find((each) => each === how);
      if (kind === undefined)
        throw new BadFault(`a sensor can be ${joinOr(SENSOR_FAULTS)}, not ${quote(how ?? '')}`);
      return { kind: 'sensor', sensorIndex: within(number, 1, MOST_SENSORS, undefined) - 1, how: kind };
    },
  ],
  [
    new RegExp(`^light=${NUMBER}%$`),
    ([percent]) => ({
      kind: 'light',
      lightShare: within(percent, -MOST_LIGHT_PERCENT, MOST_LIGHT_PERCENT, '%') / 100,
    }),
  ],
  [
    new RegExp(`^battery=${NUMBER}V$`),
    ([volts]) => ({ kind: 'battery', batteryV: within(volts, 0, MOST_V, 'V') }),
  ],
  [/^wheel=(left|right):blocked$/, ([side]) => ({ kind: 'wheel', side: side === 'left' ? 'left' : 'right' })],
  [/^line=gone$/, () => ({ kind: 'line' })],
  [
    new RegExp(`^bump=${NUMBER}mm(?::${NUMBER}deg)?$`),
    ([shift, turn]) => ({
      kind: 'bump',
      shiftM: within(shift, -MOST_SHIFT_MM, MOST_SHIFT_MM, 'mm') / 1000,
      turnRad: within(turn ?? '0', -MOST_TURN_DEG, MOST_TURN_DEG, 'deg') * RAD_PER_DEG,
    }),
  ],
  [/^stop=open$/, () => ({ kind: 'stop' })],
  [/^program=hangs$/, () => ({ kind: 'program' })],
  [/^supply=breaks$/, () => ({ kind: 'supply' })],
];

/** Happens at a moment; a duration says nothing. */
const MOMENTARY: readonly Fault['kind'][] = ['bump', 'program', 'supply'];

/**
 * Reads a fault as it is written on the command line.
 *
 * @throws Error with a message that says what is wrong and what is allowed
 */
export function parseFault(text: string): Fault {
  const [, what = '', at, lasts] = WHEN.exec(text) ?? [];
  if (at === undefined)
    throw new BadFault(`${quote(text)} does not end in its time, such as @3.0s or @3.0s+0.5s.`);
  for (const [form, read] of READERS) {
    const parts = form.exec(what);
    if (parts === null) continue;
    try {
      const fault = { ...read(parts.slice(1)), atS: within(at, 0, MOST_TIME_S, 's') };
      if (lasts === undefined) return fault;
      if (MOMENTARY.includes(fault.kind))
        throw new BadFault('this fault happens at a moment and has no duration');
      return { ...fault, durationS: within(lasts, 0.001, MOST_TIME_S, 's') };
    } catch (error) {
      if (error instanceof BadFault)
        throw new BadFault(`${quote(text)}: ${error.message}.`, { cause: error });
      throw error;
    }
  }
  throw new BadFault(
    `${quote(what)} is no fault. There are: ${FAULT_FORMS.map(({ form }) => form).join(', ')}.`,
  );
}

/** What the twin, the controller without a board, lacks. */
const BOARD_ONLY: Readonly<Partial<Record<Fault['kind'], string>>> = {
  program: 'program that could hang',
  supply: 'board that could start anew',
  stop: 'stop input',
};

/** Whether the contact of the stop input is open at a time, s. */
export function stopIsOpen(faults: readonly Fault[] | undefined, timeS: number): boolean {
  return (faults ?? []).some(
    ({ kind, atS, durationS = Infinity }) => kind === 'stop' && timeS >= atS && timeS < atS + durationS,
  );
}

/** What of a vehicle or an engine does not go with the faults asked for. */
function faultProblems(faults: readonly Fault[], vehicle: Vehicle, engine: EngineName): Problem[] {
  const sensorCount = vehicle.bar.pins.length;
  const problems: Problem[] = [];
  for (const fault of faults) {
    if (fault.kind === 'sensor' && fault.sensorIndex >= sensorCount)
      problems.push({
        pointer: '',
        message: `There is no sensor ${fault.sensorIndex + 1} to be ${fault.how}.`,
        allowed: `sensor 1 to ${sensorCount}`,
        fix: 'Count from the left, beginning with 1.',
      });
    if (fault.kind === 'stop' && vehicle.stopInput === undefined)
      problems.push({
        pointer: '/stopPin',
        message: 'There is no stop input whose contact could open.',
        fix: 'Give stopPin in the sheet, or leave the fault out.',
      });
    else if (engine === 'twin' && fault.kind in BOARD_ONLY)
      problems.push({
        pointer: '',
        message: `The twin is the controller alone: it has no ${BOARD_ONLY[fault.kind]}.`,
        fix: `Use --on ${vehicle.language === 'arduino' ? 'chip' : 'micropython'}.`,
      });
  }
  return problems;
}

/** @throws FairleadError (bad input) with everything that does not fit */
export function checkFaults(faults: readonly Fault[], vehicle: Vehicle, engine: EngineName): void {
  const problems = faultProblems(faults, vehicle, engine);
  if (problems.length > 0)
    throw new FairleadError('These faults do not fit.', { exitCode: EXIT.badInput, problems });
}
