/** A vehicle as seen in a mirror, and which of the two stands for both. */
import type { Vehicle } from './vehicle.js';

type Overrides = NonNullable<Vehicle['control']['overrides']>;

function mirroredOverrides(overrides: Overrides, sensorCount: number): Overrides {
  return overrides.map(({ first, last, left, right }) => ({
    first: sensorCount - 1 - last,
    last: sensorCount - 1 - first,
    left: right,
    right: left,
  }));
}

/** The vehicle as seen in a mirror. */
export function mirroredVehicle(vehicle: Vehicle): Vehicle {
  const { bar, drive, control, encoders } = vehicle;
  const { ground, line } = bar.calibration;
  return {
    ...vehicle,
    bar: {
      ...bar,
      positionsM: bar.positionsM.map((p) => 0 - p).toReversed(),
      kinds: bar.kinds.toReversed(),
      pins: bar.pins.toReversed(),
      calibration: { ...bar.calibration, ground: ground.toReversed(), line: line.toReversed() },
    },
    drive: {
      ...drive,
      left: drive.right,
      right: drive.left,
      trimLeft: drive.trimRight,
      trimRight: drive.trimLeft,
    },
    ...(encoders && { encoders: { ...encoders, left: encoders.right, right: encoders.left } }),
    control: {
      ...control,
      ...(control.overrides && {
        overrides: mirroredOverrides(control.overrides, bar.positionsM.length),
      }),
    },
  };
}

/** What tells a vehicle from its image, in one list. */
function sides({ bar, drive, control }: Vehicle): number[] {
  const overrides = (control.overrides ?? [])
    .map(({ first, last, left, right }) => [first, last, left, right])
    .toSorted((a, b) => a[0]! - b[0]! || a[1]! - b[1]!);
  const { ground, line } = bar.calibration;
  const digital = bar.kinds.map((kind) => Number(kind === 'digital'));
  return [
    drive.trimLeft,
    drive.trimRight,
    ...bar.positionsM,
    ...digital,
    ...ground,
    ...line,
    ...overrides.flat(),
  ];
}

/** Whether of a vehicle and its image it is the image: what is found by rehearsal is found on the other one, and holds for both. */
export function isImage(vehicle: Vehicle): boolean {
  const own = sides(vehicle);
  const image = sides(mirroredVehicle(vehicle));
  const differs = own.findIndex((value, i) => value !== image[i]);
  return differs >= 0 && own[differs]! > image[differs]!;
}
