/**
 * What the boards with an 8-bit AVR chip at 16 MHz and 5 V have in common, as the Arduino AVR core sets them up.
 *
 * Sources: cores/arduino/wiring.c of that core: prescaler 64 for all timers, timer 0 fast PWM and counted by the millisecond clock,
 * the others phase-correct. The frequencies follow by the formulas of the chips' data sheets: 16 MHz / (64 * 256) = 976.6 Hz and
 * 16 MHz / (64 * 510) = 490.2 Hz.
 */
import type { BoardFacts } from '../board-facts.js';

const CLOCK_HZ = 16e6;
const TIMER_PRESCALER = 64;

export const FAST_PWM_HZ = CLOCK_HZ / (TIMER_PRESCALER * 256);
export const PHASE_CORRECT_PWM_HZ = CLOCK_HZ / (TIMER_PRESCALER * 510);

export const AVR_16_MHZ = {
  language: 'arduino',
  clockHz: CLOCK_HZ,
  logicV: 5,
  adcMaxCount: 1023,
  // 26 us of conversion and the call around it.
  adcReadS: 30e-6,
  digitalReadS: 5e-6,
  computeS: 400e-6,
  samplePeriodS: 2e-3,
  pwmHz: PHASE_CORRECT_PWM_HZ,
  pwmSteps: 255,
  clockTimer: 0,
} as const satisfies Partial<BoardFacts>;
