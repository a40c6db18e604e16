/**
 * The drawn vehicles on which speeds are proven, each on the proving lane or, every other one, on its mirror image.
 *
 * A vehicle that is not symmetrical and its image in a mirror get the same proof but for noise and for the rounding of the
 * integers: of the two, one is drawn, and for the other all is mirrored, the draws and the lane.
 */
import { type Lane, compileCourse } from '../course/lane.js';
import {
  type PlantParameters,
  drawnPlant,
  mirroredPlant,
  nominalPlant,
} from '../rehearsal/plant-parameters.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { provingCourse } from './proving-lane.js';

/** One vehicle and the lane that it drives. */
export interface DrawnVehicle {
  plant: PlantParameters;
  lane: Lane;
}

/** What tells a vehicle from its image, in one list; and the same of the image. */
function sides(vehicle: Vehicle): [own: number[], image: number[]] {
  const plant = nominalPlant(vehicle);
  const last = plant.positionsM.length - 1;
  const overrides = vehicle.control.overrides ?? [];
  const own = overrides.map(({ first, last, left, right }) => [first, last, left, right]);
  const image = overrides.map((each) => [last - each.last, last - each.first, each.right, each.left]);
  const flat = (rows: number[][]) => rows.toSorted((a, b) => a[0]! - b[0]! || a[1]! - b[1]!).flat();
  const listed = ({ trimLeft, trimRight, positionsM, ground, line }: PlantParameters) => {
    return [trimLeft, trimRight, ...positionsM, ...ground, ...line];
  };
  return [
    [...listed(plant), ...flat(own)],
    [...listed(mirroredPlant(plant)), ...flat(image)],
  ];
}

/** Whether of a vehicle and its image it is the one for which all is mirrored. */
function isImage(vehicle: Vehicle): boolean {
  const [own, image] = sides(vehicle);
  const differs = own.findIndex((value, i) => value !== image[i]);
  return differs >= 0 && own[differs]! > image[differs]!;
}

/** Gives drawn vehicles by their seeds. */
export class VehicleDraws {
  readonly lengthM: number;
  private readonly lanes: readonly [Lane, Lane];
  private readonly mirrored: boolean;
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
    this.mirrored = isImage(vehicle);
    const nominal = nominalPlant(vehicle);
    this.nominal = this.mirrored ? mirroredPlant(nominal) : nominal;
  }

  /** @param seed 0 for the vehicle of the sheet */
  drawn(seed: number): DrawnVehicle {
    const plant = drawnPlant(this.nominal, this.vehicle, seed);
    const lane = this.lanes[(seed + Number(this.mirrored)) % 2 === 0 ? 0 : 1];
    return { plant: this.mirrored ? mirroredPlant(plant) : plant, lane };
  }
}

/** How demanding a drawn vehicle is: fast for its command, slow to follow, little grip. */
export function demandRatio({ plant }: DrawnVehicle): number {
  const speed = ((plant.topLeftMps + plant.topRightMps) / 2) * plant.batteryFactor;
  return (speed * speed * Math.sqrt(plant.lagS)) / plant.grip;
}
