/**
 * The drawn vehicles on which speeds are proven, each on the proving lane or, every other one, on its mirror image.
 */
import { type Lane, compileCourse } from '../course/lane.js';
import { type PlantParameters, drawnPlant, nominalPlant } from '../rehearsal/plant-parameters.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { provingCourse } from './proving-lane.js';

/** One vehicle and the lane that it drives. */
export interface DrawnVehicle {
  plant: PlantParameters;
  lane: Lane;
}

/** Gives drawn vehicles by their seeds. */
export class VehicleDraws {
  readonly lengthM: number;
  private readonly lanes: readonly [Lane, Lane];
  private readonly nominal: PlantParameters;

  /** @param laneOf vehicle on whose proving lane is driven */
  constructor(
    private readonly vehicle: Vehicle,
    laneOf: Vehicle,
  ) {
    const course = provingCourse(laneOf);
    const pieces = course.pieces.map((piece) =>
      'turnDeg' in piece ? { ...piece, turnDeg: -piece.turnDeg } : piece,
    );
    this.lanes = [compileCourse(course), compileCourse({ ...course, pieces })];
    this.lengthM = this.lanes[0].lengthM;
    this.nominal = nominalPlant(vehicle);
  }

  /** @param seed 0 for the vehicle of the sheet */
  drawn(seed: number): DrawnVehicle {
    return { plant: drawnPlant(this.nominal, this.vehicle, seed), lane: this.lanes[seed % 2 === 0 ? 0 : 1] };
  }
}

/** How demanding a drawn vehicle is: fast for its command, slow to follow, little grip. */
export function demandRatio({ plant }: DrawnVehicle): number {
  const speed = ((plant.topLeftMps + plant.topRightMps) / 2) * plant.batteryFactor;
  return (speed * speed * Math.sqrt(plant.lagS)) / plant.grip;
}
