/**
 * The chips that can be emulated, as data: memory, ports, timers, converter, watchdog.
 *
 * Addresses and interrupt vectors: avr-libc 2.0.0, iom328p.h, iom2560.h and iom32u4.h (tests/outside/avr-chips.test.ts compares). avr8js has its
 * own figures for the ATmega328P; vectors are counted in words of flash, two each.
 */
import {
  type ADCConfig,
  type AVRPortConfig,
  type AVRTimerConfig,
  type WatchdogConfig,
  adcConfig,
  portBConfig,
  portCConfig,
  portDConfig,
  timer0Config,
  timer1Config,
  timer2Config,
  watchdogConfig,
} from 'avr8js';
import { external, outputs, pinChange, port, timer0, timer16, vector } from './chip-model-parts.js';

export interface ChipModel {
  /** Flash, words of 16 bits. */
  flashWords: number;
  /** First address of the static RAM, and its size, bytes. */
  ramStart: number;
  ramBytes: number;
  /** Ports by their letter. */
  ports: Readonly<Record<string, AVRPortConfig>>;
  timers: readonly AVRTimerConfig[];
  /** It has the 10-bit high-speed timer 4 (chip-timer4.ts) and USB, whose clock generator has to report that it runs. */
  usb: boolean;
  adc: ADCConfig;
  /** Bit of ADCSRB that adds 8 to the channel; 0 on a chip with 8 channels. */
  mux5: number;
  watchdog: WatchdogConfig;
}

const ADC_LARGE: ADCConfig = { ...adcConfig, adcInterrupt: vector(29) };

const WATCHDOG: WatchdogConfig = { ...watchdogConfig, watchdogInterrupt: vector(12) };

const atmega328p: ChipModel = {
  flashWords: 0x4000,
  ramStart: 0x100,
  ramBytes: 2048,
  ports: { B: portBConfig, C: portCConfig, D: portDConfig },
  timers: [timer0Config, timer1Config, timer2Config],
  usb: false,
  adc: adcConfig,
  mux5: 0,
  watchdog: watchdogConfig,
};

const EXTERNAL_0_TO_3 = [0, 1, 2, 3].map(external);

function atmega2560Model(): ChipModel {
  const ports = {
    A: port(0x20),
    B: port(0x23, pinChange(0, 9)),
    C: port(0x26),
    D: port(0x29, { externalInterrupts: EXTERNAL_0_TO_3 }),
    E: port(0x2c, { externalInterrupts: [null, null, null, null, ...[4, 5, 6, 7].map(external)] }),
    F: port(0x2f),
    G: port(0x32),
    H: port(0x100),
    J: port(0x103),
    K: port(0x106, pinChange(2, 11)),
    L: port(0x109),
  };
  const { B, E, G, H, L } = ports;
  return {
    flashWords: 0x20000,
    ramStart: 0x200,
    ramBytes: 8192,
    ports,
    timers: [
      timer0([B, 7], [G, 5]),
      timer16(1, 0x80, 16, [B, 5], [B, 6], [B, 7]),
      {
        ...timer2Config,
        compAInterrupt: vector(13),
        compBInterrupt: vector(14),
        ovfInterrupt: vector(15),
        ...outputs([B, 4], [H, 6]),
      },
      timer16(3, 0x90, 31, [E, 3], [E, 4], [E, 5]),
      timer16(4, 0xa0, 41, [H, 3], [H, 4], [H, 5]),
      timer16(5, 0x120, 46, [L, 3], [L, 4], [L, 5]),
    ],
    usb: false,
    adc: ADC_LARGE,
    mux5: 0x08,
    watchdog: WATCHDOG,
  };
}

function atmega32u4Model(): ChipModel {
  const ports = {
    B: port(0x23, pinChange(0, 9)),
    C: port(0x26),
    D: port(0x29, { externalInterrupts: EXTERNAL_0_TO_3 }),
    E: port(0x2c, { externalInterrupts: [null, null, null, null, null, null, external(6)] }),
    F: port(0x2f),
  };
  const { B, C, D } = ports;
  return {
    flashWords: 0x4000,
    ramStart: 0x100,
    ramBytes: 2560,
    ports,
    // Of timer 3 only output A has a pin; B and C are led nowhere.
    timers: [
      timer0([B, 7], [D, 0]),
      timer16(1, 0x80, 16, [B, 5], [B, 6], [B, 7]),
      { ...timer16(3, 0x90, 31, [C, 6], [C, 6], [C, 6]), compPortB: 0, compPortC: 0 },
    ],
    usb: true,
    adc: ADC_LARGE,
    mux5: 0x20,
    watchdog: WATCHDOG,
  };
}

/** Models by the compiler's name of the chip. */
export const CHIP_MODELS: Readonly<Record<string, ChipModel>> = {
  atmega328p,
  atmega2560: atmega2560Model(),
  atmega32u4: atmega32u4Model(),
};
