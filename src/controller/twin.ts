/**
 * The twin: the controller in integers, the reference that the firmware equals bit for bit.
 *
 * One step, once a sample period: readings -> offset at the bar -> phase -> curvature -> speed class ->
 * wheel speeds -> duties. The steering command is a curvature (turn per metre driven), so that one tuning
 * serves neighbouring speeds. Vehicle speed is not measured: a first-order model of the motors, driven by the
 * very command that the wheels get, stands in for it. The duty inverts the motors' dead zone and speed line.
 *
 * Only additions, products, comparisons and arithmetic right shifts are used; these agree in C++, Python and
 * JavaScript. No intermediate leaves 32 bits, no factor 16 (design/intervals.ts shows it for each sheet).
 */
import {
  CLASS_SPEED_BITS,
  COEFFICIENT_BITS,
  CURVATURE_BITS,
  type ControllerConstants,
  FULL_SPEED,
  PHASE,
  type Phase,
  SPEED_BITS,
  SPEED_MODEL_BITS,
  TRACK_BITS,
} from './constants.js';
import { clamp } from './clamp.js';
import { ruleCurvature, ruleSpeed } from './rule-action.js';
import { runIndex } from './run-index.js';
import { wheelDuty } from './wheel-duty.js';
import { WheelLoops } from './wheel-loop.js';
import { LineMemory } from './line-memory.js';
import { Sensing } from './sensing.js';
import { SteeringLaw } from './steering-law.js';

export class Twin {
  readonly sensing: Sensing;
  readonly memory: LineMemory;
  /** With encoders only. */
  readonly wheels: WheelLoops | undefined;
  /** Index of the speed class in force; 0 is the fastest. */
  classIndex = 0;
  /** Curvature command, curvature units. */
  curvature = 0;
  /** Modelled vehicle speed, 1/2^SPEED_MODEL_BITS of the speed at full duty. */
  speed = 0;
  /** Duties, -4096..4096; positive drives forward. */
  dutyLeft = 0;
  dutyRight = 0;

  private readonly law: SteeringLaw;
  /** Low-passed curvature demand and held curvature, COEFFICIENT_BITS more bits. */
  private demand = 0;
  private held = 0;
  /** Curvature of the bend that the vehicle is in, curvature units, and distance yet to go until it is over. */
  private bend = 0;
  private release = 0;

  constructor(readonly constants: ControllerConstants) {
    this.law = new SteeringLaw(constants);
    if (constants.wheelLoop) this.wheels = new WheelLoops(constants.wheelLoop, constants.drive);
    this.sensing = new Sensing(constants.sensing, constants.kind === 'rules');
    this.memory = new LineMemory(constants.memory, this.sensing);
  }

  get phase(): Phase {
    return this.memory.phase;
  }

  /** Whether the line is lost for good: motors off, and so until the next start. */
  get stopped(): boolean {
    return this.phase === PHASE.stopped;
  }

  private get wholeSpeed(): number {
    return this.speed >> (SPEED_MODEL_BITS - SPEED_BITS);
  }

  /** Puts the controller into the state at the start of a run. */
  start(): void {
    this.sensing.reset();
    this.memory.start();
    this.classIndex = 0;
    this.curvature = this.speed = this.dutyLeft = this.dutyRight = 0;
    this.law.start();
    this.demand = this.held = 0;
    this.bend = this.release = 0;
    this.wheels?.start();
  }

  /**
   * One sample period.
   *
   * @param counts one reading a sensor, leftmost first: counts, or 0 and 1 from digital sensors
   */
  step(counts: Int32Array): void {
    if (this.phase === PHASE.stopped) return;
    this.sensing.read(counts);
    const before = this.phase;
    this.memory.update(this.wholeSpeed);
    if (this.stopped) {
      this.dutyLeft = this.dutyRight = this.speed = 0;
      return;
    }
    if (this.phase === PHASE.follow) this.steer(before !== PHASE.follow);
    else if (this.phase === PHASE.search)
      this.curvature = this.memory.side * this.constants.steering.searchCurvature;
    else this.curvature = this.held >> COEFFICIENT_BITS;
    this.pickClass();
    this.drive();
  }

