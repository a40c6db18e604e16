/**
 * The simulated vehicle: two driven wheels on the floor, and the bar's sensors over the lane.
 *
 * Wheels: wheel-drive.ts gives each wheel's steady speed u at its duty; of first order, v(t + h) = u + (v(t) - u) exp(-h/lag).
 * Grip, a simplification with no state of its own, at speed v = (left + right)/2 and turn rate w = (right - left)/track:
 *   along   the vehicle's speed changes by at most mu g; the wheels are held to that speed, their difference stays;
 *   across  |v w| <= sqrt((mu g)^2 - a^2), a the acceleration along (circle of friction). A larger turn rate of the wheels
 *           reaches the floor cut to that limit: the vehicle runs wide.
 * Sideways drift, the inertia of turning and weight transfer are left out.
 * Pose: a circular arc with the mean speed and turn rate of the substep (arc.ts), exact while they are constant.
 *
 * A joint of the floor shifts and turns the vehicle at once, each time it has driven that far.
 *
 * A sensor reads ground + (c share + a) (line - ground) + noise, share being how much of its spot is painted, c the contrast at that
 * place of the lane and a the ambient light at that place of the floor; a digital one changes its level at c share + a + noise =
 * 1/2. Steps allocate nothing.
 */
import { sinc } from '../course/arc.js';
import type { Lane } from '../course/lane.js';
import { makeProjection, type Projection } from '../course/projection.js';
import { STANDARD_GRAVITY_MPS2 } from '../vehicle/gravity.js';
import { FloorLight } from './floor-light.js';
import { STREAM, type PlantParameters } from './plant-parameters.js';
import { Random } from './random.js';
import { WheelDrive } from './wheel-drive.js';

/** Longest substep, s. */
const SUBSTEP_S = 2e-3;
/** Longest step, s. */
const LONGEST_STEP_S = 5e-3;

export class Plant {
  /** Time since the start of the rehearsal, s. */
  timeS = 0;
  /** The axle's middle on the floor, m, and the direction of travel, rad. */
  xM: number;
  yM: number;
  headingRad: number;
  /** Wheel surface speeds, m/s. */
  leftMps = 0;
  rightMps = 0;
  /** Turn rate that reached the floor in the last substep, rad/s. */
  turnRadPerS = 0;
  private readonly projection = makeProjection();
  private cosHeading = 1;
  private sinHeading = 0;
  /** Whether the vehicle has moved since place and direction were worked out. */
  private placeIsOld = true;
  private directionIsOld = true;
  private readonly gripMps2: number;
  private readonly wheels: WheelDrive;
  /** Distance to the next joint of the floor, m. */
  private toBumpM: number;
  private readonly light: FloorLight;
  private readonly positionsM: Float64Array;
  private readonly ground: Float64Array;
  private readonly line: Float64Array;
  private readonly noise: Random;

  constructor(
    readonly parameters: Readonly<PlantParameters>,
    readonly lane: Lane,
  ) {
    const start = lane.poseAt(0);
    this.xM = start.xM - parameters.startLateralM * Math.sin(start.headingRad);
    this.yM = start.yM + parameters.startLateralM * Math.cos(start.headingRad);
    this.headingRad = start.headingRad + parameters.startHeadingRad;
    this.gripMps2 = parameters.grip * STANDARD_GRAVITY_MPS2;
    this.wheels = new WheelDrive(parameters);
    this.toBumpM = parameters.bumpEveryM > 0 ? parameters.bumpEveryM : Infinity;
    this.light = new FloorLight(parameters);
    this.positionsM = Float64Array.from(parameters.positionsM);
    this.ground = Float64Array.from(parameters.ground);
    this.line = Float64Array.from(parameters.line);
    this.noise = new Random(parameters.seed, STREAM.noise);
  }

  get sensorCount(): number {
    return this.positionsM.length;
  }

  /** Speed of the axle's middle, m/s. */
  get speedMps(): number {
    return (this.leftMps + this.rightMps) / 2;
  }

