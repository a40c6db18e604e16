/** What the larger AVR chips have in common, from a few numbers each: ports, interrupts, timers as avr8js takes them. */
import {
  type AVRExternalInterrupt,
  type AVRPortConfig,
  type AVRTimerConfig,
  timer0Config,
  timer1Config,
} from 'avr8js';

/** Address of an interrupt vector, words. */
export const vector = (number: number): number => 2 * number;

export function port(pinAddress: number, more: Partial<AVRPortConfig> = {}): AVRPortConfig {
  return { PIN: pinAddress, DDR: pinAddress + 1, PORT: pinAddress + 2, externalInterrupts: [], ...more };
}

/** External interrupt n: EICRA holds 0 to 3, EICRB 4 to 7, two bits each. */
export function external(index: number): AVRExternalInterrupt {
  return {
    EICR: index < 4 ? 0x69 : 0x6a,
    EIMSK: 0x3d,
    EIFR: 0x3c,
    index,
    iscOffset: 2 * (index % 4),
    interrupt: vector(1 + index),
  };
}

/** A port all of whose pins have a pin-change interrupt. */
export function pinChange(group: number, number: number): Pick<AVRPortConfig, 'pinChange'> {
  return {
    pinChange: {
      PCIE: group,
      PCICR: 0x68,
      PCIFR: 0x3b,
      PCMSK: 0x6b + group,
      pinChangeInterrupt: vector(number),
      mask: 0xff,
      offset: 0,
    },
  };
}

type Output = readonly [port: AVRPortConfig, bit: number];

export function outputs(a: Output, b: Output, c?: Output): Partial<AVRTimerConfig> {
  return {
    compPortA: a[0].PORT,
    compPinA: a[1],
    compPortB: b[0].PORT,
    compPinB: b[1],
    compPortC: c?.[0].PORT ?? 0,
    compPinC: c?.[1] ?? 0,
    externalClockPort: 0,
    externalClockPin: 0,
  };
}

/** Timer 0 where its vectors are those of the larger chips. */
export function timer0(a: Output, b: Output): AVRTimerConfig {
  return {
    ...timer0Config,
    compAInterrupt: vector(21),
    compBInterrupt: vector(22),
    ovfInterrupt: vector(23),
    ...outputs(a, b),
  };
}

/** A 16-bit timer with three outputs. */
export function timer16(
  number: number,
  base: number,
  capture: number,
  a: Output,
  b: Output,
  c: Output,
): AVRTimerConfig {
  return {
    ...timer1Config,
    captureInterrupt: vector(capture),
    compAInterrupt: vector(capture + 1),
    compBInterrupt: vector(capture + 2),
    compCInterrupt: vector(capture + 3),
    ovfInterrupt: vector(capture + 4),
    TIFR: 0x35 + number,
    TIMSK: 0x6e + number,
    TCCRA: base,
    TCCRB: base + 1,
    TCCRC: base + 2,
    TCNT: base + 4,
    ICR: base + 6,
    OCRA: base + 8,
    OCRB: base + 0xa,
    OCRC: base + 0xc,
    OCFC: 8,
    OCIEC: 8,
    ...outputs(a, b, c),
  };
}
