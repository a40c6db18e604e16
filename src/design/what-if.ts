/**
 * Which change of hardware would help most: the design is done again with each change alone.
 *
 * The measure is the mean time of typical perturbed vehicles on the proving lane of the unchanged one; class
 * speeds are told beside it.
 */
import { mmToM } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { meanPitchM } from './bar-view.js';
import { classForBend } from './class-for-bend.js';
import { deriveDesign } from './derive.js';
import type { Design } from './design.js';
import { Proving } from './proving.js';
import { FairleadError } from '../sheet/problem.js';

/** One change and what it does. */
export interface WhatIf {
  change: string;
  /** Gain of speed in the fastest and in the tightest class of the lane, m/s; absent where nothing meets the sheet then. */
  topGainMps?: number;
  tightGainMps?: number;
  /** Change of the time on the proving lane, share; negative is faster. */
  timeChange?: number;
}

const FURTHER_AHEAD_M = mmToM(20);

/** The bar with one more sensor at each end. */
function widerBar(vehicle: Vehicle): Vehicle {
  const { bar } = vehicle;
  const pitch = meanPitchM(bar.positionsM);
  const ends = <T>(values: readonly T[]): T[] => [values[0] as T, ...values, values[values.length - 1] as T];
  const positionsM = ends(bar.positionsM);
  positionsM[0] = (positionsM[0] as number) + pitch;
  positionsM[positionsM.length - 1] = (positionsM[positionsM.length - 1] as number) - pitch;
  const { calibration } = bar;
  return {
    ...vehicle,
    bar: {
      ...bar,
      positionsM,
      kinds: ends(bar.kinds),
      pins: ends(bar.pins),
      calibration: { ...calibration, ground: ends(calibration.ground), line: ends(calibration.line) },
    },
  };
}

function scaledDrive(vehicle: Vehicle, part: 'lagS' | 'grip' | 'topSpeedMps', factor: number): Vehicle {
  return { ...vehicle, drive: { ...vehicle.drive, [part]: vehicle.drive[part] * factor } };
}

/** The changes that are tried, each alone. */
const CHANGES: readonly { change: string; apply: (vehicle: Vehicle) => Vehicle }[] = [
  {
    change: 'bar 20 mm further ahead',
    apply: (vehicle) => ({
      ...vehicle,
      bar: { ...vehicle.bar, aheadM: vehicle.bar.aheadM + FURTHER_AHEAD_M },
    }),
  },
  {
    change: 'bar 20 mm nearer',
    apply: (vehicle) => ({
      ...vehicle,
      bar: { ...vehicle.bar, aheadM: Math.max(0.02, vehicle.bar.aheadM - FURTHER_AHEAD_M) },
    }),
  },
  { change: 'one more sensor at each end', apply: widerBar },
  { change: 'motor time constant 25 % shorter', apply: (vehicle) => scaledDrive(vehicle, 'lagS', 0.75) },
  { change: 'motors 15 % faster', apply: (vehicle) => scaledDrive(vehicle, 'topSpeedMps', 1.15) },
  {
    change: '15 % more grip (softer or cleaner tyres)',
    apply: (vehicle) => scaledDrive(vehicle, 'grip', 1.15),
  },
  {
    change: 'all tolerances halved by measuring',
    apply: (vehicle) => {
      const { motorGain, lag, grip } = vehicle.tolerance;
      return { ...vehicle, tolerance: { motorGain: motorGain / 2, lag: lag / 2, grip: grip / 2 } };
    },
  },
];

function tightSpeedMps({ classes, vehicle }: Design): number {
  return classForBend(classes, vehicle.line.tightestRadiusM).speedMps;
}

/** Every change with its effect, the most helpful first. */
export function whatIf(design: Design): WhatIf[] {
  const { vehicle } = design;
  const timeS = new Proving(vehicle).meanTimeS(design.controller);
  const found = CHANGES.map(({ change, apply }): WhatIf => {
    const changed = apply(vehicle);
    try {
      const other = deriveDesign(changed, vehicle);
      const otherS = new Proving(changed, vehicle).meanTimeS(other.controller);
      return {
        change,
        topGainMps: other.classes[0]!.speedMps - design.classes[0]!.speedMps,
        tightGainMps: tightSpeedMps(other) - tightSpeedMps(design),
        ...(timeS !== undefined && otherS !== undefined && { timeChange: otherS / timeS - 1 }),
      };
    } catch (error) {
      if (error instanceof FairleadError) return { change };
      throw error;
    }
  });
  return found.toSorted((a, b) => (a.timeChange ?? Infinity) - (b.timeChange ?? Infinity));
}
