/**
 * An ATmega328P at 16 MHz, instruction by instruction (avr8js): processor, timers 0 to 2, ports B to D, converter, watchdog.
 *
 * Pins by the numbers of the Arduino core (variants/standard/pins_arduino.h): 0 to 7 are port D, 8 to 13 port B, A0 to A5 (14 to
 * 19) port C. A watchdog reset starts the chip anew with its registers cleared and its memory kept, as the data sheet (8271H, Reset Sources) has
 * it; the emulator alone would only set the program counter.
 */
import {
  ADCMuxInputType,
  AVRADC,
  AVRClock,
  AVRIOPort,
  AVRTimer,
  AVRWatchdog,
  CPU,
  PinState,
  adcConfig,
  avrInstruction,
  portBConfig,
  portCConfig,
  portDConfig,
  timer0Config,
  timer1Config,
  timer2Config,
  watchdogConfig,
} from 'avr8js';

export const CLOCK_HZ = 16e6;

const FLASH_WORDS = 0x4000;
const SRAM_BYTES = 2048;
const SRAM_START = 0x100;
/** Reset flags and their register: power-on, watchdog. */
const MCUSR = 0x54;
const PORF = 0x01;
const WDRF = 0x08;

/** What is wired to the chip. */
export interface Wiring {
  /** The converter samples a channel; returns counts, 0 to 1023. */
  sample(channel: number): number;
  /** A pin may have changed its level or direction. */
  pinsChanged(): void;
}

export class Atmega328p {
  private cpu!: CPU;
  private ports!: { b: AVRIOPort; c: AVRIOPort; d: AVRIOPort };
  private cyclesBefore = 0;
  private resetPending = false;
  /** Levels that something outside puts on pins, by pin number. */
  private readonly outside = new Map<number, boolean>();
  /** Watchdog resets so far. */
  resets = 0;

  /** @param program flash memory from address 0, at most 32 KiB */
  constructor(
    private readonly program: Uint8Array,
    private readonly wiring: Wiring,
  ) {
    this.start(PORF);
  }

  /** Clock cycles since power-on. */
  get cycles(): number {
    return this.cyclesBefore + this.cpu.cycles;
  }

  private start(resetFlags: number, memory?: Uint8Array): void {
    const flash = new Uint16Array(FLASH_WORDS);
    new Uint8Array(flash.buffer).set(this.program);
    const cpu = new CPU(flash, SRAM_BYTES);
    if (memory) cpu.data.set(memory, SRAM_START);
    cpu.data[MCUSR] = resetFlags;
    this.ports = {
      b: new AVRIOPort(cpu, portBConfig),
      c: new AVRIOPort(cpu, portCConfig),
      d: new AVRIOPort(cpu, portDConfig),
    };
    for (const port of Object.values(this.ports)) port.addListener(() => this.wiring.pinsChanged());
    for (const timer of [timer0Config, timer1Config, timer2Config]) new AVRTimer(cpu, timer);
    const adc = new AVRADC(cpu, adcConfig);
    adc.onADCRead = (input) => {
      const count = input.type === ADCMuxInputType.SingleEnded ? this.wiring.sample(input.channel) : 0;
      cpu.addClockEvent(() => adc.completeADCRead(count), adc.sampleCycles);
    };
    new AVRWatchdog(cpu, watchdogConfig, new AVRClock(cpu, CLOCK_HZ));
    cpu.reset = () => {
      this.resetPending = true;
    };
    this.cpu = cpu;
    for (const [pin, high] of this.outside) this.setPin(pin, high);
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

  private restart(): void {
    this.resetPending = false;
    this.resets++;
    this.cyclesBefore += this.cpu.cycles;
    this.start(WDRF, this.cpu.data.slice(SRAM_START));
    this.wiring.pinsChanged();
  }

  private pin(number: number): [port: AVRIOPort, bit: number] {
    if (number < 8) return [this.ports.d, number];
    if (number < 14) return [this.ports.b, number - 8];
    return [this.ports.c, number - 14];
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
