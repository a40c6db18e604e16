/**
 * How the simulated vehicle moves: two driven wheels on the floor.
 *
 * Wheels: wheel-drive.ts gives each wheel's steady speed u at its duty; of first order, v(t + h) = u + (v(t) - u) exp(-h/lag).
 * Grip, a simplification with no state of its own, at speed v = (left + right)/2 and turn rate w = (right - left)/track:
 *   along   the vehicle's speed changes by at most mu g; the wheels are held to that speed, their difference stays;
 *   across  |v w| <= sqrt((mu g)^2 - a^2), a the acceleration along (circle of friction). A larger turn rate of the wheels
 *           reaches the floor cut to that limit: the vehicle runs wide.
 * Sideways drift, the inertia of turning and weight transfer are left out.
 * Pose: a circular arc with the mean speed and turn rate of the substep (arc.ts), exact while they are constant.
 *
 * A joint of the floor shifts and turns the vehicle at once, each time it has driven that far. Steps allocate nothing.
 */
import { type Pose, sinc } from '../course/arc.js';
import { STANDARD_GRAVITY_MPS2 } from '../vehicle/gravity.js';
import type { PlantParameters } from './plant-parameters.js';
import { WheelDrive } from './wheel-drive.js';

/** Longest substep, s. */
const SUBSTEP_S = 2e-3;
/** Longest step, s. */
const LONGEST_STEP_S = 5e-3;

export class VehicleMotion {
  /** Time since the start of the rehearsal, s. */
  timeS = 0;
  /** The axle's middle on the floor, m, and the direction of travel, rad. */
  xM: number;
  yM: number;
  headingRad: number;
  /** Wheel surface speeds, m/s. */
  leftMps = 0;
  rightMps = 0;
  /** How far each wheel has rolled, m, slip or not; backward takes off. */
  leftRolledM = 0;
  rightRolledM = 0;
  /** Turn rate that reached the floor in the last substep, rad/s. */
  turnRadPerS = 0;
  /** Whether the vehicle has moved since place and spots were last worked out. */
  protected placeIsOld = true;
  protected spotsAreOld = true;
  private readonly gripMps2: number;
  protected readonly wheels: WheelDrive;
  /** Distance to the next joint of the floor, m. */
  private toBumpM: number;

  /** @param start where the lane begins */
  constructor(
    readonly parameters: Readonly<PlantParameters>,
    start: Pose,
  ) {
    this.xM = start.xM - parameters.startLateralM * Math.sin(start.headingRad);
    this.yM = start.yM + parameters.startLateralM * Math.cos(start.headingRad);
    this.headingRad = start.headingRad + parameters.startHeadingRad;
    this.gripMps2 = parameters.grip * STANDARD_GRAVITY_MPS2;
    this.wheels = new WheelDrive(parameters);
    this.toBumpM = parameters.bumpEveryM > 0 ? parameters.bumpEveryM : Infinity;
  }

  /** Speed of the axle's middle, m/s. */
  get speedMps(): number {
    return (this.leftMps + this.rightMps) / 2;
  }

  /**
   * Drives on for a time with constant duties.
   *
   * @param dutyLeft -1 (full reverse) to 1
   * @param dutyRight -1 to 1
   * @param dtS above 0 and at most 5 ms
   * @throws RangeError on another time
   */
  step(dutyLeft: number, dutyRight: number, dtS: number): void {
    if (!(dtS > 0 && dtS <= LONGEST_STEP_S + 1e-12))
      throw new RangeError(`A plant step lasts up to 5 ms, not ${dtS} s.`);
    const { wheels } = this;
    const { lagS, trackM } = this.parameters;
    wheels.update(dutyLeft, dutyRight, this.leftMps, this.rightMps, this.timeS);
    const { steadyLeftMps: steadyLeft, steadyRightMps: steadyRight } = wheels;
    const substeps = Math.ceil(dtS / SUBSTEP_S - 1e-9);
    const h = dtS / substeps;
    const kept = Math.exp(-h / lagS);
    const keptMean = ((1 - kept) * lagS) / h;
    const grip = this.gripMps2;
    // All in this one loop: numbers handed from function to function would each be put on the heap.
    let left = wheels.blockedLeft ? 0 : this.leftMps;
    let right = wheels.blockedRight ? 0 : this.rightMps;
    let heading = this.headingRad;
    let turn = 0;
    let xM = this.xM;
    let yM = this.yM;
    let rolledM = 0;
    let apartM = 0;
    for (let i = 0; i < substeps; i++) {
      const awayLeft = left - steadyLeft;
      const awayRight = right - steadyRight;
      const before = (left + right) / 2;
      left = steadyLeft + awayLeft * kept;
      right = steadyRight + awayRight * kept;
      let change = (left + right) / 2 - before;
      const meanLeft = steadyLeft + awayLeft * keptMean;
      const meanRight = steadyRight + awayRight * keptMean;
      let speed = (meanLeft + meanRight) / 2;
      turn = (meanRight - meanLeft) / trackM;
      const most = grip * h;
      if (change > most || change < -most) {
        const held = change > 0 ? most : -most;
        left += held - change;
        right += held - change;
        change = held;
        speed = before + held / 2;
      }
      const across = grip * grip - (change / h) * (change / h);
      const demand = speed * turn;
      if (demand * demand > across) {
        const allowed = Math.sqrt(Math.max(0, across)) / Math.abs(speed);
        turn = turn > 0 ? allowed : -allowed;
      }
      rolledM += speed * h;
      apartM += ((meanRight - meanLeft) / 2) * h;
      const half = (turn * h) / 2;
      const chord = speed * h * sinc(half);
      xM += chord * Math.cos(heading + half);
      yM += chord * Math.sin(heading + half);
      heading += turn * h;
    }
    this.leftMps = left;
    this.leftRolledM += rolledM - apartM;
    this.rightRolledM += rolledM + apartM;
    this.rightMps = right;
    this.xM = xM;
    this.yM = yM;
    this.headingRad = heading;
    this.turnRadPerS = turn;
    this.timeS += dtS;
    this.toBumpM -= (Math.abs(left + right) / 2) * dtS;
    if (this.toBumpM <= 0) this.bump();
    this.placeIsOld = true;
    this.spotsAreOld = true;
  }

  /** A joint of the floor. */
  private bump(): void {
    const { bumpEveryM, bumpLateralM, bumpHeadingRad } = this.parameters;
    this.push(bumpLateralM, bumpHeadingRad);
    this.toBumpM += bumpEveryM;
  }

  /** Shifts the vehicle, m to the left, and turns it, rad. */
  protected push(shiftM: number, turnRad: number): void {
    this.xM -= shiftM * Math.sin(this.headingRad);
    this.yM += shiftM * Math.cos(this.headingRad);
    this.headingRad += turnRad;
  }
}