  /**
   * Where the axle's middle is along the lane (arc length, m, counted on lap after lap) and beside it (m, positive left).
   *
   * It is searched for near the place of the last look: look at least once every few centimetres.
   */
  get place(): Readonly<Projection> {
    if (this.placeIsOld) this.lane.project(this.xM, this.yM, this.projection.sM, this.projection);
    this.placeIsOld = false;
    return this.projection;
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
    const { lagS } = this.parameters;
    wheels.update(dutyLeft, dutyRight, this.leftMps, this.rightMps, this.timeS);
    const { steadyLeftMps: steadyLeft, steadyRightMps: steadyRight } = wheels;
    const substeps = Math.ceil(dtS / SUBSTEP_S - 1e-9);
    const h = dtS / substeps;
    const kept = Math.exp(-h / lagS);
    const keptMean = ((1 - kept) * lagS) / h;
    for (let i = 0; i < substeps; i++) this.substep(steadyLeft, steadyRight, h, kept, keptMean);
    this.timeS += dtS;
    this.toBumpM -= Math.abs(this.speedMps) * dtS;
    if (this.toBumpM <= 0) this.bump();
    this.placeIsOld = this.directionIsOld = true;
  }

  /** What sensor i reads now: counts, or the level 0 or 1 of a digital one. Each call draws new noise. */
  count(i: number): number {
    const { aheadM, spotRadiusM, kind, lineLevel, adcMaxCount, noiseShare } = this.parameters;
    if (this.directionIsOld) this.findDirection();
    const sideM = this.positionsM[i]!;
    const xM = this.xM + aheadM * this.cosHeading - sideM * this.sinHeading;
    const yM = this.yM + aheadM * this.sinHeading + sideM * this.cosHeading;
    const share = this.light.contrast * this.lane.coverage(xM, yM, spotRadiusM) + this.light.ambient;
    const noise = noiseShare === 0 ? 0 : noiseShare * this.noise.noise();
    if (kind === 'digital') return share + noise > 0.5 === (lineLevel === 'high') ? 1 : 0;
    const ground = this.ground[i]!;
    const reading = Math.round(ground + share * (this.line[i]! - ground) + noise * adcMaxCount);
    return reading < 0 ? 0 : reading > adcMaxCount ? adcMaxCount : reading;
  }

  /** Writes all readings, leftmost first. */
  readCounts(out: Int32Array): void {
    for (let i = 0; i < this.positionsM.length; i++) out[i] = this.count(i);
  }

  /** A joint of the floor. */
  private bump(): void {
    const { bumpEveryM, bumpLateralM, bumpHeadingRad } = this.parameters;
    this.xM -= bumpLateralM * Math.sin(this.headingRad);
    this.yM += bumpLateralM * Math.cos(this.headingRad);
    this.headingRad += bumpHeadingRad;
    this.toBumpM += bumpEveryM;
  }

  private substep(steadyLeft: number, steadyRight: number, h: number, kept: number, keptMean: number): void {
    const awayLeft = this.leftMps - steadyLeft;
    const awayRight = this.rightMps - steadyRight;
    const before = (this.leftMps + this.rightMps) / 2;
    this.leftMps = steadyLeft + awayLeft * kept;
    this.rightMps = steadyRight + awayRight * kept;
    let change = (this.leftMps + this.rightMps) / 2 - before;
    const meanLeft = steadyLeft + awayLeft * keptMean;
    const meanRight = steadyRight + awayRight * keptMean;
    let speed = (meanLeft + meanRight) / 2;
    let turn = (meanRight - meanLeft) / this.parameters.trackM;

    const most = this.gripMps2 * h;
    if (change > most || change < -most) {
      const held = change > 0 ? most : -most;
      this.leftMps += held - change;
      this.rightMps += held - change;
      change = held;
      speed = before + held / 2;
    }
    const across = this.gripMps2 * this.gripMps2 - (change / h) * (change / h);
    const demand = speed * turn;
    if (demand * demand > across) {
      const allowed = Math.sqrt(Math.max(0, across)) / Math.abs(speed);
      turn = turn > 0 ? allowed : -allowed;
    }
    this.turnRadPerS = turn;
    const half = (turn * h) / 2;
    const chord = speed * h * sinc(half);
    const direction = this.headingRad + half;
    this.xM += chord * Math.cos(direction);
    this.yM += chord * Math.sin(direction);
    this.headingRad += turn * h;
  }

  private findDirection(): void {
    this.cosHeading = Math.cos(this.headingRad);
    this.sinHeading = Math.sin(this.headingRad);
    this.directionIsOld = false;
    if (this.light.varies) this.light.update(this.place.sM + this.parameters.aheadM);
  }
}
