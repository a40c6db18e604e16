/**
 * Rule tables: the wheel-speed proportion of each class is lowered until the swing that the table's steps can keep going stays
 * under the one that the sheet allows (`control.swingMm`), in every corner of the tolerance box.
 */
import { mToMm } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { tableGainPerM2 } from './class-constants.js';
import type { ClassBase } from './class-base.js';
import type { DesignedClass } from './design.js';
import { largestSwingM } from './rule-cycle.js';
import { bestLaw, givenGains, proportionalRange } from './steering-gains.js';

const BISECTIONS = 5;

/** The classes with laws that keep the swing; as they are with feedback, or where the sheet gives the gains. */
export function calmLaws(vehicle: Vehicle, bases: readonly ClassBase[]): ClassBase[] {
  if (vehicle.control.kind !== 'rules' || givenGains(vehicle)) return [...bases];
  const settings = bases.map(({ range, allowedMps, gains }) => ({
    name: range.name,
    minRadiusM: range.minRadiusM,
    speedMps: allowedMps,
    gains,
  }));
  const tableGain = tableGainPerM2(vehicle, settings);
  return bases.map((base) => calmLaw(vehicle, base, tableGain));
}

/** The largest proportional gain up to the present one that keeps the swing; the least that holds the bend where none does. */
function calmLaw(vehicle: Vehicle, base: ClassBase, tableGain: number): ClassBase {
  const { gains, allowedMps: speedMps, range } = base;
  const keepsSwing = (law: ClassBase['gains']): boolean =>
    largestSwingM(vehicle, { gains: law, speedMps }, tableGain) <= vehicle.control.swingM;
  if (keepsSwing(gains)) return base;
  let high = gains.proportionalPerM2;
  let low = Math.min(high, proportionalRange(vehicle, range.lawRadiusM)[0]);
  let calm = bestLaw(vehicle, speedMps, low).gains;
  for (let i = 0; keepsSwing(calm) && i < BISECTIONS; i++) {
    const middle = Math.sqrt(low * high);
    const tried = bestLaw(vehicle, speedMps, middle).gains;
    if (keepsSwing(tried)) [calm, low] = [tried, middle];
    else high = middle;
  }
  return { ...base, gains: calm };
}

/** A sentence for the classes that may swing more than the sheet allows; none with feedback. */
export function swingRemarks(vehicle: Vehicle, classes: readonly DesignedClass[]): string[] {
  if (vehicle.control.kind !== 'rules') return [];
  const tableGain = tableGainPerM2(vehicle, classes);
  const wide = classes.flatMap((each) => {
    const swingM = largestSwingM(vehicle, each, tableGain);
    const size = Number.isFinite(swingM) ? `${mToMm(swingM).toFixed(1)} mm` : 'until the line is lost';
    return swingM > vehicle.control.swingM ? [`${each.name} ${size}`] : [];
  });
  if (wide.length === 0) return [];
  return [
    `The table's steps may keep a swing going that is larger than the ${mToMm(vehicle.control.swingM)} mm of the sheet: ${wide.join(', ')}. More sensors, a shorter time constant, lower speeds or /control/stateMemory help.`,
  ];
}
