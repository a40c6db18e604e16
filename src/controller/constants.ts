/**
 * The integers that make up one controller. The design computes them, the twin runs on them and the
 * firmware prints them: there is no second copy of any of these numbers.
 */
export * from './scales.js';

/** Where in the course of following a line the controller is. */
export const PHASE = { follow: 0, crossing: 1, gap: 2, search: 3, stopped: 4 } as const;
export type Phase = (typeof PHASE)[keyof typeof PHASE];

export interface SensingConstants {
  sensorCount: number;
  /** Every sensor is digital, and its reading 0 or 1. */
  digital: boolean;
  /**
   * Which sensors are digital, leftmost first. Beside analog ones they read 0 over ground and the converter's full scale over the line,
   * so that one arithmetic serves both kinds.
   */
  levels: readonly boolean[];
  /** Digital sensors: level of the pin over the line. */
  lineLevelHigh: boolean;
  /** Readings over ground, counts; leftmost first. Unused in a bar of digital sensors. */
  ground: readonly number[];
  /** Coverage per count above ground, negative where the line reads lower, in 1/2^CALIBRATION_BITS. */
  gain: readonly number[];
  /** sensorCount + 1 places: half way between neighbours, with one beyond each end; offset units. */
  gapMiddle: readonly number[];
  /** Half the distance between neighbours, same indices; offset units with GAP_HALF_BITS more bits. */
  gapHalf: readonly number[];
  /** Where an edge lies between two sensors, by the sum of their coverages; EDGE_ENTRIES values. */
  edgeTable: readonly number[];
  /** Coverage from which a sensor counts as on the line. */
  highCoverage: number;
  /** Coverage of an end sensor from which a line just outside the bar is still measured. */
  lowCoverage: number;
  /** Half the line width, offset units. */
  halfLine: number;
  /** Sum of coverages from which the bar lies on a crossing. */
  wideCoverage: number;
  /** Width of line reaching an end of the bar from which it is taken for a corner, offset units. */
  cornerWidth: number;
}

export interface ClassConstants {
  name: string;
  /** Largest curvature of the class, 1 / its smallest radius, curvature units. */
  curvature: number;
  /** Speed at that curvature, class speed units. */
  speed: number;
  /** Class speed gained per curvature unit below that, in 1/2^slopeBits; 0 where one speed serves the whole class. */
  speedSlope: number;
  /** Proportional gain: curvature units per input unit, in 1/2^gainBits. */
  proportional: number;
  /** Coefficient of the derivative filter, in 1/2^COEFFICIENT_BITS. */
  derivativeFilter: number;
  /** Derivative gain on the high-passed input, in 1/2^gainBits per 1/2^FILTER_BITS input unit. */
  derivative: number;
  /** Integral gain: what a sample at full speed adds for each input unit, in 1/2^(gainBits of the integral part); absent without one. */
  integral?: number;
}

/** The integral part of the steering law, against unequal motors. */
export interface IntegralConstants {
  /** Bits of the classes' integral gains. */
  gainBits: number;
  /** Largest integral part, and largest demand up to which it works: more than that is a bend; curvature units. */
  limit: number;
  /** Share of what saturation takes from the curvature that comes off the integral part in each sample, 1/2^INTEGRAL_BITS. */
  tracking: number;
}

export interface SteeringConstants {
  /** Bits of the gains. */
  gainBits: number;
  /** Coefficient of the filter on the curvature demand that picks the speed class. */
  demandFilter: number;
  /** Coefficient of the filter that remembers the curvature to hold over gaps and crossings. */
  holdFilter: number;
  /** Largest curvature commanded. */
  curvatureLimit: number;
  /** Curvature of the search for a lost line. */
  searchCurvature: number;
}

