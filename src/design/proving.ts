/**
 * Speeds by proof: class speeds are lowered until perturbed rehearsals of the twin keep the finish target.
 *
 * Two numbers scale what the limits allow: `top`, a cap on every class (how fast a straight may be when an
 * unseen bend follows), and `share`, a factor on the classes below it (how near the grip limit bends are
 * taken). For each share the largest cap that passes is found by bisection; the pair with the shortest mean
 * time on the proving lane is taken. Runs are repeatable: their seeds are fixed.
 */
import { Twin } from '../controller/twin.js';
import type { ControllerConstants } from '../controller/constants.js';
import { type PlantParameters, perturbedPlant } from '../rehearsal/plant-parameters.js';
import { TwinEngine } from '../rehearsal/twin-engine.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { twinDelayS } from './delay.js';
import { provingLane } from './proving-lane.js';

/** Scales on class speeds. */
export interface SpeedScale {
  /** No class is faster, m/s. */
  top: number;
  /** Factor on every class speed, at most 1. */
  share: number;
}

/** Perturbed vehicles drawn, and how many of the most demanding of them every trial must finish. */
const DRAWN = 200;
const TRIED = 12;
const SHARES = [1, 0.95, 0.9, 0.84, 0.77, 0.7];
const BISECTIONS = 5;
/** Slowest cap tried, as a share of full wheel speed. */
const LOWEST_TOP_SHARE = 0.25;
/** Simulated time allowed for the proving lane, in times of driving it at the lowest cap. */
const PATIENCE = 4;

/** How demanding a drawn vehicle is: fast for its command, slow to follow, little grip. */
function demand(plant: PlantParameters): number {
  const speed = ((plant.topLeftMps + plant.topRightMps) / 2) * plant.batteryFactor;
  return (speed * speed * Math.sqrt(plant.lagS)) / plant.grip;
}

/** Vehicles on which the target is proven: from the drawn ones the most demanding that the target includes, and the nominal one. */
function triedPlants(vehicle: Vehicle): PlantParameters[] {
  const drawn = Array.from({ length: DRAWN }, (_, i) => perturbedPlant(vehicle, i + 1));
  drawn.sort((a, b) => demand(b) - demand(a));
  const excused = Math.floor(DRAWN * (1 - vehicle.speeds.finishTarget));
  return [...drawn.slice(excused, excused + TRIED), perturbedPlant(vehicle, 0)];
}

export class Proving {
  private readonly lane;
  private readonly plants: PlantParameters[];
  private readonly timeLimitS: number;

  constructor(private readonly vehicle: Vehicle) {
    this.lane = provingLane(vehicle);
    this.plants = triedPlants(vehicle);
    const slowest = LOWEST_TOP_SHARE * vehicle.drive.topSpeedMps;
    this.timeLimitS = (PATIENCE * this.lane.lengthM) / slowest;
  }

  /** Mean time over the tried vehicles, s; undefined as soon as one does not finish. */
  meanTimeS(controller: ControllerConstants): number | undefined {
    const { samplePeriodS, pwmSteps } = this.vehicle.board;
    const makeControl = () => {
      const twin = new Twin(controller);
      twin.start();
      return twin;
    };
    const engine = new TwinEngine(makeControl, { samplePeriodS, pwmSteps, delayS: twinDelayS(this.vehicle) });
    let sum = 0;
    for (const [i, plant] of this.plants.entries()) {
      const setup = { plant, lane: this.lane, laps: 1, timeLimitS: this.timeLimitS, sampleTrace: false };
      const result = engine.runNow(setup);
      if (result.loss) {
        // the vehicle that fails now most likely fails the next trial too: try it first
        this.plants.unshift(...this.plants.splice(i, 1));
        return undefined;
      }
      sum += result.timeS;
    }
    return sum / this.plants.length;
  }

  /** The scale with the shortest time that keeps the target; undefined when even the slowest does not. */
  best(controllerAt: (scale: SpeedScale) => ControllerConstants): SpeedScale | undefined {
    const full = this.vehicle.drive.topSpeedMps;
    let best: { scale: SpeedScale; timeS: number } | undefined;
    for (const share of SHARES) {
      let low = LOWEST_TOP_SHARE * full;
      let high = full;
      let found: { scale: SpeedScale; timeS: number } | undefined;
      for (let i = 0; i <= BISECTIONS; i++) {
        const top = i === 0 ? full : (low + high) / 2;
        const timeS = this.meanTimeS(controllerAt({ top, share }));
        if (timeS === undefined) {
          high = top;
          continue;
        }
        found = { scale: { top, share }, timeS };
        if (i === 0) break;
        low = top;
      }
      if (found && (best === undefined || found.timeS < best.timeS)) best = found;
      else if (best) break;
    }
    return best?.scale;
  }
}
