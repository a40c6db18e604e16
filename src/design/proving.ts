/**
 * Speeds by proof: class speeds are lowered until perturbed rehearsals of the twin keep the finish target.
 *
 * Two numbers scale what the limits allow: `top`, a cap on every class (how fast a straight may be when an
 * unseen bend follows), and `share`, a factor on the classes below it (how near the grip limit bends are
 * taken). For each share the largest cap that passes is found by bisection; the pair with the shortest mean
 * time on the proving lane is taken. Runs are repeatable: their seeds are fixed.
 */
import type { ControllerConstants } from '../controller/constants.js';
import { type PlantParameters, perturbedPlant } from '../rehearsal/plant-parameters.js';
import { twinEngine } from '../rehearsal/twin-maker.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { provingLane } from './proving-lane.js';

/** Scales on class speeds. */
export interface SpeedScale {
  /** No class is faster, m/s. */
  top: number;
  /** Factor on every class speed, at most 1. */
  share: number;
}

/**
 * Samples that a proof may take. A slow vehicle on a long lane takes more a run, so it gets fewer runs a trial: only its most
 * demanding vehicles, and fewer shares.
 */
const SAMPLE_BUDGET = 2.5e6;
/** Trials that a full search takes, about. */
const TRIALS = 30;

/** A scale and the mean time that it gives. */
interface Timed {
  scale: SpeedScale;
  timeS: number;
}

/** Perturbed vehicles drawn; how many of the most demanding every trial must finish, and how many typical ones are timed. */
const DRAWN = 200;
const DEMANDING = 12;
const TYPICAL = 8;
const SHARES = [1, 0.95, 0.9, 0.84, 0.77, 0.7];
const FEW_SHARES = [1, 0.84, 0.7];
const BISECTIONS = 5;
/** Caps below the largest passing one that are tried too. */
const SLOWER_TOPS = [0.95, 0.9, 0.85];
/** Slowest cap tried, as a share of full wheel speed. */
const LOWEST_TOP_SHARE = 0.25;
/** Mean speed over a proving lane as a share of full wheel speed, about; and the fewest runs of a trial. */
const USUAL_TOP_SHARE = 0.4;
const FEWEST_RUNS = 4;
/** Simulated time allowed for the proving lane, in times of driving it at the lowest cap. */
const PATIENCE = 4;

/** How demanding a drawn vehicle is: fast for its command, slow to follow, little grip. */
function demand(plant: PlantParameters): number {
  const speed = ((plant.topLeftMps + plant.topRightMps) / 2) * plant.batteryFactor;
  return (speed * speed * Math.sqrt(plant.lagS)) / plant.grip;
}

/** Vehicles on which the target is proven, and those whose time counts. */
function triedPlants(vehicle: Vehicle): { demanding: PlantParameters[]; typical: PlantParameters[] } {
  const drawn = Array.from({ length: DRAWN }, (_, i) => perturbedPlant(vehicle, i + 1));
  drawn.sort((a, b) => demand(b) - demand(a));
  const excused = Math.floor(DRAWN * (1 - vehicle.speeds.finishTarget));
  const typical = Array.from(
    { length: TYPICAL },
    (_, i) => drawn[Math.floor(((i + 0.5) * DRAWN) / TYPICAL)]!,
  );
  return {
    demanding: drawn.slice(excused, excused + DEMANDING),
    typical: [perturbedPlant(vehicle, 0), ...typical],
  };
}

/** The scale that is left when nothing passes. */
export function slowestScale(vehicle: Vehicle): SpeedScale {
  return { top: LOWEST_TOP_SHARE * vehicle.drive.topSpeedMps, share: SHARES[SHARES.length - 1] as number };
}

export class Proving {
  private readonly lane;
  private readonly demanding: PlantParameters[];
  private readonly typical: PlantParameters[];
  private readonly timeLimitS: number;

  /** Shares that are tried. */
  private readonly shares: readonly number[];

  /** @param laneOf vehicle on whose proving lane is driven; by default its own */
  constructor(
    private readonly vehicle: Vehicle,
    laneOf: Vehicle = vehicle,
  ) {
    this.lane = provingLane(laneOf);
    const { demanding, typical } = triedPlants(vehicle);
    const { topSpeedMps } = vehicle.drive;
    const samples = this.lane.lengthM / (USUAL_TOP_SHARE * topSpeedMps) / vehicle.board.samplePeriodS;
    const runs = Math.max(FEWEST_RUNS, Math.floor(SAMPLE_BUDGET / TRIALS / samples));
    const demandingRuns = Math.min(demanding.length, Math.ceil(runs / 2));
    this.demanding = demanding.slice(0, demandingRuns);
    this.typical = typical.slice(0, Math.max(1, runs - demandingRuns));
    this.shares = runs < demanding.length ? FEW_SHARES : SHARES;
    this.timeLimitS = (PATIENCE * this.lane.lengthM) / (LOWEST_TOP_SHARE * topSpeedMps);
  }

  /** Mean time of the typical vehicles, s; undefined as soon as one of all does not finish. */
  meanTimeS(controller: ControllerConstants): number | undefined {
    const engine = twinEngine(this.vehicle, controller);
    const timeOf = (plant: PlantParameters): number | undefined => {
      const setup = { plant, lane: this.lane, laps: 1, timeLimitS: this.timeLimitS, sampleTrace: false };
      const result = engine.runNow(setup);
      return result.loss ? undefined : result.timeS;
    };
    const failing = this.demanding.findIndex((plant) => timeOf(plant) === undefined);
    if (failing >= 0) {
      // the vehicle that fails now most likely fails the next trial too: try it first
      this.demanding.unshift(...this.demanding.splice(failing, 1));
      return undefined;
    }
    let sum = 0;
    for (const plant of this.typical) {
      const timeS = timeOf(plant);
      if (timeS === undefined) return undefined;
      sum += timeS;
    }
    return sum / this.typical.length;
  }

  /** The scale with the shortest time that keeps the target; undefined when even the slowest does not. */
  best(controllerAt: (scale: SpeedScale) => ControllerConstants): SpeedScale | undefined {
    let best: Timed | undefined;
    for (const share of this.shares) {
      const timeAt = (top: number) => this.meanTimeS(controllerAt({ top, share }));
      const found = this.quickestTop(share, timeAt);
      if (found && (best === undefined || found.timeS < best.timeS)) best = found;
      else if (best) break;
    }
    return best?.scale;
  }

  /** For one share, the cap with the shortest time: the largest that passes, or one a little below it. */
  private quickestTop(share: number, timeAt: (top: number) => number | undefined): Timed | undefined {
    let low = LOWEST_TOP_SHARE * this.vehicle.drive.topSpeedMps;
    const full = this.vehicle.drive.topSpeedMps;
    let high = full;
    let best: Timed | undefined;
    const tryTop = (top: number): boolean => {
      const timeS = timeAt(top);
      if (timeS !== undefined && (best === undefined || timeS < best.timeS))
        best = { scale: { top, share }, timeS };
      return timeS !== undefined;
    };
    let largest = tryTop(full) ? full : undefined;
    for (let i = 0; largest !== full && i < BISECTIONS; i++) {
      const top = (low + high) / 2;
      if (tryTop(top)) largest = low = top;
      else high = top;
    }
    // entering bends too fast costs more than the straights gain: the fastest cap need not be the quickest
    if (largest !== undefined) for (const factor of SLOWER_TOPS) tryTop(factor * largest);
    return best;
  }
}
