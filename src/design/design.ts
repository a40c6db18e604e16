/** What the design finds for one vehicle: the numbers of `derive`, and the controller that is rendered. */
import type { ControllerConstants } from '../controller/constants.js';
import type { LawBinding } from './law-binding.js';
import type { SampledController } from './sampled-controller.js';
import type { SteeringGains } from './steering-loop.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import type { WheelLoopDesign } from './wheel-loop-design.js';

/** One share of the delay between the floor and the motors, s. */
export interface DelayShare {
  name: string;
  delayS: number;
  source: string;
}

/** Loop robustness; the worst over the tolerance box unless said otherwise. */
export interface Margins {
  /** Factor by which the loop gain may rise. */
  gainMargin: number;
  phaseMarginDeg: number;
  /** Maximum sensitivity, max |1/(1+L)|. */
  ms: number;
}

/** Speed limits of a class, m/s. */
export interface SpeedLimits {
  motor: number;
  grip: number;
  view: number;
  control: number;
}

/** What the controller needs of a speed class. */
export interface ClassSettings {
  name: string;
  /** Smallest radius of the class, m. */
  minRadiusM: number;
  speedMps: number;
  gains: SteeringGains;
}

export interface DesignedClass extends ClassSettings {
  /** The law as designed; `gains` is the one that the firmware's integers stand for. */
  wantedGains: SteeringGains;
  limits: SpeedLimits;
  /** The least limit; `finish` where perturbed rehearsals asked for less, `sheet` where the speed is given. */
  limitedBy: keyof SpeedLimits | 'sheet' | 'finish';
  plant: { lookaheadM: number; speedMps: number; lagS: number; delayS: number; samplePeriodS: number };
  /** From lateral error (m) to commanded turn rate (rad/s), polynomials in z^-1. */
  controller: SampledController;
  /** At the nominal vehicle. */
  margins: Margins;
  /** Worst over the tolerance box. */
  worstMargins: Margins;
  /** What keeps the law from being stronger, and where. */
  binding: LawBinding;
}

/** One state of the bar and what is done in it. */
export interface RuleRow {
  /** One bit a sensor, the leftmost sensor highest. */
  state: number;
  kind: 'line' | 'wide' | 'none' | 'split' | 'impossible';
  /** Offsets of the line's centre that cause this state, m; absent when no single line does. */
  fromM?: number;
  toM?: number;
  /** Wheel speeds as fractions of base speed. */
  left: number;
  right: number;
}

/** What the rehearsals on the proving lane show about the finish target. */
export interface Proof {
  /** Drawn vehicles that drove at the speeds of the design, and how many of them finished. */
  runs: number;
  finished: number;
  /** The sheet's target. */
  targetShare: number;
  /** Confidence with which that shows the target, by Clopper and Pearson. */
  confidenceShare: number;
}

export interface Design {
  vehicle: Vehicle;
  proof: Proof;
  delay: { shares: DelayShare[]; totalS: number };
  /** The loop that holds each wheel to its speed; with encoders only. */
  wheelLoop?: WheelLoopDesign;
  classes: DesignedClass[];
  controller: ControllerConstants;
  /** What the person should know: assumptions, bends that are too tight, limits that bind. */
  remarks: string[];
}
