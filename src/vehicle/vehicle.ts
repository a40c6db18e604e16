/** The vehicle in SI units: what the design, the controller and the rehearsal work with. */
import type { BoardFacts, PinFacts } from './board-facts.js';
import type { Encoders } from './encoder.js';

/** Pins of one motor, resolved on the board. */
export interface MotorWiring {
  pwm?: PinFacts;
  dir?: PinFacts;
  in1?: PinFacts;
  in2?: PinFacts;
  inverted: boolean;
}

export interface Vehicle {
  name: string;
  board: BoardFacts;
  language: 'arduino' | 'micropython';
  line: {
    polarity: 'light-on-dark' | 'dark-on-light';
    widthM: number;
    tightestRadiusM: number;
    /** 0 when the lanes have no gap. */
    longestGapM: number;
    crossings: boolean;
  };
  bar: {
    kind: 'analog' | 'digital' | 'mixed';
    /** Kind of each sensor, leftmost first. */
    kinds: readonly ('analog' | 'digital')[];
    /** Position of each sensor left of the centre line, m; leftmost first, so descending. */
    positionsM: readonly number[];
    /** Distance from axle to bar, m. */
    aheadM: number;
    spotRadiusM: number;
    pins: readonly PinFacts[];
    /** Level of a digital sensor's pin over the line. */
    lineLevel: 'high' | 'low';
    calibration: {
      mode: 'stored' | 'sweep';
      /**
       * Readings over ground and line, counts; with a sweep and none given, those of a typical sensor. Digital sensors: 0 and 1; beside
       * analog ones 0 and full scale, whatever their level.
       */
      ground: readonly number[];
      line: readonly number[];
    };
  };
  drive: {
    trackM: number;
    wheelDiameterM: number;
    massKg: number;
    grip: number;
    /** Wheel surface speed at full duty and nominal battery voltage, m/s. */
    topSpeedMps: number;
    /** Motor time constant, s. */
    lagS: number;
    /** Duty at which the wheels begin to turn, 0..1, at nominal voltage. */
    startDuty: number;
    stallCurrentA: number;
    /** Resistance of one motor, rated voltage over stall current, ohm. */
    windingOhm: number;
    scheme: 'pwm-dir' | 'pwm-in-in' | 'dual-pwm';
    left: MotorWiring;
    right: MotorWiring;
    standby?: PinFacts;
    /** Highest PWM frequency that the driver takes, Hz. */
    maxPwmHz: number;
    /** Factor on each wheel's duty, 1 = none. */
    trimLeft: number;
    trimRight: number;
  };
  /** Wheel encoders, where the vehicle has them. */
  encoders?: Encoders;
  /** A contact to ground, closed while the vehicle may move; where the vehicle has one. */
  stopInput?: PinFacts;
  /** An LED of the vehicle's own, in place of the board's. */
  led?: { pin: PinFacts; activeLow: boolean };
  power: { nominalV: number; fullV: number; emptyV: number };
  control: {
    kind: 'pid' | 'rules';
    /** Rules: whether the change of state damps the steering. */
    stateMemory: boolean;
    /** Rules: largest swing about the line that the table's steps may keep going, at the bar, m. */
    swingM: number;
    /** Steering gains given in the sheet, for every class. */
    gains?: {
      proportionalPerM2: number;
      derivativeTimeS: number;
      filterTimeS: number;
      integralDistanceM?: number;
    };
    /** Whether the laws have an integral part; left to the design where absent. */
    integral?: 'always' | 'never';
    /** Actions given in the sheet for runs of sensors on the line: wheel speeds as fractions of base speed. */
    overrides?: readonly { first: number; last: number; left: number; right: number }[];
  };
  speeds: {
    classes: 'auto' | readonly { name: string; minRadiusM: number; speedMps: number }[];
    /** Share of perturbed rehearsals that must finish, 0..1. */
    finishTarget: number;
  };
  start: { button: PinFacts; countdownS: number; runLimitS: number };
  /** Relative half-widths, 0..1. */
  tolerance: { motorGain: number; lag: number; grip: number };
}
