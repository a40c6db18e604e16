/**
 * Rehearses the compiled firmware itself on the emulated chip of the board, wired to the plant.
 *
 * In steps of 128 us the chip runs, then the plant with the duties that the pins gave. Analog sensors are sampled when the
 * converter starts; digital ones put their levels on their pins after each step. The start button is pressed once, after the
 * firmware has had time to see it released. The run begins, for plant and observer, when a motor is first driven: start-up and
 * countdown are not the rehearsal's subject.
 */
import { type FirmwareDesign, type SheetIdentity, renderFirmware } from '../firmware/render.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { AvrChip, CLOCK_HZ, pinNumber } from './chip-avr.js';
import { type ChipImage, buildSketch } from './chip-build.js';
import { type ChipEncoders, chipEncoders } from './chip-encoders.js';
import { ChipMotors } from './chip-motors.js';
import { LedReader, WATCHED_S, ledPin, type Ending } from './ending.js';
import { type Fault, stopIsOpen } from './fault.js';
import type { Engine, RunResult, RunSetup } from './engine.js';
import { Plant } from './plant.js';
import { RunMonitor } from './run-monitor.js';
import type { ControlState } from './trace-recorder.js';

const STEP_CYCLES = 2048;
const STEP_S = STEP_CYCLES / CLOCK_HZ;
/** The button: pressed, and released again, s after power-on. */
const PRESS_S = 0.1;
const RELEASE_S = 0.25;
/** Time beyond the countdown in which the firmware has to set off, s. */
const SET_OFF_S = 2;
/** Motors undriven for so long: the firmware has stopped. A braking or slow vehicle drives them at least every few samples. */
const STOPPED_S = 0.15;

/** One run: chip, plant and observer together. */
class ChipRun {
  private readonly plant: Plant;
  private readonly monitor: RunMonitor;
  private readonly motors: ChipMotors;
  private readonly chip: AvrChip;
  /** Pins of the digital sensors, and which sensor each is. */
  private readonly sensorPins: readonly (readonly [pin: number, sensor: number])[];
  private readonly buttonPin: number;
  private readonly stopPin: number | undefined;
  private readonly encoders: ChipEncoders | undefined;
  private readonly broken = new Set<Fault>();

  constructor(
    image: ChipImage,
    private readonly vehicle: Vehicle,
    private readonly setup: RunSetup,
  ) {
    this.plant = new Plant(setup.plant, setup.lane, setup.faults);
    this.monitor = new RunMonitor(this.plant, setup);
    this.motors = new ChipMotors(vehicle, STEP_CYCLES);
    const sensorOfChannel = new Map(vehicle.bar.pins.map((pin, i) => [pin.adc?.channel, i]));
    this.sensorPins = vehicle.bar.pins.flatMap((pin, i) =>
      vehicle.bar.kinds[i] === 'digital' ? [[pinNumber(pin), i] as const] : [],
    );
    this.buttonPin = pinNumber(vehicle.start.button);
    this.stopPin = vehicle.stopInput && pinNumber(vehicle.stopInput);
    this.encoders = chipEncoders(vehicle);
    this.chip = new AvrChip(image.program, vehicle.board, {
      sample: (channel) => {
        const sensor = sensorOfChannel.get(channel);
        return sensor === undefined ? 0 : this.plant.count(sensor);
      },
      pinsChanged: () => this.motors.look(this.chip),
    });
  }

  private step(index: number): void {
    const timeS = index * STEP_S;
    this.chip.setPin(this.buttonPin, !(timeS >= PRESS_S && timeS < RELEASE_S));
    if (this.stopPin !== undefined)
      this.chip.setPin(this.stopPin, stopIsOpen(this.setup.faults, this.plant.timeS));
    for (const [pin, i] of this.sensorPins) this.chip.setPin(pin, this.plant.count(i) === 1);
    const from = index * STEP_CYCLES;
    if (this.encoders) this.encoders.runThrough(this.chip, this.plant, from, STEP_CYCLES);
    else this.chip.runTo(from + STEP_CYCLES);
    this.motors.endStep(this.chip);
  }

  run(): RunResult {
    const { plant, monitor, motors, chip } = this;
    const state: ControlState = { dutyLeft: 0, dutyRight: 0, classIndex: -1, phase: -1 };
    const setOffBy = (RELEASE_S + this.vehicle.start.countdownS + SET_OFF_S) / STEP_S;
    let index = 0;
    while (motors.lastDriven < 0 && index < setOffBy) this.step(index++);
    while (!monitor.ended) {
      this.break(plant.timeS);
      this.step(index++);
      state.dutyLeft = motors.dutyLeft;
      state.dutyRight = motors.dutyRight;
      plant.step(state.dutyLeft, state.dutyRight, STEP_S);
      monitor.observe(state, chip.cycles - motors.lastDriven > STOPPED_S * CLOCK_HZ);
    }
    const result = monitor.result();
    return result.ending?.motorsOff === true
      ? { ...result, ending: this.watch(result.ending, index) }
      : result;
  }

  /** Faults of program and supply, when their time has come. */
  private break(timeS: number): void {
    for (const fault of this.setup.faults ?? []) {
      if (timeS < fault.atS || this.broken.has(fault)) continue;
      this.broken.add(fault);
      if (fault.kind === 'program') this.chip.hang();
      if (fault.kind === 'supply') this.chip.breakDown();
    }
  }

  /** Reads the LED of a vehicle whose motors are off, and whether they stay so. */
  private watch(ending: Ending, from: number): Ending {
    const { chip, motors } = this;
    const led = ledPin(this.vehicle);
    const reader = new LedReader();
    const { lastDriven } = motors;
    const until = from + WATCHED_S / STEP_S;
    for (let index = from; index < until && reader.flashes === undefined; index++) {
      this.step(index);
      if (led !== undefined) reader.look(chip.isHigh(pinNumber(led.pin)) !== led.activeLow, index * STEP_S);
    }
    return { ...ending, reason: reader.reason, restarted: motors.lastDriven > lastDriven };
  }
}

export class ChipEngine implements Engine {
  readonly name = 'chip';

  constructor(
    readonly image: ChipImage,
    private readonly vehicle: Vehicle,
  ) {}

  async run(setup: RunSetup): Promise<RunResult> {
    return new ChipRun(this.image, this.vehicle, setup).run();
  }
}

/**
 * Renders and compiles a design's firmware for the chip.
 *
 * @throws FairleadError with exit code 5 when a tool is missing
 */
export async function chipEngine(sheet: SheetIdentity, design: FirmwareDesign): Promise<ChipEngine> {
  const { vehicle } = design;
  const image = await buildSketch(await renderFirmware(sheet, design), vehicle.board.id);
  return new ChipEngine(image, vehicle);
}