  /** Curvature from the measured offset, and its mean to hold where there is none. */
  private steer(regained: boolean): void {
    const { steering } = this.constants;
    this.curvature = this.law.curvature(this.input(), this.classIndex, this.wholeSpeed, regained);
    this.held += (this.curvature - (this.held >> COEFFICIENT_BITS)) * steering.holdFilter;
  }

  /** What is steered on: the offset, or with rules the curvature that the table asks for. */
  private input(): number {
    const { rules, sensing } = this.constants;
    if (rules === undefined) return this.sensing.offset;
    return ruleCurvature(rules, runIndex(this.sensing.first, this.sensing.last, sensing.sensorCount));
  }

  /** Slower at once when the demand for curvature rises, faster again by distance out of the bend. */
  private pickClass(): void {
    const { classes, steering, memory } = this.constants;
    const size = this.curvature < 0 ? -this.curvature : this.curvature;
    this.demand += (size - (this.demand >> COEFFICIENT_BITS)) * steering.demandFilter;
    const last = classes.length - 1;
    let demand = this.demand >> COEFFICIENT_BITS;
    if (demand > classes[last]!.curvature) demand = classes[last]!.curvature;
    if (demand >= this.bend) {
      this.bend = demand;
      this.release = memory.releaseDistance;
    } else {
      this.release -= this.wholeSpeed;
      if (this.release <= 0) {
        this.release = 0;
        this.bend = demand;
      }
    }
    let index = 0;
    while (index < last && this.bend > classes[index]!.curvature) index++;
    this.classIndex = index;
  }

  /** Speed for the bend that the vehicle is in, class speed units. */
  private targetSpeed(): number {
    const { classes, drive } = this.constants;
    if (this.phase === PHASE.search) return drive.searchSpeed;
    const { curvature, speed, speedSlope } = classes[this.classIndex]!;
    return speed + (((curvature - this.bend) * speedSlope) >> drive.slopeBits);
  }

  /** From speed class and curvature to duties; the wheel difference is kept when a wheel saturates. */
  private drive(): void {
    const { drive } = this.constants;
    const speed = this.wholeSpeed;
    // in class speed units a difference is larger than in speed units: the gain
    let lead = this.targetSpeed() - (this.speed >> (SPEED_MODEL_BITS - CLASS_SPEED_BITS));
    if (lead > drive.leadUp) lead = drive.leadUp;
    if (lead < -drive.leadDown) lead = -drive.leadDown;
    const base = this.base(speed + lead);

    const perSpeed = (this.curvature * drive.halfTrack) >> CURVATURE_BITS;
    const half = (speed * perSpeed) >> TRACK_BITS;
    let left = base - half;
    let right = base + half;
    const outer = left > right ? left : right;
    if (outer > FULL_SPEED) {
      left -= outer - FULL_SPEED;
      right -= outer - FULL_SPEED;
    }
    left = clamp(left, FULL_SPEED);
    right = clamp(right, FULL_SPEED);

    // twice the difference in speed units, times a coefficient: SPEED_BITS + 1 + COEFFICIENT_BITS = SPEED_MODEL_BITS
    this.speed += (left + right - 2 * speed) * drive.motorStep;
    if (this.speed < 0) this.speed = 0;
    if (this.wheels) [left, right] = [this.wheels.followLeft(left), this.wheels.followRight(right)];
    this.dutyLeft = wheelDuty(left, drive.wheelDead, drive.startDutyLeft, drive.slopeLeft);
    this.dutyRight = wheelDuty(right, drive.wheelDead, drive.startDutyRight, drive.slopeRight);
  }

  /** Wheel speed for both wheels, speed units; a rule's mean fraction scales it. */
  private base(speed: number): number {
    const { rules, sensing } = this.constants;
    if (rules === undefined || this.phase !== PHASE.follow) return speed;
    return ruleSpeed(rules, runIndex(this.sensing.first, this.sensing.last, sensing.sensorCount), speed);
  }
}
