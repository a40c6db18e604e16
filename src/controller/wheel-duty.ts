import { FULL_DUTY, SLOPE_BITS } from './constants.js';

/**
 * Duty for a wheel speed: the motor's dead zone and speed line, inverted.
 *
 * @param wheelSpeed speed units, positive forward
 * @param wheelDead speed up to which the wheel is left without duty, speed units
 * @param startDuty duty at which the wheel begins to turn, 1/4096
 * @param slope duty per speed unit above that, in 1/2^SLOPE_BITS
 * @returns -4096..4096
 */
export function wheelDuty(wheelSpeed: number, wheelDead: number, startDuty: number, slope: number): number {
  const size = wheelSpeed < 0 ? -wheelSpeed : wheelSpeed;
  if (size <= wheelDead) return 0;
  let duty = startDuty + ((size * slope) >> SLOPE_BITS);
  if (duty > FULL_DUTY) duty = FULL_DUTY;
  return wheelSpeed < 0 ? -duty : duty;
}
