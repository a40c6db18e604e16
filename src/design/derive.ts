/** The design: from the SI vehicle to speed classes, laws and the controller that is rendered. */
import type { Vehicle } from '../vehicle/vehicle.js';
import { controllerConstants } from './controller-constants.js';
import { delayBudget } from './delay.js';
import type { Design, DesignedClass } from './design.js';
import { type ClassRange, bindingLimit, classRanges, speedLimits } from './speed-classes.js';
import { designLaw, lanePlantOf, marginsAt, worstMargins } from './steering-gains.js';
import { controllerOf } from './steering-loop.js';
import { EXIT, FairleadError } from '../sheet/problem.js';
import { mToMm } from '../sheet/units.js';

const NOMINAL = { gain: 1, lag: 1 };

/** One class: the limits, the speed, and the law for that speed. */
function designClass(vehicle: Vehicle, range: ClassRange): DesignedClass {
  const limits = speedLimits(vehicle, range);
  const binding = bindingLimit(limits);
  const speedMps = range.speedMps ?? limits[binding];
  const law = speedMps > 0 ? designLaw(vehicle, speedMps, range.lawRadiusM) : undefined;
  if (law === undefined) {
    throw new FairleadError('No design meets the sheet.', {
      exitCode: EXIT.noDesign,
      problems: [
        {
          pointer: range.speedMps === undefined ? '/line/tightestRadiusMm' : '/speeds/classes',
          message: `class ${range.name}: no steering keeps its margins on a bend of ${Math.round(mToMm(range.minRadiusM))} mm radius at ${speedMps.toFixed(2)} m/s.`,
          got: `control limit ${limits.control.toFixed(2)} m/s, view limit ${limits.view.toFixed(2)} m/s`,
          fix: 'Move the sensor bar further ahead, make it wider, take motors with a smaller time constant, or lower the speed.',
        },
      ],
    });
  }
  const plant = lanePlantOf(vehicle, speedMps, NOMINAL);
  return {
    name: range.name,
    minRadiusM: range.minRadiusM,
    speedMps,
    limits,
    limitedBy: range.speedMps === undefined ? binding : 'sheet',
    gains: law.gains,
    plant,
    controller: controllerOf(law.gains, speedMps, plant.samplePeriodS),
    margins: marginsAt(vehicle, speedMps, law.gains, NOMINAL),
    worstMargins: worstMargins(vehicle, speedMps, law.gains),
  };
}

/** Designs the controller of a vehicle; throws FairleadError with exit code 3 when nothing meets the sheet. */
export function deriveDesign(vehicle: Vehicle): Design {
  const classes = classRanges(vehicle).map((range) => designClass(vehicle, range));
  return {
    vehicle,
    delay: delayBudget(vehicle),
    classes,
    controller: controllerConstants(vehicle, classes),
    remarks: [],
  };
}
