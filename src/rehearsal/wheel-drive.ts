/**
 * Battery, driver, motors and castor: what speed each wheel tends to at its duty.
 *
 * All voltages over nominal, all forces over that of one stalled wheel at nominal voltage, all currents over that of one stalled
 * motor, so that a motor's law (a DC motor with constant friction torque) has no constants but its start duty d0:
 *   current    i = d f - (1 - d0) v/top            d duty, f battery under load
 *   steady     u = top (d f -+ d0 - load)/(1 - d0)  against friction; 0 where |d f| is less, or the wheel stands and is held
 *   battery    f = f0 - rho sum of d i             rho = battery and wiring over winding; PWM: the battery gives i for d of the time
 * Ohm's law, solved for f at the wheel speeds at the step's start; a braking motor feeds nothing back. Source: a DC motor's
 * equations as in any text, e.g. Franklin, Powell and Emami-Naeini, Feedback Control of Dynamic Systems, section 2.3.
 * Castor: a drag c against its own direction of travel (v, w l), l ahead of the axle at the bar: it loads both wheels with
 * c v/(2 V) and, against turning, one more and the other less with c (l/b) w l/V, V the castor's speed.
 */
import type { PlantParameters } from './plant-parameters.js';
import { WARM_UP_S } from './plant-table.js';

/** A wheel slower than this stands, m/s. */
const STANDING_MPS = 1e-3;
/** Time between two looks at how warm the motors are, s. */
const WARMER_S = 0.1;
/** Below this speed the castor's drag fades, m/s. */
const CASTOR_CREEP_MPS = 0.01;

export class WheelDrive {
  /** Speeds to which the wheels tend, m/s; valid after `update`. */
  steadyLeftMps = 0;
  steadyRightMps = 0;
  /** Battery under load over nominal. */
  batteryFactor: number;
  /** Battery without load over nominal. */
  openFactor: number;
  /** Wheels that something holds. */
  blockedLeft = false;
  blockedRight = false;
  private readonly startLeft: number;
  private readonly startRight: number;
  /** What does not change from step to step, worked out once: 1 over trims, 1 over 1 - start duty, (1 - start duty) over top speed, s/m. */
  private readonly perTrimLeft: number;
  private readonly perTrimRight: number;
  private readonly perDriveLeft: number;
  private readonly perDriveRight: number;
  private counterLeft = 0;
  private counterRight = 0;
  /** Top speeds of the motors as warm as they are, and when to look again, s. */
  private topLeft = 0;
  private topRight = 0;
  private warmerS: number;

  constructor(private readonly parameters: Readonly<PlantParameters>) {
    const { startDuty, frictionLeft, frictionRight, driftLeft, driftRight } = parameters;
    this.batteryFactor = this.openFactor = parameters.batteryFactor;
    this.startLeft = Math.min(0.99, startDuty * frictionLeft);
    this.startRight = Math.min(0.99, startDuty * frictionRight);
    this.perTrimLeft = 1 / parameters.trimLeft;
    this.perTrimRight = 1 / parameters.trimRight;
    this.perDriveLeft = 1 / (1 - this.startLeft);
    this.perDriveRight = 1 / (1 - this.startRight);
    this.setTop(parameters.topLeftMps, parameters.topRightMps);
    this.warmerS = driftLeft !== 0 || driftRight !== 0 ? 0 : Infinity;
  }

  /** To be called with the wheel speeds (m/s) and duties (-1 to 1) at the start of each step. */
  update(dutyLeft: number, dutyRight: number, leftMps: number, rightMps: number, timeS: number): void {
    const { castorDrag } = this.parameters;
    if (timeS >= this.warmerS) this.warmUp(timeS);
    const left = dutyLeft * this.perTrimLeft;
    const right = dutyRight * this.perTrimRight;
    this.sag(left, right, leftMps * this.counterLeft, rightMps * this.counterRight);
    let loadLeft = 0;
    let loadRight = 0;
    if (castorDrag !== 0) {
      const { aheadM, trackM } = this.parameters;
      const along = (leftMps + rightMps) / 2;
      const leverRatio = aheadM / trackM;
      const across = (rightMps - leftMps) * leverRatio;
      const drag = castorDrag / (Math.sqrt(along * along + across * across) + CASTOR_CREEP_MPS);
      const turning = drag * across * leverRatio;
      loadLeft = (drag * along) / 2 - turning;
      loadRight = (drag * along) / 2 + turning;
    }
    this.steadyLeftMps = this.blockedLeft
      ? 0
      : this.steady(left, this.startLeft, loadLeft, leftMps) * this.perDriveLeft * this.topLeft;
    this.steadyRightMps = this.blockedRight
      ? 0
      : this.steady(right, this.startRight, loadRight, rightMps) * this.perDriveRight * this.topRight;
  }

  /** Motors get warmer by an exponential. */
  private warmUp(timeS: number): void {
    const { topLeftMps, topRightMps, driftLeft, driftRight } = this.parameters;
    const warm = 1 - Math.exp(-timeS / WARM_UP_S);
    this.setTop(topLeftMps * (1 + driftLeft * warm), topRightMps * (1 + driftRight * warm));
    this.warmerS = timeS + WARMER_S;
  }

  private setTop(leftMps: number, rightMps: number): void {
    this.topLeft = leftMps;
    this.topRight = rightMps;
    this.counterLeft = (1 - this.startLeft) / leftMps;
    this.counterRight = (1 - this.startRight) / rightMps;
  }

  /** Battery under load; counter-voltages over nominal. */
  private sag(left: number, right: number, counterLeft: number, counterRight: number): void {
    const { batteryResistanceRatio } = this.parameters;
    const batteryFactor = this.openFactor;
    if (batteryResistanceRatio === 0) {
      this.batteryFactor = batteryFactor;
      return;
    }
    let squares = 0;
    let back = 0;
    if (left * (left * batteryFactor - counterLeft) > 0) {
      squares += left * left;
      back += left * counterLeft;
    }
    if (right * (right * batteryFactor - counterRight) > 0) {
      squares += right * right;
      back += right * counterRight;
    }
    const factor = (batteryFactor + batteryResistanceRatio * back) / (1 + batteryResistanceRatio * squares);
    this.batteryFactor = Math.max(0, factor);
  }

  /** Steady speed over top speed, times 1 - start duty. */
  private steady(duty: number, start: number, load: number, speedMps: number): number {
    const drive = Math.abs(duty) * this.batteryFactor;
    const stands = speedMps < STANDING_MPS && speedMps > -STANDING_MPS;
    if (stands && drive <= start * this.parameters.stiction) return 0;
    const left = drive - start - (duty < 0 ? -load : load);
    if (left <= 0) return 0;
    return duty < 0 ? -left : left;
  }
}
