/**
 * An 8-bit AVR chip at 16 MHz as a board wires it, instruction by instruction (avr8js): processor, timers, ports, converter, watchdog.
 *
 * What a chip has is data (chip-models.ts); which pin is which port and bit, the board's facts say. A watchdog reset starts the chip anew
 * with its registers cleared and its memory kept, as the data sheets (Reset Sources) have it; the emulator alone would only set the
 * program counter. On a chip with USB nothing is plugged in; only the clock generator for it reports that it runs.
 */
import { AVRADC, AVRClock, AVRIOPort, AVRTimer, AVRWatchdog, CPU, PinState, avrInstruction } from 'avr8js';
import type { BoardFacts, PinFacts } from '../vehicle/board-facts.js';
import { CHIP_MODELS, type ChipModel } from './chip-models.js';
import { HighSpeedTimer } from './chip-timer4.js';

export const CLOCK_HZ = 16e6;

/** avr8js takes this many addresses below the memory for registers. */
const REGISTER_BYTES = 0x100;
/** Reset flags and their register: power-on, watchdog. */
const MCUSR = 0x54;
const PORF = 0x01;
const BORF = 0x04;
const WDRF = 0x08;
/** The instruction that jumps to itself; status register and its bit that lets interrupts in. */
const JUMP_TO_SELF = 0xcfff;
const SREG = 0x5f;
const INTERRUPTS = 0x80;
/** Channel selection of the converter. */
const ADMUX = 0x7c;
const SELECT_MASK = 0x07;
const ADCSRB = 0x7b;
/** Clock generator of USB: register, and the bit that says that it has locked. */
const PLLCSR = 0x49;
const PLOCK = 0x01;

/** What is wired to the chip. */
export interface Wiring {
  /** The converter samples a channel; returns counts, 0 to 1023. */
  sample(channel: number): number;
  /** A pin may have changed its level or direction. */
  pinsChanged(): void;
}

/** Arduino's number of a pin: its label, or for A0 and its like the alias that is a number. */
export function pinNumber(pin: PinFacts): number {
  const text = [pin.label, ...pin.aliases].find((name) => /^\d+$/.test(name));
  if (text === undefined) throw new Error(`Pin ${pin.label} has no number.`);
  return Number(text);
}

export class AvrChip {
  private cpu!: CPU;
  private readonly model: ChipModel;
  private readonly places: ReadonlyMap<number, { name: string; bit: number }>;
  private ports!: ReadonlyMap<string, AVRIOPort>;
  private cyclesBefore = 0;
  private resetPending = false;
  /** Levels that something outside puts on pins, by pin number. */
  private readonly outside = new Map<number, boolean>();
  /** Watchdog resets so far. */
  resets = 0;

  /** @param program flash memory from address 0 */
  constructor(
    private readonly program: Uint8Array,
    board: BoardFacts,
    private readonly wiring: Wiring,
  ) {
    const model = CHIP_MODELS[board.core?.mcu ?? ''];
    if (model === undefined) throw new Error(`There is no emulated chip for ${board.id}.`);
    this.model = model;
    this.places = new Map(
      board.pins.flatMap((pin) => (pin.port === undefined ? [] : [[pinNumber(pin), pin.port] as const])),
    );
    this.start(PORF);
  }

  /** Clock cycles since power-on. */
  get cycles(): number {
    return this.cyclesBefore + this.cpu.cycles;
  }

  private start(resetFlags: number, memory?: Uint8Array): void {
    const { model } = this;
    const flash = new Uint16Array(model.flashWords);
    new Uint8Array(flash.buffer).set(this.program);
    const cpu = new CPU(flash, model.ramStart + model.ramBytes - REGISTER_BYTES);
    if (memory) cpu.data.set(memory, model.ramStart);
    cpu.data[MCUSR] = resetFlags;
    this.ports = new Map(
      Object.entries(model.ports).map(([name, config]) => [name, new AVRIOPort(cpu, config)]),
    );
    for (const port of this.ports.values()) port.addListener(() => this.wiring.pinsChanged());
    for (const timer of model.timers) new AVRTimer(cpu, timer);
    if (model.usb) {
      new HighSpeedTimer(cpu, this.ports.get('C')!, this.ports.get('D')!);
      cpu.readHooks[PLLCSR] = () => cpu.data[PLLCSR]! | PLOCK;
    }
    const adc = new AVRADC(cpu, model.adc);
    adc.onADCRead = () => {
      const count = this.wiring.sample(this.channel());
      cpu.addClockEvent(() => adc.completeADCRead(count), adc.sampleCycles);
    };
    new AVRWatchdog(cpu, model.watchdog, new AVRClock(cpu, CLOCK_HZ));
    cpu.reset = () => {
      this.resetPending = true;
    };
    this.cpu = cpu;
    for (const [pin, high] of this.outside) this.setPin(pin, high);
  }

  /** The converter's channel in force. Differential inputs and constants are left out: nothing here uses them. */
  private channel(): number {
    const { data } = this.cpu;
    const select = data[ADMUX]! & SELECT_MASK;
    return select + (data[ADCSRB]! & this.model.mux5 ? 8 : 0);
  }

  /** Runs until at least so many cycles since power-on have passed. */
  runTo(cycles: number): void {
    const execute = avrInstruction;
    while (this.cycles < cycles) {
      const { cpu } = this;
      const end = cycles - this.cyclesBefore;
      while (cpu.cycles < end && !this.resetPending) {
        execute(cpu);
        cpu.tick();
      }
      if (this.resetPending) this.restart();
    }
  }

  /** The program hangs where it is, interrupts off: `rjmp .-2`. */
  hang(): void {
    const { cpu } = this;
    cpu.progMem[cpu.pc] = JUMP_TO_SELF;
    cpu.data[SREG]! &= ~INTERRUPTS;
  }

  /** The supply breaks down and returns: a brown-out reset. */
  breakDown(): void {
    this.restart(BORF);
  }

  private restart(resetFlags = WDRF): void {
    this.resetPending = false;
    if (resetFlags === WDRF) this.resets++;
    this.cyclesBefore += this.cpu.cycles;
    this.start(resetFlags, this.cpu.data.slice(this.model.ramStart));
    this.wiring.pinsChanged();
  }

  private pin(number: number): [port: AVRIOPort, bit: number] {
    const place = this.places.get(number);
    const port = place && this.ports.get(place.name);
    if (place === undefined || port === undefined) throw new Error(`Pin ${number} has no port.`);
    return [port, place.bit];
  }

  /** Whether the chip drives a pin high; a pin that is an input is not driven. */
  isHigh(number: number): boolean {
    const [port, bit] = this.pin(number);
    return port.pinState(bit) === PinState.High;
  }

  /** Whether the chip drives a pin low or high at all. */
  isOutput(number: number): boolean {
    const [port, bit] = this.pin(number);
    const state = port.pinState(bit);
    return state === PinState.High || state === PinState.Low;
  }

  /** Puts a level on a pin from outside. */
  setPin(number: number, high: boolean): void {
    this.outside.set(number, high);
    const [port, bit] = this.pin(number);
    port.setPin(bit, high);
  }
}
