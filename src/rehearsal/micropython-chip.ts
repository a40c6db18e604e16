/**
 * The chip that the interpreter believes to run on: pins, converter, clock, watchdog, in virtual time.
 *
 * Time passes only by what the program does: each reading of the converter costs the board's `adcReadS`; each digital
 * reading, pin or duty write and look at the clock costs `digitalReadS`; sleeping costs what is asked for. The
 * interpreter's own arithmetic between these has no cost of its own, so `computeS`, the board's worst case for one
 * control step, is spent once a step: before the first motor output that follows a sensor reading.
 * A reading shows the world at its beginning; an output acts after its cost. PWM has the board's `pwmSteps`.
 *
 * Source of limits and ranges: MicroPython documentation, machine, time, rp2 and esp32 quick references.
 */
import type { BoardFacts, PinFacts } from '../vehicle/board-facts.js';
import { findPin } from '../vehicle/boards.js';
import { ChipReset, MicroPythonClock, ticksAdd, ticksDiff } from './micropython-clock.js';

/** What the chip's pins lead to. Levels are 0 or 1, or between them the mean of a PWM output. */
export interface Surroundings {
  /** Lets the world run on; may throw to end the run. */
  advance(durationS: number): void;
  /** Converter's count of an analog pin. */
  count(gpio: number): number;
  /** Level that something outside puts on a pin; undefined when nothing does. `timeS` since power-on. */
  level(gpio: number, timeS: number): boolean | undefined;
  /** A pin's output has changed. */
  drive(gpio: number, level: number): void;
  /** Makes the next edge that waits on a pin; returns whether there was one. */
  edge?(gpio: number): boolean;
  /** Whether the program hangs from now on; without it, never. */
  hangs?: () => boolean;
  isSensor(gpio: number): boolean;
  isMotor(gpio: number): boolean;
}

export const RESET_CAUSE = { powerOn: 1, watchdog: 3 } as const;

const U16_MAX = 65535;
/** Longest watchdog time of the RP2040, ms; the ESP32's is longer than anything asked for here. */
const RP2040_WATCHDOG_LIMIT_MS = 8388;
/** Attenuation of the ESP32's converter by its constants' values, dB. */
const ATTENUATION_DB = [0, 2.5, 6, 11];

interface PinState {
  output: boolean;
  pullUp: boolean;
  latch: boolean;
  /** What the pin last gave as an output, 0 to 1. */
  level: number;
  /** Factor on the counts by which the converter sees less than the full range. */
  adcGain: number;
}

export class MicroPythonChip {
  private readonly clock: MicroPythonClock;
  private computePending = false;
  private readonly pins = new Map<number, PinState>();

  constructor(
    private readonly board: BoardFacts,
    private readonly surroundings: Surroundings,
    private readonly cause: number = RESET_CAUSE.powerOn,
  ) {
    this.clock = new MicroPythonClock((durationS) => surroundings.advance(durationS), surroundings.hangs);
  }

  private touch(): void {
    this.clock.spend(this.board.digitalReadS);
  }

  private output(gpio: number, level: number): void {
    if (this.computePending && this.surroundings.isMotor(gpio)) {
      this.computePending = false;
      this.clock.spend(this.board.computeS);
    }
    this.touch();
    const state = this.state(gpio);
    if (state.level === level) return;
    state.level = level;
    this.clock.catchUp();
    this.surroundings.drive(gpio, level);
  }

  private facts(id: number | string): PinFacts | undefined {
    if (id === 'LED' && this.board.id === 'pico') return findPin(this.board, 25);
    return findPin(this.board, id);
  }

  private state(gpio: number): PinState {
    let state = this.pins.get(gpio);
    if (state === undefined) {
      state = { output: false, pullUp: false, latch: false, level: 0, adcGain: 1 };
      this.pins.set(gpio, state);
    }
    return state;
  }

