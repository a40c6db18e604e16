/**
 * What the boards with an 8-bit AVR chip at 16 MHz and 5 V have in common, as the Arduino AVR core sets them up.
 *
 * Sources: cores/arduino/wiring.c of that core: prescaler 64 for all timers, timer 0 fast PWM and counted by the millisecond clock,
 * the others phase-correct. The frequencies follow by the formulas of the chips' data sheets: 16 MHz / (64 * 256) = 976.6 Hz and
 * 16 MHz / (64 * 510) = 490.2 Hz.
 *
 * What the firmware changes (pwm-modes.ts chooses): a 16-bit timer runs phase-correct up to a top that gives any frequency, 20 kHz
 * with a top of 400. An 8-bit timer has, with its clock undivided, 16 MHz / 510 = 31.4 kHz; divided by 8 it would be 3.9 kHz, the most
 * audible of all. Where neither can be had, timer 1 keeps near the core's frequency, 16 MHz / (2 * 64 * 250) = 500 Hz, so that its
 * period is one sample. Timer 0 must stay, because the clock counts it. The clock of timer 4 of the ATmega32U4 stays as the core has it.
 */
import type { AdcClock, BoardFacts, PwmMode, TimerFacts } from '../board-facts.js';

const CLOCK_HZ = 16e6;
const TIMER_PRESCALER = 64;

const FAST_PWM_HZ = CLOCK_HZ / (TIMER_PRESCALER * 256);
const PHASE_CORRECT_PWM_HZ = CLOCK_HZ / (TIMER_PRESCALER * 510);

const SAMPLE_PERIOD_S = 2e-3;

/** Largest top of a free 16-bit timer: times 16 it fits 16 bits, as the firmware's duty takes it. */
const LARGEST_TOP = 2047;
/** Top of timer 1 at 500 Hz. */
const SAMPLE_TOP = 250;

const CORE_PWM: PwmMode = { pwmHz: PHASE_CORRECT_PWM_HZ, dutySteps: 255, fastPwm: false, setUp: [] };

/** Mode 10 of a 16-bit timer (data sheet, Waveform Generation Mode): phase-correct up to ICRn. */
function phaseCorrect(timer: number, dutySteps: number, prescaler: 1 | 8 | 64): PwmMode {
  const clocks = {
    1: `_BV(CS${timer}0)`,
    8: `_BV(CS${timer}1)`,
    64: `_BV(CS${timer}1) | _BV(CS${timer}0)`,
  };
  const clock = clocks[prescaler];
  return {
    pwmHz: CLOCK_HZ / (2 * prescaler * dutySteps),
    dutySteps,
    fastPwm: false,
    setUp: [
      `TCCR${timer}A = _BV(WGM${timer}1);`,
      `TCCR${timer}B = _BV(WGM${timer}3) | ${clock};`,
      `ICR${timer} = ${dutySteps};`,
    ],
  };
}

/** Mode of a 16-bit timer with the frequency next to `pwmHz`, not above it, and as many steps as there can be. */
export function wideTimerPwm(timer: number, pwmHz: number): PwmMode {
  const topAt = (prescaler: number) => Math.ceil(CLOCK_HZ / (2 * prescaler * pwmHz) - 1e-9);
  const prescaler = ([1, 8, 64] as const).find((each) => topAt(each) <= LARGEST_TOP) ?? 64;
  return phaseCorrect(timer, topAt(prescaler), prescaler);
}

/** A 16-bit timer: mode 4 clears it on a compare match. */
export function wideTimer(timer: number): TimerFacts {
  return {
    timer,
    pwm: CORE_PWM,
    free: {},
    tick: {
      vector: `TIMER${timer}_COMPA_vect`,
      setUp: [
        `TCCR${timer}A = 0;`,
        `TCCR${timer}B = _BV(WGM${timer}2) | _BV(CS${timer}1);`,
        `OCR${timer}A = ${(CLOCK_HZ / 8) * SAMPLE_PERIOD_S - 1};`,
        `TCNT${timer} = 0;`,
        `TIMSK${timer} = _BV(OCIE${timer}A);`,
      ],
    },
  };
}

