/**
 * The delay from the floor to the motors, itemised from what the generated firmware does in a sample.
 *
 * The sensors are read one after the other at the start of the sample, on AVR chips in the background by interrupts, so
 * that a reading is on average half a scan older than the end of the scan; the end of the scan starts the arithmetic;
 * a new duty takes effect on average half a PWM period after it is written, that of the slowest timer that serves a motor. The hold over one sample is part of the sampled plant, not of this delay.
 */
import { motorPwmHz, pwmWords } from '../vehicle/pwm-modes.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { adcClockOf, adcClockWords } from './adc-clock.js';
import type { DelayShare } from './design.js';

/** Time for the control arithmetic, worst case, s; with encoders that of the wheel loops too. */
export function controlS({ board, encoders }: Vehicle): number {
  return board.computeS + (encoders ? board.wheelLoopS : 0);
}

export function delayBudget(vehicle: Vehicle): { shares: DelayShare[]; totalS: number } {
  const { board, bar } = vehicle;
  const count = bar.positionsM.length;
  const clock = adcClockOf(vehicle);
  const analog = bar.kinds.filter((kind) => kind === 'analog').length;
  const scanS = analog * (clock?.readS ?? board.adcReadS) + (count - analog) * board.digitalReadS;
  const shares: DelayShare[] = [
    {
      name: 'scan',
      delayS: scanS / 2,
      source: `half of ${count} ${bar.kind} readings one after the other${clock ? `, converter at ${adcClockWords(clock)}` : ''}`,
    },
    { name: 'compute', delayS: controlS(vehicle), source: 'control arithmetic, worst case of the board' },
    {
      name: 'pwm',
      delayS: 0.5 / motorPwmHz(vehicle),
      source: `half a PWM period until the new duty acts; ${pwmWords(vehicle)}`,
    },
  ];
  return { shares, totalS: shares.reduce((sum, share) => sum + share.delayS, 0) };
}

/** The delay with which the twin is rehearsed: the budget, within one sample, s. */
export function twinDelayS(vehicle: Vehicle): number {
  return Math.min(delayBudget(vehicle).totalS, 0.99 * vehicle.board.samplePeriodS);
}

/** Longest time from the opening of the stop input's contact to motors off, s: it is read once a sample, before the motors. */
export function stopBoundS(vehicle: Vehicle): number {
  return vehicle.board.samplePeriodS + delayBudget(vehicle).totalS;
}
