/** The table of speed classes as the firmware holds it. */
import type { DesignedClass } from '../design/design.js';
import { mToMm } from '../sheet/units.js';
import { numberText } from './literals.js';
import type { FirmwareDesign } from './render.js';

export interface ClassRow {
  curvature: number;
  speed: number;
  speedSlope: number;
  derivativeFilter: number;
  proportional: number;
  derivative: number;
  /** 0 without an integral part. */
  integral: number;
  about: string;
}

const LIMIT_WORDS: Readonly<Record<DesignedClass['limitedBy'], string>> = {
  motor: 'limited by the motors',
  grip: 'limited by grip',
  view: 'limited by what the bar sees',
  control: 'limited by the margins of the steering',
  sheet: 'as speeds.classes says',
  finish: 'limited by the finish target',
};

/** One row a class, the fastest first. */
export function classRows(design: FirmwareDesign): ClassRow[] {
  return design.controller.classes.map((row, index) => {
    const designed = design.classes[index]!;
    const radius = numberText(mToMm(designed.minRadiusM), 3);
    const speed = numberText(designed.speedMps, 3);
    return {
      curvature: row.curvature,
      speed: row.speed,
      speedSlope: row.speedSlope,
      derivativeFilter: row.derivativeFilter,
      proportional: row.proportional,
      derivative: row.derivative,
      integral: row.integral ?? 0,
      about: `${row.name}: bends from ${radius} mm radius at ${speed} m/s, ${LIMIT_WORDS[designed.limitedBy]}`,
    };
  });
}
