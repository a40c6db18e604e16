/**
 * The chip that the interpreter believes to run on: pins, converter, clock, watchdog, in virtual time.
 *
 * Time passes only by what the program does: each reading of the converter costs the board's `adcReadS`; each digital
 * reading, pin or duty write and look at the clock costs `digitalReadS`; sleeping costs what is asked for. The
 * interpreter's own arithmetic between these has no cost of its own, so `computeS`, the board's worst case for one
 * control step, is spent once a step: before the first motor output that follows a sensor reading.
 * A reading shows the world at its beginning; an output acts after its cost.
 *
 * The clock starts 1 s before the 30-bit tick counters wrap, so that every run crosses a wrap.
 * Source of limits and ranges: MicroPython documentation, machine, time, rp2 and esp32 quick references.
 */
import type { BoardFacts, PinFacts } from '../vehicle/board-facts.js';
import { findPin } from '../vehicle/boards.js';

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
  isSensor(gpio: number): boolean;
  isMotor(gpio: number): boolean;
}

/** The chip has started anew, and would do so for ever: the rehearsal ends. */
export class ChipReset extends Error {
  override readonly name = 'ChipReset';
}

export const RESET_CAUSE = { powerOn: 1, watchdog: 3 } as const;

const TICKS_PERIOD = 2 ** 30;
const US_BEFORE_WRAP = 1e6;
const U16_MAX = 65535;
/** Longest watchdog time of the RP2040, ms; the ESP32's is longer than anything asked for here. */
const RP2040_WATCHDOG_LIMIT_MS = 8388;
/** Attenuation of the ESP32's converter by its constants' values, dB. */
const ATTENUATION_DB = [0, 2.5, 6, 11];

interface PinState {
  output: boolean;
  pullUp: boolean;
  latch: boolean;
  /** Factor on the counts by which the converter sees less than the full range. */
  adcGain: number;
}

export class MicroPythonChip {
  /** Virtual time since power-on, us. */
  private nowUs = 0;
  /** Time up to which the surroundings have run, us. */
  private worldUs = 0;
  private computePending = false;
  private watchdogUs = Infinity;
  private watchdogLimitUs = Infinity;
  private readonly pins = new Map<number, PinState>();

  constructor(
    private readonly board: BoardFacts,
    private readonly surroundings: Surroundings,
    private readonly cause: number = RESET_CAUSE.powerOn,
  ) {}

  /** Lets time pass for the program, and for the surroundings up to it. */
  private spend(timeS: number): void {
    this.nowUs += timeS * 1e6;
    if (this.nowUs > this.watchdogUs) {
      this.nowUs = this.watchdogUs;
      this.catchUp();
      throw new ChipReset(`The watchdog was not fed for ${this.watchdogLimitUs / 1000} ms.`);
    }
  }

  private catchUp(): void {
    const behindS = (this.nowUs - this.worldUs) / 1e6;
    if (behindS <= 0) return;
    this.worldUs = this.nowUs;
    this.surroundings.advance(behindS);
  }

  private touch(): void {
    this.spend(this.board.digitalReadS);
  }

  private output(gpio: number, level: number): void {
    if (this.computePending && this.surroundings.isMotor(gpio)) {
      this.computePending = false;
      this.spend(this.board.computeS);
    }
    this.touch();
    this.catchUp();
    this.surroundings.drive(gpio, level);
  }

  private facts(id: number | string): PinFacts | undefined {
    if (id === 'LED' && this.board.id === 'pico') return findPin(this.board, 25);
    return findPin(this.board, id);
  }

  private state(gpio: number): PinState {
    let state = this.pins.get(gpio);
    if (state === undefined) {
      state = { output: false, pullUp: false, latch: false, adcGain: 1 };
      this.pins.set(gpio, state);
    }
    return state;
  }

  private ticks(value: number): number {
    return ((value % TICKS_PERIOD) + TICKS_PERIOD) % TICKS_PERIOD;
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
      duty: (gpio: number, duty: number) => this.output(gpio, Math.min(U16_MAX, Math.max(0, duty)) / U16_MAX),
      start_watchdog: (timeoutMs: number) => this.startWatchdog(timeoutMs),
      feed: () => this.feed(),
      reset_cause: () => this.cause,
      reset: () => {
        throw new ChipReset('The program has called machine.reset().');
      },
      sleep_ms: (timeMs: number) => this.sleep(timeMs / 1e3),
      sleep_us: (timeUs: number) => this.sleep(timeUs / 1e6),
      ticks_us: () => this.look(1),
      ticks_ms: () => this.look(1000),
      ticks_add: (ticks: number, change: number) => this.ticks(ticks + change),
      ticks_diff: (end: number, start: number) =>
        this.ticks(end - start + TICKS_PERIOD / 2) - TICKS_PERIOD / 2,
    };
  }

  private look(usPerTick: number): number {
    this.touch();
    return Math.floor(this.ticks((TICKS_PERIOD - US_BEFORE_WRAP + this.nowUs) / usPerTick));
  }

  private sleep(timeS: number): void {
    if (timeS > 0) this.spend(timeS);
    this.catchUp();
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
    this.catchUp();
    const state = this.state(gpio);
    if (this.surroundings.isSensor(gpio)) this.computePending = true;
    const level = state.output
      ? state.latch
      : (this.surroundings.level(gpio, this.nowUs / 1e6) ?? state.pullUp);
    this.touch();
    return level ? 1 : 0;
  }

  private readU16(gpio: number): number {
    this.catchUp();
    if (this.surroundings.isSensor(gpio)) this.computePending = true;
    const seen = Math.floor(this.surroundings.count(gpio) * this.state(gpio).adcGain);
    const count = Math.min(this.board.adcMaxCount, seen);
    this.spend(this.board.adcReadS);
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
    this.watchdogLimitUs = timeoutMs * 1000;
    this.feed();
    return '';
  }

  private feed(): void {
    this.touch();
    this.watchdogUs = this.nowUs + this.watchdogLimitUs;
  }
}