  /** The functions that `machine` and `time` call, as module `_chip`. Texts are reasons to refuse, "" is none. */
  functions(): object {
    return {
      find: (id: number | string) => (this.facts(id) ? '' : 'invalid pin'),
      number: (id: number | string) => Number(this.facts(id)?.code),
      configure: (gpio: number, output: boolean, pullUp: boolean) => this.configure(gpio, output, pullUp),
      configure_adc: (gpio: number, attenuation: number) => this.configureAdc(gpio, attenuation),
      configure_pwm: (gpio: number) => (this.facts(gpio)?.pwm ? '' : `pin ${gpio} cannot do PWM`),
      frequency: (_gpio: number, hz: number) => (hz >= 10 && hz <= 1e6 ? '' : 'invalid PWM frequency'),
      read: (gpio: number) => this.read(gpio),
      read_u16: (gpio: number) => this.readU16(gpio),
      write: (gpio: number, level: boolean) => this.write(gpio, level),
      duty: (gpio: number, duty: number) => this.output(gpio, this.pwmLevel(duty)),
      start_watchdog: (timeoutMs: number) => this.startWatchdog(timeoutMs),
      feed: () => this.feed(),
      reset_cause: () => this.cause,
      reset: () => {
        throw new ChipReset('The program has called machine.reset().');
      },
      edge: (gpio: number) => this.edge(gpio),
      sleep_ms: (timeMs: number) => this.clock.sleep(timeMs / 1e3),
      sleep_us: (timeUs: number) => this.clock.sleep(timeUs / 1e6),
      ticks_us: () => this.look(1),
      ticks_ms: () => this.look(1000),
      ticks_add: ticksAdd,
      ticks_diff: ticksDiff,
    };
  }

  /** Mean level of a PWM output: the hardware's counter has fewer steps than duty_u16(). */
  private pwmLevel(duty: number): number {
    const share = Math.min(U16_MAX, Math.max(0, duty)) / U16_MAX;
    return Math.round(share * this.board.pwmSteps) / this.board.pwmSteps;
  }

  private look(usPerTick: number): number {
    this.touch();
    return this.clock.ticks(usPerTick);
  }

  private configure(gpio: number, output: boolean, pullUp: boolean): string {
    const facts = this.facts(gpio);
    if (output && !facts?.output) return `pin ${gpio} can only be an input`;
    if (pullUp && !facts?.pullUp) return `pin ${gpio} has no pull-up`;
    const state = this.state(gpio);
    state.output = output;
    state.pullUp = pullUp;
    if (output) this.output(gpio, state.latch ? 1 : 0);
    return '';
  }

  private configureAdc(gpio: number, attenuation: number): string {
    if (!this.facts(gpio)?.adc) return `pin ${gpio} has no converter`;
    const db = ATTENUATION_DB[attenuation] ?? 11;
    this.state(gpio).adcGain = 10 ** ((11 - db) / 20);
    return '';
  }

  private read(gpio: number): number {
    this.clock.catchUp();
    const state = this.state(gpio);
    if (this.surroundings.isSensor(gpio)) this.computePending = true;
    const level = state.output
      ? state.latch
      : (this.surroundings.level(gpio, this.clock.nowS) ?? state.pullUp);
    this.touch();
    return level ? 1 : 0;
  }

  private readU16(gpio: number): number {
    this.clock.catchUp();
    if (this.surroundings.isSensor(gpio)) this.computePending = true;
    const seen = Math.floor(this.surroundings.count(gpio) * this.state(gpio).adcGain);
    const count = Math.min(this.board.adcMaxCount, seen);
    this.clock.spend(this.board.adcReadS);
    // Both ports widen 12 bits to 16 by repeating the upper ones, so that full scale is 65535.
    return (count << 4) | (count >> 8);
  }

  private write(gpio: number, level: boolean): void {
    const state = this.state(gpio);
    state.latch = level;
    if (state.output) this.output(gpio, level ? 1 : 0);
    else this.touch();
  }

  private startWatchdog(timeoutMs: number): string {
    if (this.board.id === 'pico' && timeoutMs > RP2040_WATCHDOG_LIMIT_MS) return 'timeout exceeds 8388';
    this.clock.startWatchdog(timeoutMs);
    return '';
  }

  /** Lets one edge interrupt the program. */
  private edge(gpio: number): boolean {
    if (!(this.surroundings.edge?.(gpio) ?? false)) return false;
    this.clock.spend(this.board.edgeS);
    return true;
  }

  private feed(): void {
    this.touch();
    this.clock.feedWatchdog();
  }
}
