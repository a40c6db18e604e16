/**
 * What the boards with an 8-bit AVR chip at 16 MHz and 5 V have in common, as the Arduino AVR core sets them up.
 *
 * Sources: cores/arduino/wiring.c of that core: prescaler 64 for all timers, timer 0 fast PWM and counted by the millisecond clock,
 * the others phase-correct. The frequencies follow by the formulas of the chips' data sheets: 16 MHz / (64 * 256) = 976.6 Hz and
 * 16 MHz / (64 * 510) = 490.2 Hz.
 *
 * What the firmware changes: a 16-bit timer that alone serves the motors runs phase-correct up to a top of 400,
 * 16 MHz / (2 * 400) = 20 kHz, above hearing and within what drivers take; beside others timer 1 keeps near their frequency,
 * 16 MHz / (2 * 64 * 250) = 500 Hz, so that its period is one sample. An 8-bit timer stays: its next frequency, 3.9 kHz, is the
 * most audible of all, and the one after, 31.4 kHz, more than some drivers take. Timer 0 must stay, because the clock counts it.
 */
import type { BoardFacts, PwmMode, TimerFacts } from '../board-facts.js';

const CLOCK_HZ = 16e6;
const TIMER_PRESCALER = 64;

const FAST_PWM_HZ = CLOCK_HZ / (TIMER_PRESCALER * 256);
const PHASE_CORRECT_PWM_HZ = CLOCK_HZ / (TIMER_PRESCALER * 510);

const SAMPLE_PERIOD_S = 2e-3;

/** Top of the 16-bit timers at 20 kHz, and of timer 1 at 500 Hz. */
const ALONE_TOP = 400;
const SAMPLE_TOP = 250;

const CORE_PWM: PwmMode = { pwmHz: PHASE_CORRECT_PWM_HZ, dutySteps: 255, fastPwm: false, setUp: [] };

/** Mode 10 of a 16-bit timer (data sheet, Waveform Generation Mode): phase-correct up to ICRn. */
function phaseCorrect(timer: number, dutySteps: number, prescaler: 1 | 64): PwmMode {
  const clock = prescaler === 1 ? `_BV(CS${timer}0)` : `_BV(CS${timer}1) | _BV(CS${timer}0)`;
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

/** A 16-bit timer: mode 4 clears it on a compare match. */
export function wideTimer(timer: number): TimerFacts {
  return {
    timer,
    pwm: CORE_PWM,
    pwmAlone: phaseCorrect(timer, ALONE_TOP, 1),
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

/** The 8-bit timer 2: mode 2 clears it on a compare match. */
export const TIMER_2: TimerFacts = {
  timer: 2,
  pwm: CORE_PWM,
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

/** PWM frequencies of timers beside each other, Hz. */
export function timerPwmHz(timers: readonly TimerFacts[]): Record<number, number> {
  return Object.fromEntries(timers.map(({ timer, pwm }) => [timer, pwm.pwmHz]));
}

export const AVR_16_MHZ = {
  language: 'arduino',
  clockHz: CLOCK_HZ,
  logicV: 5,
  adcMaxCount: 1023,
  // 26 us of conversion and the call around it.
  adcReadS: 30e-6,
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