export interface DriveConstants {
  /** Speed at full duty, um/s: what the speeds are shares of. The arithmetic does without it. */
  fullSpeedUmS: number;
  /** Half the track width in m, in 1/2^TRACK_BITS. */
  halfTrack: number;
  /** Wheel speed up to which a wheel is left without duty, speed units. */
  wheelDead: number;
  /** Bits of the classes' speed slopes. */
  slopeBits: number;
  /** Motor model: share of a speed difference that a wheel makes up in one sample, 1/2^COEFFICIENT_BITS. */
  motorStep: number;
  /** Wheel speed command above the present speed when speeding up, speed units. */
  leadUp: number;
  /** Wheel speed command below the present speed when braking, speed units. */
  leadDown: number;
  /** Speed during the search for a lost line, class speed units. */
  searchSpeed: number;
  /** Duty at which each wheel begins to turn. */
  startDutyLeft: number;
  startDutyRight: number;
  /** Duty per speed unit above that, in 1/2^SLOPE_BITS. */
  slopeLeft: number;
  slopeRight: number;
}

/** The loop that holds each wheel to its speed; with encoders only. */
export interface WheelLoopConstants {
  /** One channel only: the direction is that of the wanted speed. */
  single: boolean;
  /** The window is 2^windowBits samples long. */
  windowBits: number;
  /** Most edges that one sample can hold. */
  edgeLimit: number;
  /** Speed that one edge in the window stands for, speed units in 1/2^edgeBits. */
  speedPerEdge: number;
  edgeBits: number;
  /** Speed for each speed of difference, in 1/2^WHEEL_GAIN_BITS. */
  proportional: number;
  /** What the integral gains in a sample for each speed of difference, in 1/2^COEFFICIENT_BITS. */
  integral: number;
  /** What it loses in a sample for each speed that the wheel cannot be given, in 1/2^COEFFICIENT_BITS. */
  tracking: number;
  /** Largest correction, speed units. */
  correctionLimit: number;
  /** Speed above which a wheel must turn, speed units, and samples without an edge after which it counts as blocked. */
  blockedSpeed: number;
  blockedSamples: number;
}

export interface MemoryConstants {
  /** Offset beyond which a vanished line has left by that side rather than ended in a gap. */
  sideOffset: number;
  /** Distance over which a vanished line is taken for a gap. */
  gapDistance: number;
  /** Distance over which a crossing may last. */
  crossingDistance: number;
  /** Samples that the search for a lost line may last. */
  searchSamples: number;
  /** Distance after a corner was seen within which a vanished line is looked for on the corner's side. */
  cornerDistance: number;
  /** Distance out of a bend before the vehicle speeds up. */
  releaseDistance: number;
}

/** One action for each run of sensors on the line, from sensor `first` to sensor `last`. */
export interface RuleConstants {
  /** Curvature per wheel-speed difference, in 1/2^RULE_CURVATURE_BITS. */
  curvatureFactor: number;
  /** Left wheel fractions by runIndex(first, last, sensorCount), 1/2^FRACTION_BITS of base speed. */
  left: readonly number[];
  /** Right wheel fractions, same indices. */
  right: readonly number[];
}

/** The turn of the bar across the line, for calibration by sweep. */
export interface SweepConstants {
  /** Duties of the two wheels' turn on the spot, 1/4096; the other wheel turns backward. */
  dutyLeft: number;
  dutyRight: number;
  /** Samples of the first turn to the left; then twice as many to the right. */
  turnSamples: number;
  /** Samples that the turn back to the line may last. */
  returnSamples: number;
  /** Offset within which the line counts as found again, offset units. */
  centreOffset: number;
  /** Least contrast of a sensor, counts. */
  minSpan: number;
}

/** Everything the controller needs. */
export interface ControllerConstants {
  kind: 'pid' | 'rules';
  samplePeriodUs: number;
  /** Samples from the button to the first motion. */
  countdownSamples: number;
  /** Samples that a run may last. */
  runLimitSamples: number;
  /** Present with calibration by sweep only. */
  sweep?: SweepConstants;
  sensing: SensingConstants;
  steering: SteeringConstants;
  drive: DriveConstants;
  memory: MemoryConstants;
  /** Present with encoders only. */
  wheelLoop?: WheelLoopConstants;
  classes: readonly ClassConstants[];
  /** Present where the law has an integral part. */
  integral?: IntegralConstants;
  /** Present with kind `rules` only. */
  rules?: RuleConstants;
}

/** Speed at full duty of a controller, m/s. */
export function fullSpeedMps({ drive }: ControllerConstants): number {
  return drive.fullSpeedUmS / 1e6;
}
