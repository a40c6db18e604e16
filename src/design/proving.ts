/**
 * Speeds by proof: class speeds are as fast as perturbed rehearsals of the twin keep the finish target.
 *
 * Two numbers scale what the limits allow: `top`, a cap on every class (how fast a straight may be when an
 * unseen bend follows), and `share`, a factor on the classes below it (how near the grip limit bends are
 * taken). Both are found in two stages:
 *
 * Screening: for each share the largest cap at which the most demanding of SCREENED drawn vehicles all finish, by bisection; of that
 * cap and two below it, the one with the shortest mean time of typical vehicles; of the shares, the one with the shortest.
 * Confirmation: other vehicles, as many as it takes to show the target with 95 % confidence when none of them is lost (Clopper and
 * Pearson 1934; 598 for 99.5 %), drive at those speeds, the most demanding first. When one is lost, speeds are lowered a step
 * and all drive again, the lost one first. Where a vehicle that is lost at one speed is lost at every higher one, the speeds that are found are too
 * high for the target no more often than the confidence says, however many steps it took: too high are those beyond the largest
 * speed that keeps the target, and none of them passes unless that very speed, or one as near to it as one likes, does.
 *
 * A slow vehicle on a long lane costs more samples a run; where the budget does not reach for all runs, fewer drive, and the proof
 * says which confidence they give. The budget is one of samples, not of time: the design is the same on every machine.
 */
import type { ControllerConstants } from '../controller/constants.js';
import { twinEngine } from '../rehearsal/twin-maker.js';
import { runsToShow, shownConfidenceShare } from '../statistics/rates.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import type { Proof } from './design.js';
import { type DrawnVehicle, VehicleDraws, demandRatio } from './drawn-vehicles.js';
import { LOWEST_TOP_SHARE, SHARES, type SpeedScale, type Timed, quickestScale } from './speed-search.js';

/** Samples that one trial of the screening and the confirmation may take, about: together a second or two on a machine of today's. */
const TRIAL_SAMPLES = 6e4;
const CONFIRMATION_SAMPLES = 7.5e5;
/** Vehicles drawn for screening; how many of the most demanding every trial must finish, and how many typical ones are timed. */
const SCREENED = 200;
const DEMANDING = 12;
const TYPICAL = 6;
const FEW_SHARES = [1, 0.84, 0.7];
/** Mean speed over a proving lane as a share of full wheel speed, about; and the fewest runs of a trial, and of a proof. */
const USUAL_TOP_SHARE = 0.5;
const FEWEST_RUNS = 4;
const FEWEST_CONFIRMING = 40;
/**
 * Speeds are lowered by this factor until the confirmation passes; the step grows by its own size every other time, so that a
 * vehicle that has to be much slower is not driven dozens of times.
 */
const STEP_DOWN = 0.975;
const MOST_STEPS = 20;
/** Simulated time allowed for the proving lane, in times of driving it at the lowest cap. */
const PATIENCE = 4;
/** Seed of the first vehicle of the confirmation: other vehicles than those of the screening. */
const CONFIRMING_SEED = 1001;

/** The scale that is left when nothing passes. */
export function slowestScale(vehicle: Vehicle): SpeedScale {
  return { top: LOWEST_TOP_SHARE * vehicle.drive.topSpeedMps, share: SHARES[SHARES.length - 1] as number };
}

const byDemand = (vehicles: DrawnVehicle[]) => vehicles.sort((a, b) => demandRatio(b) - demandRatio(a));

export class Proving {
  private readonly demanding: DrawnVehicle[];
  private readonly typical: DrawnVehicle[];
  private readonly confirming: DrawnVehicle[];
  private readonly timeLimitS: number;
  /** Shares that are tried. */
  private readonly shares: readonly number[];

  /** @param laneOf vehicle on whose proving lane is driven; by default its own */
  constructor(
    private readonly vehicle: Vehicle,
    laneOf: Vehicle = vehicle,
  ) {
    const draws = new VehicleDraws(vehicle, laneOf);
    const many = (first: number, runs: number) =>
      byDemand(Array.from({ length: runs }, (_, i) => draws.drawn(first + i)));
    const { topSpeedMps } = vehicle.drive;
    const samples = draws.lengthM / (USUAL_TOP_SHARE * topSpeedMps) / vehicle.board.samplePeriodS;
    const runs = Math.max(FEWEST_RUNS, Math.floor(TRIAL_SAMPLES / samples));
    const demandingRuns = Math.min(DEMANDING, Math.ceil(runs / 2));
    const screened = many(1, SCREENED);
    this.demanding = screened.slice(0, demandingRuns);
    const typical = Array.from(
      { length: TYPICAL },
      (_, i) => screened[Math.floor(((i + 0.5) * SCREENED) / TYPICAL)]!,
    );
    this.typical = [draws.drawn(0), ...typical].slice(0, Math.max(1, runs - demandingRuns));
    this.shares = runs < DEMANDING ? FEW_SHARES : SHARES;
    const affordable = Math.max(FEWEST_CONFIRMING, Math.floor(CONFIRMATION_SAMPLES / samples));
    this.confirming = many(CONFIRMING_SEED, Math.min(affordable, runsToShow(vehicle.speeds.finishTarget, 0)));
    this.timeLimitS = (PATIENCE * draws.lengthM) / (LOWEST_TOP_SHARE * topSpeedMps);
  }

