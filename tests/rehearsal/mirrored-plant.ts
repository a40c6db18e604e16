/** A simulated vehicle as seen in a mirror. */
import type { PlantParameters } from '../../src/rehearsal/plant-parameters.js';

export function mirroredPlant(plant: PlantParameters): PlantParameters {
  return {
    ...plant,
    topLeftMps: plant.topRightMps,
    topRightMps: plant.topLeftMps,
    trimLeft: plant.trimRight,
    trimRight: plant.trimLeft,
    driftLeft: plant.driftRight,
    driftRight: plant.driftLeft,
    frictionLeft: plant.frictionRight,
    frictionRight: plant.frictionLeft,
    positionsM: plant.positionsM.map((sideM) => -sideM).reverse(),
    kinds: plant.kinds.toReversed(),
    ground: plant.ground.toReversed(),
    line: plant.line.toReversed(),
    startLateralM: 0 - plant.startLateralM,
    startHeadingRad: 0 - plant.startHeadingRad,
    bumpLateralM: 0 - plant.bumpLateralM,
    bumpHeadingRad: 0 - plant.bumpHeadingRad,
  };
}
