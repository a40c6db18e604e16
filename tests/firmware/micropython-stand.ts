/** A stand for the MicroPython firmware: the vehicle does not move, the test says what button and sensors do, and watches. */
import { type FirmwareDesign, renderFirmware } from '../../src/firmware/render.js';
import type { Surroundings } from '../../src/rehearsal/micropython-chip.js';
import type { PythonFile } from '../../src/rehearsal/micropython-interpreter.js';
import { MicroPythonMotors } from '../../src/rehearsal/micropython-motors.js';
import { PowerCut, type ProgramEnd, runProgram } from '../../src/rehearsal/micropython-program.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { SHEET } from './cart.js';

export interface Script {
  /** When the button is held down, s after power-on. */
  pressed?: readonly (readonly [fromS: number, toS: number])[];
  /** When the contact of the stop input is open, s after power-on. */
  opened?: readonly (readonly [fromS: number, toS: number])[];
  /** Share of sensor i that lies on the line, 0 to 1; by default the line lies under the middle. */
  share?: (sensor: number, timeS: number) => number;
  /** When the power is switched off, s. */
  endS: number;
  /** The user's own file, instead of the empty one. */
  hooks?: string;
  resetCause?: number;
}

interface Duties {
  timeS: number;
  left: number;
  right: number;
}

export interface Observed {
  end: ProgramEnd;
  /** Each change of the motors' duties. */
  duties: Duties[];
  /** Each change of the LED. */
  led: { timeS: number; lit: boolean }[];
}

class Stand implements Surroundings {
  readonly duties: Duties[] = [];
  readonly led: { timeS: number; lit: boolean }[] = [];
  private readonly motors: MicroPythonMotors;
  private timeS = 0;

  constructor(
    private readonly vehicle: Vehicle,
    private readonly script: Script,
    private readonly ledPin: number,
  ) {
    this.motors = new MicroPythonMotors(vehicle);
  }

  private sensor(gpio: number): number {
    return this.vehicle.bar.pins.findIndex((pin) => Number(pin.code) === gpio);
  }

  private share(gpio: number): number {
    const { length } = this.vehicle.bar.pins;
    const middle = (sensor: number) => (Math.abs(sensor - (length - 1) / 2) < 1 ? 1 : 0);
    return (this.script.share ?? middle)(this.sensor(gpio), this.timeS);
  }

  isSensor(gpio: number): boolean {
    return this.sensor(gpio) >= 0;
  }

  isMotor(gpio: number): boolean {
    return this.motors.isMotor(gpio);
  }

  count(gpio: number): number {
    const { ground, line } = this.vehicle.bar.calibration;
    const sensor = this.sensor(gpio);
    return Math.round(ground[sensor]! + this.share(gpio) * (line[sensor]! - ground[sensor]!));
  }

  level(gpio: number, timeS: number): boolean | undefined {
    if (this.isSensor(gpio)) return this.share(gpio) > 0.5 === (this.vehicle.bar.lineLevel === 'high');
    if (gpio === Number(this.vehicle.stopInput?.code))
      return this.script.opened?.some(([from, to]) => timeS >= from && timeS < to) ? undefined : false;
    if (gpio !== Number(this.vehicle.start.button.code)) return undefined;
    return this.script.pressed?.some(([from, to]) => timeS >= from && timeS < to) ? false : undefined;
  }

  drive(gpio: number, level: number): void {
    if (gpio === this.ledPin) this.led.push({ timeS: this.timeS, lit: level > 0 });
    this.motors.drive(gpio, level);
    const { dutyLeft: left, dutyRight: right } = this.motors;
    const last = this.duties.at(-1);
    if (left !== (last?.left ?? 0) || right !== (last?.right ?? 0))
      this.duties.push({ timeS: this.timeS, left, right });
  }

  advance(durationS: number): void {
    this.timeS += durationS;
    if (this.timeS > this.script.endS) throw new PowerCut();
  }
}

/** The files as they lie on the board. */
export async function boardFiles(design: FirmwareDesign, hooks?: string): Promise<PythonFile[]> {
  const files = await renderFirmware(SHEET, design);
  return files.map(({ path, text }) => {
    const name = path.slice(path.indexOf('/') + 1);
    return { path: name, text: name === 'user_hooks.py' && hooks !== undefined ? hooks : text };
  });
}

/** Runs a program's files on the stand. */
export async function filesOnStand(
  vehicle: Vehicle,
  files: readonly PythonFile[],
  script: Script,
): Promise<Observed> {
  const stand = new Stand(vehicle, script, vehicle.board.id === 'pico' ? 25 : 2);
  const end = await runProgram(files, vehicle.board, stand, script.resetCause);
  return { end, duties: stand.duties, led: stand.led };
}

/** Runs a design's firmware on the stand. */
export async function onStand(design: FirmwareDesign, script: Script): Promise<Observed> {
  return filesOnStand(design.vehicle, await boardFiles(design, script.hooks), script);
}

/** Duties that lasted: not those between the writing of one motor and of the other. */
export function lastingDuties({ duties }: Observed): Duties[] {
  return duties.filter(({ timeS }, i) => (duties[i + 1]?.timeS ?? Infinity) - timeS > 1e-3);
}

/** When the motors were first driven, s; undefined when never. */
export function drivenFromS({ duties }: Observed): number | undefined {
  return duties.find(({ left, right }) => left !== 0 || right !== 0)?.timeS;
}

/** When the motors were last switched off, s; undefined when they still run or never did. */
export function offFromS({ duties }: Observed): number | undefined {
  const last = duties.at(-1);
  return last?.left === 0 && last.right === 0 ? last.timeS : undefined;
}

/** The numbers of flashes that the LED gave in a row, each ended by a pause, from a time on. */
export function flashCodes({ led }: Observed, fromS: number): number[] {
  const flashes = led.filter(({ timeS, lit }) => lit && timeS >= fromS);
  const codes: number[] = [];
  let previousS = -Infinity;
  for (const { timeS } of flashes) {
    if (timeS - previousS > 0.7) codes.push(0);
    codes[codes.length - 1]! += 1;
    previousS = timeS;
  }
  return codes;
}
