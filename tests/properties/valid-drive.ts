/** Random motors, wheels and batteries that fit together. */
import fc from 'fast-check';
import type { Sheet } from '../../src/sheet/sheet-types.js';
import { decimal } from './decimal.js';

export interface Drive {
  drive: Omit<Sheet['drive'], 'driver'>;
  power: Sheet['power'];
  topSpeedMps: number;
}

export const drive: fc.Arbitrary<Drive> = fc
  .record({
    ratedVoltageV: fc.constantFrom(3, 4.5, 6, 9, 12, 24),
    overdrive: decimal(0.7, 1.4, 2),
    sag: decimal(0.75, 1, 2),
    charge: decimal(1, 1.2, 2),
    wheelDiameterMm: decimal(20, 120),
    topSpeedMps: decimal(0.2, 5, 2),
    trackWidthMm: decimal(60, 300),
    massKg: decimal(0.1, 8, 2),
    gripCoefficient: decimal(0.3, 1.2, 2),
    timeConstantMs: fc.integer({ min: 10, max: 300 }),
    startDutyPercent: fc.integer({ min: 0, max: 37 }),
    stallCurrentA: decimal(0.2, 6, 2),
    trim: fc.record({
      leftPercent: fc.integer({ min: 85, max: 115 }),
      rightPercent: fc.integer({ min: 85, max: 115 }),
    }),
  })
  .map(({ ratedVoltageV, overdrive, sag, charge, wheelDiameterMm, topSpeedMps, ...rest }) => {
    const { trackWidthMm, massKg, gripCoefficient, timeConstantMs, startDutyPercent, stallCurrentA, trim } =
      rest;
    const volts = (factor: number): number => Math.round(ratedVoltageV * overdrive * factor * 100) / 100;
    const power = { nominalV: volts(1), fullV: volts(charge), emptyV: volts(sag) };
    const rpm = ((topSpeedMps * 60_000) / (Math.PI * wheelDiameterMm)) * (ratedVoltageV / power.nominalV);
    const noLoadRpm = Math.min(10_000, Math.max(20, Math.round(rpm)));
    const motor = { noLoadRpm, ratedVoltageV, timeConstantMs, startDutyPercent, stallCurrentA };
    return {
      drive: { trackWidthMm, wheelDiameterMm, massKg, gripCoefficient, motor, trim },
      power,
      topSpeedMps,
    };
  });
