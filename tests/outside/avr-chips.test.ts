/**
 * The emulated chips' memory, registers and interrupts against avr-libc's headers (iom328p.h, iom2560.h, iom32u4.h), by the compiler's
 * own preprocessor.
 */
import { describe, expect, test } from 'vitest';
import { CHIP_MODELS } from '../../src/rehearsal/chip-models.js';
import { BOARDS } from '../../src/vehicle/boards.js';
import { AVR_BOARDS, evaluate } from './avr-compiler.js';

describe.each(Object.entries(CHIP_MODELS))('emulated %s against avr-libc', (mcu, model) => {
  const board = AVR_BOARDS.find(({ core }) => core?.mcu === mcu)!;
  const address = (register: string): string => `(int)&${register}`;

  test('memory, ports, converter, watchdog', () => {
    const names = Object.keys(model.ports);
    const [flashEnd, ramStart, ramEnd, mux5, adc, wdt, ...ports] = evaluate(board, [
      'FLASHEND',
      'RAMSTART',
      'RAMEND',
      mcu === 'atmega328p' ? '0' : '_BV(MUX5)',
      'ADC_vect_num',
      'WDT_vect_num',
      ...names.flatMap((name) => ['PIN', 'DDR', 'PORT'].map((kind) => address(kind + name))),
    ]);
    expect(2 * model.flashWords).toBe(flashEnd! + 1);
    expect(model.ramStart).toBe(ramStart);
    expect(model.ramStart + model.ramBytes - 1).toBe(ramEnd);
    expect(model.mux5).toBe(mux5);
    expect(model.adc.adcInterrupt).toBe(2 * adc!);
    expect(model.watchdog.watchdogInterrupt).toBe(2 * wdt!);
    expect(Object.values(model.ports).flatMap(({ PIN, DDR, PORT }) => [PIN, DDR, PORT])).toEqual(ports);
    const { ADMUX, ADCSRA, ADCSRB, ADCL, ADCH } = model.adc;
    expect([ADMUX, ADCSRA, ADCSRB, ADCL, ADCH]).toEqual(
      evaluate(board, ['ADMUX', 'ADCSRA', 'ADCSRB', 'ADCL', 'ADCH'].map(address)),
    );
  });

  test('timers: registers, interrupts, pins', () => {
    for (const timer of model.timers) {
      const number = timer.TIFR - 0x35;
      const wide = timer.bits === 16;
      const registers = [
        'TIFR#',
        'TIMSK#',
        'TCCR#A',
        'TCCR#B',
        'TCNT#',
        'OCR#A',
        'OCR#B',
        ...(wide ? ['ICR#'] : []),
      ];
      const vectors = ['COMPA', 'COMPB', 'OVF'].map((kind) => `TIMER${number}_${kind}_vect_num`);
      const { TIFR, TIMSK, TCCRA, TCCRB, TCNT, OCRA, OCRB, ICR } = timer;
      const known = [TIFR, TIMSK, TCCRA, TCCRB, TCNT, OCRA, OCRB, ...(wide ? [ICR] : [])];
      expect(known).toEqual(
        evaluate(
          board,
          registers.map((each) => address(each.replace('#', String(number)))),
        ),
      );
      expect(
        [timer.compAInterrupt, timer.compBInterrupt, timer.ovfInterrupt].map((each) => each / 2),
      ).toEqual(evaluate(board, vectors));
      if (timer.OCRC > 0) expect(timer.OCRC).toBe(evaluate(board, [address(`OCR${number}C`)])[0]);
      for (const pin of board.pins.filter(({ pwm }) => pwm?.timer === number)) {
        const { A, B, C } = {
          A: [timer.compPortA, timer.compPinA],
          B: [timer.compPortB, timer.compPinB],
          C: [timer.compPortC, timer.compPinC],
        };
        const place = { A, B, C }[pin.pwm!.channel];
        expect(place).toEqual([model.ports[pin.port!.name]!.PORT, pin.port!.bit]);
      }
    }
  });

  test('external and pin-change interrupts', () => {
    for (const port of Object.values(model.ports)) {
      for (const each of port.externalInterrupts.filter((one) => one !== null))
        expect([each.EICR, each.interrupt / 2]).toEqual(
          evaluate(board, [address(each.index < 4 ? 'EICRA' : 'EICRB'), `INT${each.index}_vect_num`]),
        );
      if (port.pinChange === undefined) continue;
      const { PCMSK, PCIE, pinChangeInterrupt } = port.pinChange;
      expect([PCMSK, pinChangeInterrupt / 2]).toEqual(
        evaluate(board, [address(`PCMSK${PCIE}`), `PCINT${PCIE}_vect_num`]),
      );
    }
  });
});

test('timer 4 of the ATmega32U4: registers and bits', () => {
  const { leonardo } = BOARDS;
  const registers = ['TCCR4A', 'TCCR4B', 'TCCR4C', 'OCR4A', 'OCR4C', 'OCR4D'];
  expect(
    evaluate(
      leonardo,
      registers.map((each) => `(int)&${each}`),
    ),
  ).toEqual([0xc0, 0xc1, 0xc2, 0xcf, 0xd1, 0xd2]);
  expect(evaluate(leonardo, ['_BV(COM4A1)', '_BV(COM4D1)', '(int)&PLLCSR', '_BV(PLOCK)'])).toEqual([
    0x80, 0x08, 0x49, 0x01,
  ]);
});
