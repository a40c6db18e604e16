/**
 * What the motors get from the pins: the driver's input table (src/vehicle/drivers.ts) on the pins' mean levels.
 *
 * A PWM pin's level is the mean of its signal, 0 to 1; its period is short against everything else here, so the mean is what
 * the plant's dead zone and speed line are stated for.
 */
import type { PinFacts } from '../vehicle/board-facts.js';
import type { MotorWiring, Vehicle } from '../vehicle/vehicle.js';

/** Follows the pins of both motors. */
export class MicroPythonMotors {
  /** -1 to 1; positive turns the wheel forward. */
  dutyLeft = 0;
  dutyRight = 0;
  private readonly levels = new Map<number, number>();

  constructor(private readonly vehicle: Vehicle) {
    const { left, right, standby } = vehicle.drive;
    for (const pin of [
      left.pwm,
      left.dir,
      left.in1,
      left.in2,
      right.pwm,
      right.dir,
      right.in1,
      right.in2,
      standby,
    ])
      if (pin !== undefined) this.levels.set(Number(pin.code), 0);
  }

  isMotor(gpio: number): boolean {
    return this.levels.has(gpio);
  }

  /** Takes a pin's new level; pins that lead elsewhere are ignored. */
  drive(gpio: number, level: number): void {
    if (!this.levels.has(gpio)) return;
    this.levels.set(gpio, level);
    this.dutyLeft = this.duty(this.vehicle.drive.left);
    this.dutyRight = this.duty(this.vehicle.drive.right);
  }

  /** All pins float, as after a reset: the driver's inputs are pulled low. */
  release(): void {
    for (const gpio of this.levels.keys()) this.levels.set(gpio, 0);
    this.dutyLeft = this.dutyRight = 0;
  }

  private level(pin: PinFacts | undefined): number {
    return pin === undefined ? 0 : (this.levels.get(Number(pin.code)) ?? 0);
  }

  private duty(wiring: MotorWiring): number {
    const { scheme, standby } = this.vehicle.drive;
    const forward = wiring.inverted ? -1 : 1;
    if (scheme === 'pwm-dir') {
      const side = this.level(wiring.dir) > 0 ? forward : -forward;
      return side * this.level(wiring.pwm);
    }
    const inputs = forward * (this.level(wiring.in1) - this.level(wiring.in2));
    if (scheme === 'dual-pwm') return inputs;
    const awake = standby === undefined ? 1 : this.level(standby);
    return awake * this.level(wiring.pwm) * inputs;
  }
}
