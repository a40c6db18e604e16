/** The controller of a design with all its class speeds scaled: the steering stays, and with it everything but the speeds. */
import type { ControllerConstants } from '../controller/constants.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { INT16_MAX, classSpeedUnits } from './scales.js';

/** @param factor on every class speed, above 0; no class gets faster than full wheel speed */
export function scaledSpeeds(
  controller: ControllerConstants,
  { drive: { topSpeedMps } }: Vehicle,
  factor: number,
): ControllerConstants {
  const most = classSpeedUnits(topSpeedMps, topSpeedMps);
  const speeds = controller.classes.map(({ speed }) => Math.min(most, Math.round(speed * factor)));
  const classes = controller.classes.map((own, i) => {
    const wider = controller.classes[i - 1];
    const speed = speeds[i]!;
    // one speed for the whole class stays one speed
    if (wider === undefined || own.speedSlope === 0) return { ...own, speed };
    const gained = (speeds[i - 1]! - speed) * (1 << controller.drive.slopeBits);
    const speedSlope = Math.min(INT16_MAX, Math.floor(gained / (own.curvature - wider.curvature)));
    return { ...own, speed, speedSlope };
  });
  return { ...controller, classes };
}
