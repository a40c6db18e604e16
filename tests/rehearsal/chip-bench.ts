/** A chip on the bench: sensors and button under the test's control, motors and LED watched. */
import type { FirmwareDesign, RenderedFile } from '../../src/firmware/render.js';
import { renderFirmware } from '../../src/firmware/render.js';
import { AvrChip, CLOCK_HZ, pinNumber } from '../../src/rehearsal/chip-avr.js';
import { type ChipImage, buildSketch } from '../../src/rehearsal/chip-build.js';
import { ChipMotors } from '../../src/rehearsal/chip-motors.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { SHEET } from '../firmware/cart.js';

const STEP_CYCLES = 2048;
const LED_PIN = 13;
/** A pause of the LED that is longer than any within a code, s. */
const CODE_PAUSE_S = 0.9;

/** Compiles a sketch, with the body of userSample() replaced where one is given. */
export async function imageOf(design: FirmwareDesign, userSample?: string): Promise<ChipImage> {
  const files = await renderFirmware(SHEET, design);
  const withHook = (file: RenderedFile): RenderedFile => {
    if (userSample === undefined || !file.path.endsWith('user_hooks.cpp')) return file;
    const hook = `void userSample(const Steering&) { ${userSample} }`;
    return {
      ...file,
      text: `#include <Arduino.h>\n${file.text.replace('void userSample(const Steering&) {}', hook)}`,
    };
  };
  return buildSketch(files.map(withHook), design.vehicle.board.id);
}

export class ChipBench {
  readonly chip: AvrChip;
  readonly motors: ChipMotors;
  /** Times at which the first sensor was sampled, s. */
  readonly sampledS: number[] = [];
  private readonly buttonPin: number;
  private steps = 0;

  /** @param counts reading of each sensor, leftmost first; may be changed while running */
  constructor(
    image: ChipImage,
    private readonly vehicle: Vehicle,
    public counts: readonly number[],
  ) {
    this.motors = new ChipMotors(vehicle, STEP_CYCLES);
    this.buttonPin = pinNumber(vehicle.start.button);
    const channels = vehicle.bar.pins.map((pin) => pin.adc?.channel);
    this.chip = new AvrChip(image.program, vehicle.board, {
      sample: (channel) => {
        const sensor = channels.indexOf(channel);
        if (sensor === 0) this.sampledS.push(this.timeS);
        return this.counts[sensor] ?? 0;
      },
      pinsChanged: () => this.motors.look(this.chip),
    });
    this.release();
    this.openStop(false);
  }

  /** Opens or closes the contact of the stop input, where there is one. */
  openStop(open: boolean): void {
    if (this.vehicle.stopInput) this.chip.setPin(pinNumber(this.vehicle.stopInput), open);
  }

  get timeS(): number {
    return this.chip.cycles / CLOCK_HZ;
  }

  get isDriven(): boolean {
    return this.motors.lastDriven >= 0 && this.chip.cycles - this.motors.lastDriven < 0.05 * CLOCK_HZ;
  }

  hold(): void {
    this.chip.setPin(this.buttonPin, false);
  }

  release(): void {
    this.chip.setPin(this.buttonPin, true);
  }

  /** Runs for a time, or until something is so; returns whether it was. */
  run(timeS: number, until: () => boolean = () => false): boolean {
    const end = this.timeS + timeS;
    while (this.timeS < end) {
      this.steps++;
      this.chip.runTo(this.steps * STEP_CYCLES);
      this.motors.endStep(this.chip);
      if (until()) return true;
    }
    return false;
  }

  /** Presses the button for 60 ms, with contacts that bounce for 3 ms each way. */
  press(): void {
    for (const levels of [
      [true, false],
      [false, true],
    ]) {
      for (let i = 0; i < 8; i++) {
        this.chip.setPin(this.buttonPin, levels[(i + 1) % 2]!);
        this.run(0.4e-3);
      }
      this.chip.setPin(this.buttonPin, levels[1]!);
      this.run(0.06);
    }
  }

  /** Starts a run and lets it drive off. */
  start(): void {
    this.run(0.1);
    this.press();
    this.run(this.vehicle.start.countdownS + 0.2, () => this.isDriven);
  }

  /** Flashes of the LED between one long pause and the next; groups that a short pause parts. */
  flashes(): number[] {
    const isLit = () => this.chip.isHigh(LED_PIN);
    this.run(20, () => isLit());
    const darkFor = (timeS: number) => !this.run(timeS, isLit);
    while (!darkFor(CODE_PAUSE_S)) this.run(20, () => !isLit());
    this.run(20, isLit);
    const groups = [0];
    for (;;) {
      groups[groups.length - 1]!++;
      this.run(20, () => !isLit());
      if (!darkFor(0.35)) continue;
      if (darkFor(CODE_PAUSE_S - 0.35)) return groups;
      groups.push(0);
    }
  }
}

/** Readings with the line so far left of the bar's middle, m, by which sensors it covers. */
export function lineAt(vehicle: Vehicle, offsetM: number): number[] {
  const { bar, line } = vehicle;
  return bar.positionsM.map((position, i) =>
    Math.abs(position - offsetM) <= line.widthM / 2 ? bar.calibration.line[i]! : bar.calibration.ground[i]!,
  );
}
