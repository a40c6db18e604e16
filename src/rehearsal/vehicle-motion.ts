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
  /** Cosine and sine of the heading, carried from step to step: rounding makes them differ from it by 1e-15 a step at most. */
  protected cosHeading: number;
  protected sinHeading: number;
  private readonly gripMps2: number;
  /** 1 over the track width, 1/m. */
  private readonly perTrack: number;
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
    this.cosHeading = Math.cos(this.headingRad);
    this.sinHeading = Math.sin(this.headingRad);
    this.perTrack = 1 / parameters.trackM;
    this.gripMps2 = parameters.grip * STANDARD_GRAVITY_MPS2;
    this.wheels = new WheelDrive(parameters);
    this.toBumpM = parameters.bumpEveryM > 0 ? parameters.bumpEveryM : Infinity;
  }

  /** Puts the vehicle elsewhere on the floor, its wheels running on. */
  moveTo({ xM, yM, headingRad }: Pose): void {
    this.xM = xM;
    this.yM = yM;
    this.headingRad = headingRad;
    this.cosHeading = Math.cos(headingRad);
    this.sinHeading = Math.sin(headingRad);
    this.placeIsOld = true;
    this.spotsAreOld = true;
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
    wheels.update(dutyLeft, dutyRight, this.leftMps, this.rightMps, this.timeS);
    const { steadyLeftMps: steadyLeft, steadyRightMps: steadyRight } = wheels;
    const substeps = dtS <= SUBSTEP_S ? 1 : Math.ceil(dtS / SUBSTEP_S - 1e-9);
    const h = dtS / substeps;
    const lags = h / this.parameters.lagS;
    const keptMean = meanDecay(lags);
    const kept = 1 - lags * keptMean;
    const { gripMps2: grip, perTrack } = this;
    // All in this one loop: numbers handed from function to function would each be put on the heap.
    let left = wheels.blockedLeft ? 0 : this.leftMps;
    let right = wheels.blockedRight ? 0 : this.rightMps;
    let cos = this.cosHeading;
    let sin = this.sinHeading;
    let turned = 0;
    let turn = 0;
    let xM = this.xM;
    let yM = this.yM;
    let rolledM = 0;
    let apartM = 0;
    const most = grip * h;
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
      turn = (meanRight - meanLeft) * perTrack;
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
      // Along the chord, in the direction half way; then the rest of the turn. The direction is kept as cosine and sine.
      const half = (turn * h) / 2;
      const flat = sinc(half);
      const sinHalf = half * flat;
      const cosHalf = Math.sqrt(1 - sinHalf * sinHalf);
      const chord = speed * h * flat;
      const cosMiddle = cos * cosHalf - sin * sinHalf;
      const sinMiddle = sin * cosHalf + cos * sinHalf;
      xM += chord * cosMiddle;
      yM += chord * sinMiddle;
      cos = cosMiddle * cosHalf - sinMiddle * sinHalf;
      sin = sinMiddle * cosHalf + cosMiddle * sinHalf;
      turned += turn * h;
    }
    this.leftMps = left;
    this.leftRolledM += rolledM - apartM;
    this.rightRolledM += rolledM + apartM;
    this.rightMps = right;
    this.xM = xM;
    this.yM = yM;
    this.cosHeading = cos;
    this.sinHeading = sin;
    this.headingRad += turned;
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
    this.moveTo({
      xM: this.xM - shiftM * this.sinHeading,
      yM: this.yM + shiftM * this.cosHeading,
      headingRad: this.headingRad + turnRad,
    });
  }
}

/**
 * Mean of exp(-t) for t from 0 to x, (1 - exp(-x))/x, x above 0. Below 0.1 the series: its first neglected term is under 3e-13.
 */
function meanDecay(x: number): number {
  if (x > 0.1) return (1 - Math.exp(-x)) / x;
  return (
    1 - (x / 2) * (1 - (x / 3) * (1 - (x / 4) * (1 - (x / 5) * (1 - (x / 6) * (1 - (x / 7) * (1 - x / 8))))))
  );
}
