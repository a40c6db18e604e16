/**
 * What unequal motors do to a law without an integral part.
 *
 * Wheels that run at 1 - g and 1 + g of their command turn the vehicle by 2 g / b for each metre driven, b the
 * track width. The law answers with the curvature kp y, so that the vehicle settles with the line at
 *
 *   y = 2 g / (b kp)
 *
 * beside the bar's middle. While that is a small part of the view, an integral part would cost phase for nothing.
 */
import type { Vehicle } from '../vehicle/vehicle.js';
import { viewM } from './bar-view.js';
import type { Design, DesignedClass } from './design.js';

/** Share of the view from which the steady offset calls for a better trim. */
const LARGE_SHARE = 0.35;

/** Largest steady offset over the classes, m. */
export function biasOffsetM({
  vehicle,
  classes,
}: {
  vehicle: Vehicle;
  classes: readonly DesignedClass[];
}): number {
  const weakest = Math.min(...classes.map((each) => each.gains.proportionalPerM2));
  return (2 * vehicle.tolerance.motorGain) / (vehicle.drive.trackM * weakest);
}

/** A remark where the offset is large; none otherwise. */
export function biasRemarks(design: Pick<Design, 'vehicle' | 'classes'>): string[] {
  const share = biasOffsetM(design) / viewM(design.vehicle);
  if (share < LARGE_SHARE) return [];
  return [
    `Motors at the ends of their tolerance hold the line ${(share * 100).toFixed(0)} % of the view beside the bar's middle: measure both wheels and set /drive/trim, then lower /tolerances/motorGainPercent.`,
  ];
}
