/**
 * The whole way, in the order in which the data goes:
 *
 *   sheet (checked, defaults filled in) -> SI vehicle -> design -> files
 *
 * Everything here is pure; reading and writing stay with the commands.
 */
import { deriveDesign } from './design/derive.js';
import type { Design } from './design/design.js';
import type { ResolvedSheet } from './sheet/defaults.js';
import { toVehicle } from './sheet/to-vehicle.js';

/** The design of a checked sheet; throws FairleadError with exit code 3 when nothing meets it. */
export function designFor(sheet: ResolvedSheet): Design {
  return deriveDesign(toVehicle(sheet));
}
