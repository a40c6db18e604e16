/** What one vehicle has, as the controller's constants say it. */
import { type ControllerConstants, FULL_COVERAGE } from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';

/** What this vehicle has; the templates' only conditions. */
export interface Features {
  /** Some sensors, or all, read a voltage. */
  analog: boolean;
  /** Every sensor reads a level. */
  digital: boolean;
  /** Some read a voltage, some a level. */
  mixed: boolean;
  pid: boolean;
  rules: boolean;
  /** The steering law has an integral part. */
  integral: boolean;
  /** Calibration by sweep; else the readings are stored. */
  sweep: boolean;
  stored: boolean;
  /** Every sensor is either on or off the line: digital ones, or the rule table's view of analog ones. */
  binary: boolean;
  graded: boolean;
  /** Lanes cross, and the bar can tell. */
  crossings: boolean;
  severalClasses: boolean;
  /** The firmware reckons with shares of coverage, not only with sensors that are on or off the line. */
  coverages: boolean;
  /** More sensors than a byte has bits. */
  manySensors: boolean;
  /** Each wheel is held to its speed by an encoder. */
  encoders: boolean;
  /** The encoders tell the direction. */
  quadrature: boolean;
  /** A contact stops the vehicle. */
  stopInput: boolean;
  /** There is an LED: the vehicle's own, or the board's on a pin that the vehicle leaves free. */
  led: boolean;
  /** The firmware can tell a start after the supply broke down from switching on; MicroPython does not say. */
  brownOut: boolean;
}

/**
 * What the controller's constants say the vehicle has.
 *
 * @param led whether there is an LED
 */
export function featuresOf(
  controller: ControllerConstants,
  { language, stopInput }: Pick<Vehicle, 'language' | 'stopInput'>,
  led: boolean,
): Features {
  const { sensing, sweep, kind } = controller;
  const binary = sensing.digital || kind === 'rules';
  const crossings = sensing.wideCoverage <= sensing.sensorCount * FULL_COVERAGE;
  return {
    analog: !sensing.digital,
    digital: sensing.digital,
    mixed: !sensing.digital && sensing.levels.includes(true),
    pid: kind === 'pid',
    rules: kind === 'rules',
    integral: controller.integral !== undefined,
    sweep: sweep !== undefined,
    stored: !sensing.digital && sweep === undefined,
    binary,
    graded: !binary,
    crossings,
    severalClasses: controller.classes.length > 1,
    coverages: language === 'micropython' || !binary || sweep !== undefined || crossings,
    manySensors: sensing.sensorCount > 8,
    encoders: controller.wheelLoop !== undefined,
    quadrature: controller.wheelLoop?.single === false,
    stopInput: stopInput !== undefined,
    led,
    brownOut: language === 'arduino',
  };
}
