/** The engine that runs the twin of a design's controller. */
import type { ControllerConstants } from '../controller/constants.js';
import { Twin } from '../controller/twin.js';
import { twinDelayS } from '../design/delay.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { TwinEngine } from './twin-engine.js';
import { WheelEdges } from './wheel-edges.js';

/** An engine whose runs start with the controller about to drive off: button and countdown are over. */
export function twinEngine(vehicle: Vehicle, controller: ControllerConstants): TwinEngine {
  const { samplePeriodS, pwmSteps } = vehicle.board;
  const makeControl = (): Twin => {
    const twin = new Twin(controller);
    twin.start();
    return twin;
  };
  const { encoders, drive } = vehicle;
  return new TwinEngine(makeControl, {
    samplePeriodS,
    pwmSteps,
    delayS: twinDelayS(vehicle),
    ...(encoders && { makeEdges: () => new WheelEdges(encoders, drive.wheelDiameterM) }),
  });
}
