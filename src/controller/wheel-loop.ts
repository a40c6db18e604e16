/**
 * Holds one wheel to its wanted speed: PI on the difference between the speed that a nominal motor would have by now and the one
 * that the encoder shows, on top of the command itself.
 *
 * Both speeds are means over the same window of samples, so that the encoder's coarse steps and its delay fall out of the difference; the
 * model lags one sample behind the command, as the motors do. What the wheel cannot do any more takes the integral back
 * (back-calculation), so that it never winds up.
 */
import { clamp } from './clamp.js';
import {
  COEFFICIENT_BITS,
  FULL_SPEED,
  WHEEL_GAIN_BITS,
  WHEEL_MODEL_BITS,
  SPEED_BITS,
  type DriveConstants,
  type WheelLoopConstants,
} from './constants.js';

class WheelLoop {
  /** Speed of a nominal motor, 1/2^WHEEL_MODEL_BITS of the speed at full duty. */
  private model = 0;
  /** The same one sample before, speed units. */
  private before = 0;
  /** Correction held, COEFFICIENT_BITS more bits than a speed. */
  private integral = 0;
  private readonly edgesSeen: Int16Array;
  private readonly speedsWanted: Int16Array;
  private edgeSum = 0;
  private wantedSum = 0;
  private place = 0;
  /** Samples for which the wheel was driven and gave no edge. */
  private still = 0;

  constructor(
    private readonly constants: WheelLoopConstants,
    private readonly motorStep: number,
    private readonly wheelDead: number,
  ) {
    this.edgesSeen = new Int16Array(1 << constants.windowBits);
    this.speedsWanted = new Int16Array(1 << constants.windowBits);
  }

  /** Whether the wheel is driven and does not turn, or its encoder is dead. */
  get blocked(): boolean {
    return this.still >= this.constants.blockedSamples;
  }

  start(): void {
    this.model = this.before = this.integral = 0;
    this.edgesSeen.fill(0);
    this.speedsWanted.fill(0);
    this.edgeSum = this.wantedSum = this.place = this.still = 0;
  }

  /**
   * One sample.
   *
   * @param edges counted since the sample before, negative backward; without a sign where there is one channel only
   * @param command wheel speed, speed units
   * @returns wheel speed to drive, speed units
   */
  follow(edges: number, command: number): number {
    const { windowBits, edgeLimit, speedPerEdge, edgeBits, single } = this.constants;
    const { place } = this;
    const counted = clamp(edges, edgeLimit);
    this.edgeSum += counted - this.edgesSeen[place]!;
    this.edgesSeen[place] = counted;
    this.wantedSum += this.before - this.speedsWanted[place]!;
    this.speedsWanted[place] = this.before;
    this.place = (place + 1) & ((1 << windowBits) - 1);
    this.before = this.model >> (WHEEL_MODEL_BITS - SPEED_BITS);

    const wanted = this.wantedSum >> windowBits;
    let measured = clamp((this.edgeSum * speedPerEdge) >> edgeBits, 2 * FULL_SPEED);
    if (single && wanted < 0) measured = -measured;
    this.model += (command - this.before) * this.motorStep;
    return this.corrected(wanted - measured, command);
  }

  private corrected(error: number, command: number): number {
    const { proportional, integral, tracking, correctionLimit, blockedSpeed, blockedSamples } =
      this.constants;
    if (command <= this.wheelDead && command >= -this.wheelDead) {
      this.still = 0;
      return command;
    }
    const part = clamp((error * proportional) >> WHEEL_GAIN_BITS, 2 * FULL_SPEED);
    const held = this.integral >> COEFFICIENT_BITS;
    const asked = command + part + held;
    const given = clamp(command + clamp(part + held, correctionLimit), FULL_SPEED);
    const sum = this.integral + error * integral + (given - asked) * tracking;
    this.integral = clamp(sum, correctionLimit << COEFFICIENT_BITS);

    const driven = given > blockedSpeed || given < -blockedSpeed;
    if (this.edgeSum === 0 && driven) {
      if (this.still < blockedSamples) this.still++;
    } else this.still = 0;
    return given;
  }
}

/** The loops of both wheels. */
export class WheelLoops {
  private readonly left: WheelLoop;
  private readonly right: WheelLoop;
  private edgesLeft = 0;
  private edgesRight = 0;

  constructor(constants: WheelLoopConstants, { motorStep, wheelDead }: DriveConstants) {
    this.left = new WheelLoop(constants, motorStep, wheelDead);
    this.right = new WheelLoop(constants, motorStep, wheelDead);
  }

  /** Whether a wheel is driven and does not turn, or its encoder is dead. */
  get blocked(): boolean {
    return this.left.blocked || this.right.blocked;
  }

  start(): void {
    this.edgesLeft = this.edgesRight = 0;
    this.left.start();
    this.right.start();
  }

  /** Edges that the encoders gave since the sample before; to be told before each step of the controller. */
  count(left: number, right: number): void {
    this.edgesLeft = left;
    this.edgesRight = right;
  }

  /** Wheel speeds to drive for those commanded, speed units. */
  followLeft(command: number): number {
    return this.left.follow(this.edgesLeft, command);
  }

  followRight(command: number): number {
    return this.right.follow(this.edgesRight, command);
  }
}
