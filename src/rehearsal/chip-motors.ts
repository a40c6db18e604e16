/**
 * What the motors get from the pins: the driver's logic on the pin levels, and from that each motor's duty.
 *
 * At every moment a motor is driven forward (1), backward (-1) or not at all (0: braked or running out), by the driver's input
 * table (src/vehicle/drivers.ts). Its duty is the mean of that over the last PWM period, which is what the plant's dead zone and
 * speed line are stated for. So it is the pins' signal itself that drives the plant, not a register.
 */
import type { PinFacts } from '../vehicle/board-facts.js';
import { pwmDemand, timerHz } from '../vehicle/pwm-modes.js';
import type { MotorWiring, Vehicle } from '../vehicle/vehicle.js';
import { type AvrChip, CLOCK_HZ, pinNumber } from './chip-avr.js';

type Side = (chip: AvrChip) => number;

/** Direction in which one motor is driven at this moment. */
function sideOf(vehicle: Vehicle, wiring: MotorWiring): Side {
  const { scheme, standby } = vehicle.drive;
  const forward = wiring.inverted ? -1 : 1;
  const level = (pin: PinFacts | undefined) => {
    if (pin === undefined) return () => false;
    const number = pinNumber(pin);
    return (chip: AvrChip) => chip.isHigh(number);
  };
  const [pwm, dir, in1, in2] = [wiring.pwm, wiring.dir, wiring.in1, wiring.in2].map(level) as [
    ReturnType<typeof level>,
    ReturnType<typeof level>,
    ReturnType<typeof level>,
    ReturnType<typeof level>,
  ];
  const awake = standby === undefined ? () => true : level(standby);
  const inputs: Side = (chip) => Number(in1(chip)) - Number(in2(chip));
  if (scheme === 'pwm-dir') return (chip) => (pwm(chip) ? (dir(chip) ? forward : -forward) : 0);
  if (scheme === 'dual-pwm') return (chip) => forward * inputs(chip);
  return (chip) => (awake(chip) && pwm(chip) ? forward * inputs(chip) : 0);
}

/** Cycles of one PWM period of a motor, from the timer of its PWM pin. */
function pwmPeriodCycles(vehicle: Vehicle, wiring: MotorWiring): number {
  const pin = wiring.pwm ?? wiring.in1;
  const timer = pin?.pwm?.timer;
  const { board } = vehicle;
  const hz = timer === undefined ? board.pwmHz : timerHz(pwmDemand(vehicle), timer);
  return CLOCK_HZ / hz;
}

/** Follows one motor's pins; its duty is known at the end of each step. */
class MotorSignal {
  private readonly side: Side;
  /** Driven cycles, signed, in each of the last steps that make up a PWM period. */
  private readonly drivenCycles: Float64Array;
  private next = 0;
  private direction = 0;
  private changedAt = 0;
  private driven = 0;

  constructor(
    vehicle: Vehicle,
    wiring: MotorWiring,
    private readonly stepCycles: number,
  ) {
    this.side = sideOf(vehicle, wiring);
    const steps = Math.max(1, Math.round(pwmPeriodCycles(vehicle, wiring) / stepCycles));
    this.drivenCycles = new Float64Array(steps);
  }

  look(chip: AvrChip): void {
    const direction = this.side(chip);
    if (direction === this.direction) return;
    this.settle(chip.cycles);
    this.direction = direction;
  }

  private settle(cycles: number): void {
    this.driven += this.direction * (cycles - this.changedAt);
    this.changedAt = cycles;
  }

  /** Ends a step; returns the duty over the last PWM period, -1 to 1. */
  endStep(cycles: number): number {
    this.settle(cycles);
    this.drivenCycles[this.next] = this.driven;
    this.next = (this.next + 1) % this.drivenCycles.length;
    this.driven = 0;
    const sum = this.drivenCycles.reduce((total, each) => total + each, 0);
    return Math.max(-1, Math.min(1, sum / (this.drivenCycles.length * this.stepCycles)));
  }

  get isDriven(): boolean {
    return this.direction !== 0;
  }
}

/** Both motors of a vehicle. */
export class ChipMotors {
  private readonly left: MotorSignal;
  private readonly right: MotorSignal;
  /** Duties over the last PWM period, -1 to 1. */
  dutyLeft = 0;
  dutyRight = 0;
  /** Cycle at which a motor was last driven; -1 before the first time. */
  lastDriven = -1;

  /** @param stepCycles length of a step */
  constructor(vehicle: Vehicle, stepCycles: number) {
    this.left = new MotorSignal(vehicle, vehicle.drive.left, stepCycles);
    this.right = new MotorSignal(vehicle, vehicle.drive.right, stepCycles);
  }

  /** To be called whenever a pin may have changed. */
  look(chip: AvrChip): void {
    this.left.look(chip);
    this.right.look(chip);
    if (this.left.isDriven || this.right.isDriven) this.lastDriven = chip.cycles;
  }

  /** To be called at the end of each step. */
  endStep(chip: AvrChip): void {
    if (this.left.isDriven || this.right.isDriven) this.lastDriven = chip.cycles;
    this.dutyLeft = this.left.endStep(chip.cycles);
    this.dutyRight = this.right.endStep(chip.cycles);
  }
}
