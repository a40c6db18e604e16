/**
 * PWM of a vehicle's motors: which timers serve them, at which frequency, and why.
 *
 * Above hearing where timers and driver allow it: 20 kHz, no more, as every switching costs heat (common practice). All motors get one
 * frequency. Where the timers cannot be set up anew, they stay as the Arduino core has them.
 */
import type { BoardFacts, PinFacts, PwmMode } from './board-facts.js';
import { wideTimerPwm } from './boards/avr.js';
import type { Vehicle } from './vehicle.js';

/** The frequency that is wanted: what people hear ends below it. Common practice. */
const QUIET_HZ = 20e3;

/** What decides the PWM of the motors. */
export interface PwmDemand {
  board: BoardFacts;
  /** Timers that serve the motors. */
  serving: ReadonlySet<number>;
  /** Highest frequency that the driver takes, Hz. */
  maxPwmHz: number;
}

/** Timers of pins, on boards whose timers are fixed to pins. */
export function timersOf(pins: readonly (PinFacts | undefined)[]): Set<number> {
  return new Set(pins.flatMap((pin) => pin?.pwm?.timer ?? []));
}

export function pwmDemand({ board, drive }: Vehicle): PwmDemand {
  const pins = [drive.left, drive.right].flatMap(({ pwm, in1, in2 }) => (pwm ? [pwm] : [in1, in2]));
  return { board, serving: timersOf(pins), maxPwmHz: drive.maxPwmHz };
}

interface Chosen {
  /** Undefined where every timer stays as it is. */
  pwmHz?: number;
  why: string;
}

function choose({ board, serving, maxPwmHz }: PwmDemand): Chosen {
  const quiet = Math.min(QUIET_HZ, maxPwmHz);
  const wanted: Chosen = {
    pwmHz: quiet,
    why: quiet < QUIET_HZ ? 'the most that the driver takes; it can be heard' : 'above hearing',
  };
  const { timers } = board;
  if (timers === undefined) return wanted;
  const own = timers.filter(({ timer }) => serving.has(timer));
  const fixed = own.find(({ free }) => free === undefined);
  if (fixed?.timer === board.clockTimer)
    return { why: `timer ${fixed?.timer} keeps the clock and its frequency` };
  if (fixed) return { why: `timer ${fixed.timer} stays as the Arduino core sets it up` };
  if (!timers.some(({ timer, tick }) => tick && !serving.has(timer)))
    return { why: 'no timer is left for the sample tick, which is a PWM period then' };
  const only = own.flatMap(({ free }) => free?.fixed?.pwmHz ?? [])[0];
  if (only === undefined) return wanted;
  if (only > maxPwmHz)
    return { why: 'the next frequency of an 8-bit timer, 31.4 kHz, is more than the driver takes' };
  return { pwmHz: only, why: 'above hearing; an 8-bit timer has no nearer one' };
}

/** Mode of one of the timers that serve the motors. */
export function modeOf(demand: PwmDemand, timer: number): PwmMode {
  const facts = demand.board.timers?.find((each) => each.timer === timer);
  if (facts === undefined) throw new Error(`${demand.board.title} has no timer ${timer}.`);
  const { pwmHz } = choose(demand);
  if (pwmHz === undefined || facts.free === undefined) return facts.pwm;
  return facts.free.fixed ?? wideTimerPwm(timer, pwmHz);
}

/** PWM frequency of one timer, Hz. */
export function timerHz(demand: PwmDemand, timer: number): number {
  return demand.board.timers ? modeOf(demand, timer).pwmHz : (choose(demand).pwmHz ?? demand.board.pwmHz);
}

/** PWM frequency of the motors, Hz, lowest and highest where they differ, and what decides it. */
export function pwmOf(demand: PwmDemand): { leastHz: number; mostHz: number; why: string } {
  const { board, serving } = demand;
  const { pwmHz = board.pwmHz, why } = choose(demand);
  const all = board.timers
    ? [...serving].map((timer) => timerHz(demand, timer))
    : [Math.min(pwmHz, board.pwmHz)];
  return { leastHz: Math.min(...all), mostHz: Math.max(...all), why };
}

/** PWM frequency of the motors, the lowest where they differ, Hz. */
export function motorPwmHz(vehicle: Vehicle): number {
  return pwmOf(pwmDemand(vehicle)).leastHz;
}

/** The same in words, with the reason. */
export function pwmWords(vehicle: Vehicle): string {
  const { leastHz, mostHz, why } = pwmOf(pwmDemand(vehicle));
  const words = (hz: number) =>
    hz >= 1000 ? `${Math.round(hz / 100) / 10} kHz` : `${Math.round(hz * 10) / 10} Hz`;
  return `${leastHz === mostHz ? words(leastHz) : `${words(leastHz)} and ${words(mostHz)}`}: ${why}`;
}
