/**
 * Watches one run, the same way for every engine, and ends it.
 *
 * A run is finished when the axle's middle has passed the start line once for each lap, on an open lane when the bar has reached
 * the lane's end. It is lost when the axle is further from the lane than the bar can still see, when the firmware stops by itself,
 * when there is no progress, or at the time limit. Lap times run from start line to start line, interpolated between two steps;
 * the first lap is from standing and runs from the last moment before the vehicle set off.
 */
import type { Lane } from '../course/lane.js';
import type { Ending } from './ending.js';
import type { LossReason, RunResult, RunSetup } from './engine.js';
import type { PlantParameters } from './plant-parameters.js';
import type { Plant } from './plant.js';
import { TraceRecorder, type ControlState } from './trace-recorder.js';

/** The axle may be this far from the lane whatever the bar, m. */
const LEAST_LOST_M = 0.06;
/** Time without progress after which a vehicle that has set off is lost, s. */
const STUCK_S = 3;
/** Progress that counts, m. */
const PROGRESS_M = 0.01;
/** A vehicle has set off when it is this far along the lane, m; before that it may turn on the spot to calibrate. */
const SET_OFF_M = 0.02;
/** Time for start-up, countdown and calibration, s. */
const START_S = 15;
/** With faults: time after a loss in which the firmware may still stop the vehicle, s. */
const GIVE_UP_S = 10;
/** Below this speed the vehicle counts as standing, m/s. */
const STANDING_MPS = 0.005;

/** Distance of the axle from the lane beyond which a run is lost: half the bar and the line's width, or 60 mm, m. */
export function lostBeyondM(plant: PlantParameters, lane: Lane): number {
  const halfBarM = Math.max(...plant.positionsM.map(Math.abs));
  return Math.max(LEAST_LOST_M, halfBarM + lane.lineWidthM);
}

/** Arc length at which a lap ends for a vehicle with its bar this far ahead of the axle, m. */
export function lapEndM(lane: Lane, aheadM: number): number {
  return lane.closed ? lane.lengthM : Math.max(lane.lengthM / 2, lane.lengthM - aheadM);
}

export class RunMonitor {
  private readonly lapM: number;
  private readonly lostM: number;
  private readonly recorder: TraceRecorder | undefined;
  private readonly lapsS: number[] = [];
  private lapStartS = 0;
  private previousS = 0;
  private previousM = 0;
  private furthestM = 0;
  private furthestS = 0;
  private squareSum = 0;
  private maxLateralM = 0;
  private loss: RunResult['loss'];
  private finished = false;
  /** With faults: when the first of them comes, and when a motor was last driven, s. */
  private readonly firstFaultS: number | undefined;
  private drivenS = 0;
  /** Whether the firmware has stopped the vehicle. */
  stoppedByFirmware = false;

  constructor(
    private readonly plant: Plant,
    private readonly setup: Pick<RunSetup, 'laps' | 'timeLimitS' | 'sampleTrace' | 'faults'>,
  ) {
    this.firstFaultS = setup.faults && Math.min(...setup.faults.map(({ atS }) => atS));
    this.lapM = lapEndM(plant.lane, plant.parameters.aheadM);
    this.lostM = lostBeyondM(plant.parameters, plant.lane);
    this.recorder = setup.sampleTrace ? new TraceRecorder() : undefined;
  }

  get ended(): boolean {
    if (this.finished || this.loss === undefined) return this.finished;
    if (this.firstFaultS === undefined) return true;
    return this.stoppedByFirmware || this.plant.timeS > this.loss.timeS + GIVE_UP_S;
  }

  /**
   * To be called after each plant step, or at least every few milliseconds.
   *
   * @param state duties in force during the step, and what the controller was doing
   * @param stopped whether the firmware has stopped the vehicle by itself
   * @returns whether the run goes on
   */
  observe(state: ControlState, stopped: boolean): boolean {
    const { plant } = this;
    const { sM, lateralM } = plant.place;
    const dtS = plant.timeS - this.previousS;
    const distanceM = Math.abs(lateralM);
    if (this.loss === undefined) {
      this.squareSum += lateralM * lateralM * dtS;
      if (distanceM > this.maxLateralM) this.maxLateralM = distanceM;
    }

    if (sM > this.furthestM + PROGRESS_M) {
      this.furthestM = sM;
      this.furthestS = plant.timeS;
    }
    if (this.furthestM < SET_OFF_M && Math.abs(plant.speedMps) < STANDING_MPS) this.lapStartS = plant.timeS;
    const lineM = this.lapM * (this.lapsS.length + 1);
    if (sM >= lineM && this.loss === undefined)
      this.passLine((lineM - this.previousM) / (sM - this.previousM), dtS);
    if (state.dutyLeft !== 0 || state.dutyRight !== 0) this.drivenS = plant.timeS;
    if (stopped) this.stoppedByFirmware = true;
    if (!this.finished && this.loss === undefined) this.checkLost(distanceM, stopped);

    this.previousS = plant.timeS;
    this.previousM = sM;
    this.recorder?.record(plant, state, this.ended);
    return !this.ended;
  }

  /** The outcome; to be called when the run has ended. */
  result(): RunResult {
    const timeS = this.loss?.timeS ?? this.plant.timeS;
    return {
      seed: this.plant.parameters.seed,
      ...(this.loss === undefined ? {} : { loss: this.loss }),
      lapsS: this.lapsS,
      timeS,
      rmsLateralM: timeS > 0 ? Math.sqrt(this.squareSum / timeS) : 0,
      maxLateralM: this.maxLateralM,
      ...(this.firstFaultS !== undefined && { ending: this.ending(this.firstFaultS) }),
      ...(this.recorder === undefined ? {} : { trace: this.recorder.finish() }),
    };
  }

  /** What the pins told; the engine adds what the LED tells. */
  private ending(firstFaultS: number): Ending {
    const motorsOff = this.stoppedByFirmware;
    const reactionS = motorsOff ? Math.max(0, this.drivenS - firstFaultS) : null;
    return { motorsOff, reactionS, reason: null, restarted: false };
  }

  /** @param share how much of the last step had passed when the axle crossed the line */
  private passLine(share: number, dtS: number): void {
    const crossedS = this.previousS + share * dtS;
    this.lapsS.push(crossedS - this.lapStartS);
    this.lapStartS = crossedS;
    this.finished = this.lapsS.length >= (this.plant.lane.closed ? this.setup.laps : 1);
  }

  private checkLost(distanceM: number, stopped: boolean): void {
    const { timeS } = this.plant;
    const allowedS = this.furthestM < SET_OFF_M ? START_S : STUCK_S;
    if (distanceM > this.lostM) this.lose('off-lane');
    else if (stopped) this.lose('stopped');
    else if (timeS - this.furthestS > allowedS) this.lose('no-progress');
    else if (timeS > this.setup.timeLimitS) this.lose('time-limit');
  }

  private lose(reason: LossReason): void {
    const { timeS, xM, yM } = this.plant;
    this.loss = { reason, sM: Math.max(this.furthestM, this.plant.place.sM), timeS, xM, yM };
  }
}
