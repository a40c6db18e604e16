/**
 * The whole way, in the order in which the data goes:
 *
 *   sheet (checked, defaults filled in) -> SI vehicle -> design -> files
 *
 * Everything here is pure; reading and writing stay with the commands.
 */
import { deriveDesign } from './design/derive.js';
import type { Design } from './design/design.js';
import { advice } from './design/smallest-change.js';
import type { ResolvedSheet } from './sheet/defaults.js';
import { EXIT, FairleadError } from './sheet/problem.js';
import { toVehicle } from './sheet/to-vehicle.js';

/** The design of a checked sheet; throws FairleadError with exit code 3 and what would help when nothing meets it. */
export function designFor(sheet: ResolvedSheet): Design {
  try {
    return deriveDesign(toVehicle(sheet));
  } catch (error) {
    if (error instanceof FairleadError && error.exitCode === EXIT.noDesign) throw withAdvice(error, sheet);
    throw error;
  }
}

/** A refusal by limits, with the smallest changes that would lift it. */
function withAdvice(refusal: FairleadError, sheet: ResolvedSheet): FairleadError {
  if (refusal.problems.every((problem) => problem.fix !== undefined)) return refusal;
  const found = advice(sheet);
  const problems = refusal.problems.map((problem, i, all) =>
    i === all.length - 1 ? { ...problem, ...found } : problem,
  );
  return new FairleadError(refusal.message, { exitCode: refusal.exitCode, problems, cause: refusal });
}