  /** Mean time of the typical vehicles, s; undefined as soon as one of all does not finish. */
  meanTimeS(controller: ControllerConstants): number | undefined {
    const timeOf = this.timing(controller);
    if (!finishAll(this.demanding, timeOf)) return undefined;
    return this.typicalTimeS(controller);
  }

  /** Mean time of the typical vehicles, s; undefined when one does not finish. */
  private typicalTimeS(controller: ControllerConstants): number | undefined {
    const timeOf = this.timing(controller);
    let sum = 0;
    for (const each of this.typical) {
      const timeS = timeOf(each);
      if (timeS === undefined) return undefined;
      sum += timeS;
    }
    return sum / this.typical.length;
  }

  /** How many of the confirming vehicles finish, all of them driven. */
  proof(controller: ControllerConstants): Proof {
    const timeOf = this.timing(controller);
    const runs = this.confirming.length;
    const finished = this.confirming.filter((each) => timeOf(each) !== undefined).length;
    return this.proofOf(runs, finished);
  }

  private proofOf(runs: number, finished: number): Proof {
    const targetShare = this.vehicle.speeds.finishTarget;
    return {
      runs,
      finished,
      targetShare,
      confidenceShare: shownConfidenceShare(finished, runs, targetShare),
    };
  }

  /** The scale with the shortest time that keeps the target; undefined when even the slowest does not. */
  best(
    controllerAt: (scale: SpeedScale) => ControllerConstants,
  ): { scale: SpeedScale; proof: Proof } | undefined {
    const { topSpeedMps } = this.vehicle.drive;
    const screened: Timed | undefined = quickestScale(this.shares, topSpeedMps, {
      passes: (scale) => finishAll(this.demanding, this.timing(controllerAt(scale))),
      timeS: (scale) => this.typicalTimeS(controllerAt(scale)),
    });
    if (screened === undefined) return undefined;
    const slowest = slowestScale(this.vehicle);
    let { scale } = screened;
    for (let step = 0; step < MOST_STEPS; step++) {
      if (finishAll(this.confirming, this.timing(controllerAt(scale))))
        return { scale, proof: this.proofOf(this.confirming.length, this.confirming.length) };
      if (scale.top <= slowest.top) return undefined;
      const factor = STEP_DOWN ** (1 + Math.floor(step / 2));
      scale = this.lowered(scale, factor, slowest.top, controllerAt);
    }
    return undefined;
  }

  /** A step down: of the cap or of the share alone where that saves the vehicle that was lost, else of both. */
  private lowered(
    { top, share }: SpeedScale,
    factor: number,
    slowestTop: number,
    controllerAt: (scale: SpeedScale) => ControllerConstants,
  ): SpeedScale {
    const lower = { top: Math.max(slowestTop, top * factor), share: share * factor };
    const lost = this.confirming[0]!;
    const saves = (scale: SpeedScale) => this.timing(controllerAt(scale))(lost) !== undefined;
    return (
      [
        { top: lower.top, share },
        { top, share: lower.share },
      ].find(saves) ?? lower
    );
  }

  /** Drives a vehicle: its time, s, undefined when it is lost. */
  private timing(controller: ControllerConstants): (drawn: DrawnVehicle) => number | undefined {
    const engine = twinEngine(this.vehicle, controller);
    return ({ plant, lane }) => {
      const setup = { plant, lane, laps: 1, timeLimitS: this.timeLimitS, sampleTrace: false };
      const result = engine.runNow(setup);
      return result.loss ? undefined : result.timeS;
    };
  }
}

/** Whether all finish. One that does not most likely fails the next trial too: it comes first then. */
function finishAll(vehicles: DrawnVehicle[], timeOf: (drawn: DrawnVehicle) => number | undefined): boolean {
  const failing = vehicles.findIndex((each) => timeOf(each) === undefined);
  if (failing < 0) return true;
  vehicles.unshift(...vehicles.splice(failing, 1));
  return false;
}
