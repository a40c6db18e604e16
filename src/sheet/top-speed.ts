/**
 * Wheel surface speed at full duty and nominal battery voltage, without load:
 * v = pi * D * n * (U_nominal / U_rated), as a brush motor's no-load speed n is in proportion to its voltage.
 * Source: the linear motor line, e.g. MIT 2.007 motor pages.
 */
import type { Sheet } from './sheet-types.js';
import { mmToM, rpmToRadPerS } from './units.js';

/** In m/s. */
export function topSpeedMps(sheet: Pick<Sheet, 'drive' | 'power'>): number {
  const { wheelDiameterMm, motor } = sheet.drive;
  const wheelRadiusM = mmToM(wheelDiameterMm) / 2;
  return (wheelRadiusM * rpmToRadPerS(motor.noLoadRpm) * sheet.power.nominalV) / motor.ratedVoltageV;
}
