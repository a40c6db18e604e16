/**
 * What unequal motors do to a law, and whether it takes an integral part to undo it.
 *
 * Wheels that run at 1 - g and 1 + g of their command turn the vehicle by 2 g / b for each metre driven, b the
 * track width. The law without an integral part answers with the curvature kp y, so that the vehicle settles with the line at
 *
 *   y = 2 g / (b kp)
 *
 * beside the bar's middle. While that is a small part of the view and of the line, an integral part would cost phase for nothing.
 *
 * A bend asks for a steady curvature too, and the bar cannot tell the two apart. So the integral part goes no further than
 * unequal motors can, and stands still where the law asks for more.
 */
import { fractionToPercent } from '../sheet/units.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { viewM } from './bar-view.js';
import type { SteeringGains } from './steering-loop.js';

/** Share of the view from which the steady offset takes an integral part, and from which it calls for a better trim. */
const INTEGRAL_SHARE = 0.2;
const LARGE_SHARE = 0.35;
/** Share of the line width from which the steady offset takes an integral part: the bar's middle is off the line. */
const INTEGRAL_LINE_SHARE = 0.5;
/** Room of the integral part over what the tolerance says. */
const BIAS_ROOM = 1.25;

interface Steered {
  vehicle: Vehicle;
  classes: readonly { gains: SteeringGains }[];
}

/** Curvature that motors at the ends of their tolerance add to every command, 1/m. */
export function biasCurvaturePerM({ tolerance, drive, encoders }: Vehicle): number {
  // held to their speeds, the wheels are equal
  if (encoders) return 0;
  return (2 * tolerance.motorGain) / drive.trackM;
}

/** Largest curvature of the integral part, and of the demand up to which it works, 1/m. */
export function integralLimitPerM(vehicle: Vehicle): number {
  return BIAS_ROOM * biasCurvaturePerM(vehicle);
}

/** Largest steady offset over the classes without an integral part, m. */
export function biasOffsetM({ vehicle, classes }: Steered): number {
  const weakest = Math.min(...classes.map((each) => each.gains.proportionalPerM2));
  return biasCurvaturePerM(vehicle) / weakest;
}

/** Whether the laws have an integral part. */
export function hasIntegral({ classes }: Pick<Steered, 'classes'>): boolean {
  return classes.some((each) => each.gains.integralDistanceM !== undefined);
}

/** Whether the steady offset is so large that it takes an integral part. */
export function needsIntegral(steered: Steered): boolean {
  const { vehicle } = steered;
  const allowedM = Math.min(INTEGRAL_SHARE * viewM(vehicle), INTEGRAL_LINE_SHARE * vehicle.line.widthM);
  return biasOffsetM(steered) > allowedM;
}

/** A remark where the offset is large and no integral part takes it away; none otherwise. */
export function biasRemarks(steered: Steered): string[] {
  const share = biasOffsetM(steered) / viewM(steered.vehicle);
  if (share < LARGE_SHARE || hasIntegral(steered)) return [];
  return [
    `Motors at the ends of their tolerance hold the line ${fractionToPercent(share).toFixed(0)} % of the view beside the bar's middle: measure both wheels and set /drive/trim, then lower /tolerances/motorGainPercent.`,
  ];
}