export const TIMER_1: TimerFacts = {
  ...wideTimer(1),
  pwm: phaseCorrect(1, SAMPLE_TOP, TIMER_PRESCALER),
  pwmTick: { vector: 'TIMER1_OVF_vect', setUp: ['TIMSK1 = _BV(TOIE1);'] },
};

/** Mode 1 of timer 2, phase-correct up to 255, with its clock undivided. */
const UNDIVIDED_HZ = CLOCK_HZ / 510;
const UNDIVIDED_PWM_2: PwmMode = {
  pwmHz: UNDIVIDED_HZ,
  dutySteps: 255,
  fastPwm: false,
  setUp: ['TCCR2A = _BV(WGM20);', 'TCCR2B = _BV(CS20);'],
};

/** The 8-bit timer 2: mode 2 clears it on a compare match. */
export const TIMER_2: TimerFacts = {
  timer: 2,
  pwm: CORE_PWM,
  free: { fixed: UNDIVIDED_PWM_2 },
  tick: {
    vector: 'TIMER2_COMPA_vect',
    setUp: [
      'TCCR2A = _BV(WGM21);',
      'TCCR2B = _BV(CS22) | _BV(CS21);',
      `OCR2A = ${(CLOCK_HZ / 256) * SAMPLE_PERIOD_S - 1};`,
      'TCNT2 = 0;',
      'TIMSK2 = _BV(OCIE2A);',
    ],
  },
};

export const TIMER_0: TimerFacts = {
  timer: 0,
  pwm: { pwmHz: FAST_PWM_HZ, dutySteps: 256, fastPwm: true, setUp: [] },
};

/** Timer 4 of the ATmega32U4, as the core sets it up; channel D has a control register of its own. */
export const TIMER_4_OF_32U4: TimerFacts = { timer: 4, pwm: CORE_PWM, controls: { D: 'TCCR4C' } };

/**
 * The converter's error by its clock: 2 counts up to 200 kHz, 4.5 at 1 MHz (Atmel 8161D, ADC Characteristics, table 28-7: absolute
 * accuracy); between them a straight line, our assumption.
 */
function adcErrorCounts(clockHz: number): number {
  return 2 + (2.5 * Math.max(0, clockHz - 200e3)) / 800e3;
}

/** One conversion takes 13 clocks (data sheet, Prescaling and Conversion Timing); the interrupts around it some 4 us. */
function adcClock(prescaler: number, select: string): AdcClock {
  const clockHz = CLOCK_HZ / prescaler;
  const errorCounts = adcErrorCounts(clockHz);
  return { clockHz, prescaler, select, errorCounts, readS: 13 / clockHz + 4e-6 };
}

/**
 * Full resolution needs 50 to 200 kHz, less resolution may do with more (data sheet, same section). 500 kHz is the most taken here:
 * the input has to charge in one and a half clocks, and sensors are no strong sources.
 */
const ADC_CLOCKS = [
  adcClock(32, '_BV(ADPS2) | _BV(ADPS0)'),
  adcClock(64, '_BV(ADPS2) | _BV(ADPS1)'),
  adcClock(128, '_BV(ADPS2) | _BV(ADPS1) | _BV(ADPS0)'),
];

/** PWM frequencies of timers beside each other, Hz. */
export function timerPwmHz(timers: readonly TimerFacts[]): Record<number, number> {
  return Object.fromEntries(timers.map(({ timer, pwm }) => [timer, pwm.pwmHz]));
}

export const AVR_16_MHZ = {
  language: 'arduino',
  clockHz: CLOCK_HZ,
  logicV: 5,
  adcMaxCount: 1023,
  adcClocks: ADC_CLOCKS,
  adcReadS: ADC_CLOCKS[0]!.readS,
  // some 60 cycles of interrupt, with the call around it
  edgeS: 5e-6,
  digitalReadS: 5e-6,
  // from the last reading to the motors' registers; tests/parity and tests/firmware/cost.test.ts measure it
  computeS: 150e-6,
  // tests/parity/chip.test.ts measures it
  wheelLoopS: 50e-6,
  samplePeriodS: SAMPLE_PERIOD_S,
  pwmHz: PHASE_CORRECT_PWM_HZ,
  pwmSteps: 255,
  clockTimer: 0,
} as const satisfies Partial<BoardFacts>;
