/**
 * The speed at which a controller takes a steady bend, from the very constants that it runs on.
 *
 * Between the smallest radius of its class and that of the next wider one the speed rises with falling
 * curvature kappa: v = v_class + slope (kappa_class - kappa); a slope of 0 makes steps (controller/twin.ts).
 */
import {
  CLASS_SPEED_BITS,
  CURVATURE_PER_INV_M,
  type ControllerConstants,
  fullSpeedMps,
} from '../controller/constants.js';

/**
 * @param radiusM radius of the bend, above 0, m
 * @returns speed of the axle's middle, m/s
 */
export function drivenSpeedMps(controller: ControllerConstants, radiusM: number): number {
  const { classes, drive } = controller;
  const last = classes[classes.length - 1]!;
  const curvature = Math.min(CURVATURE_PER_INV_M / radiusM, last.curvature);
  const serving = classes.find((each) => curvature <= each.curvature) ?? last;
  const gained = ((serving.curvature - curvature) * serving.speedSlope) / (1 << drive.slopeBits);
  return ((serving.speed + gained) / (1 << CLASS_SPEED_BITS)) * fullSpeedMps(controller);
}
