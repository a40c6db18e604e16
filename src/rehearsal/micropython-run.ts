/**
 * One rehearsal in MicroPython: the virtual chip's pins wired to the plant, and the observer.
 *
 * The start button is pressed once, after the firmware has had time to see it released. The run begins, for plant and observer,
 * when a motor is first driven: start-up and countdown are not the rehearsal's subject. It ends when the observer says so; the
 * power is cut then, whatever the program is doing. If the program ends before, the vehicle rolls on with what its pins last said,
 * as it would; after a reset these float and the motors are off.
 */
import type { Vehicle } from '../vehicle/vehicle.js';
import { LedReader, WATCHED_S, ledPin } from './ending.js';
import type { RunResult, RunSetup } from './engine.js';
import { type Fault, stopIsOpen } from './fault.js';
import type { Surroundings } from './micropython-chip.js';
import { ChipReset } from './micropython-clock.js';
import { MicroPythonEncoders } from './micropython-encoders.js';
import { MicroPythonMotors } from './micropython-motors.js';
import { PowerCut, type ProgramEnd } from './micropython-program.js';
import { Plant } from './plant.js';
import { RunMonitor } from './run-monitor.js';
import type { ControlState } from './trace-recorder.js';

/** Longest step of the plant between two looks of the observer, s. */
const LOOK_S = 2e-3;
/** The button: pressed, and released again, s after power-on. */
const PRESS_S = 0.3;
const RELEASE_S = 0.45;
/** Time beyond the countdown in which the firmware has to set off, s. */
const SET_OFF_S = 2;
/** Motors undriven for so long: the firmware has stopped. A braking or slow vehicle drives them at least every few samples. */
const STOPPED_S = 0.15;

export class MicroPythonRun implements Surroundings {
  private readonly plant: Plant;
  private readonly monitor: RunMonitor;
  private readonly motors: MicroPythonMotors;
  private readonly state: ControlState = { dutyLeft: 0, dutyRight: 0, classIndex: -1, phase: -1 };
  private readonly sensorOfPin: ReadonlyMap<number, number>;
  private readonly buttonPin: number;
  private readonly stopPin: number | undefined;
  private readonly encoders: MicroPythonEncoders;
  private readonly setOffByS: number;
  /** Time before the first drive, s. */
  private standingS = 0;
  private started = false;
  private undrivenS = 0;

  private readonly faults: readonly Fault[];
  private readonly led: number | undefined;
  private readonly ledActiveLow: boolean;
  private readonly reader = new LedReader();
  private ledLit = false;
  /** The board has started anew: nobody presses the button again. */
  private rebooted = false;
  private supplyBroke = false;
  /** After the motors went off: watched for so long, s; and whether one was driven again. */
  private watchedS = 0;
  private restarted = false;

  constructor(vehicle: Vehicle, setup: RunSetup) {
    this.faults = setup.faults ?? [];
    const led = ledPin(vehicle);
    this.led = led && Number(led.pin.code);
    this.ledActiveLow = led?.activeLow ?? false;
    this.plant = new Plant(setup.plant, setup.lane, setup.faults);
    this.monitor = new RunMonitor(this.plant, setup);
    this.motors = new MicroPythonMotors(vehicle);
    this.sensorOfPin = new Map(vehicle.bar.pins.map((pin, i) => [Number(pin.code), i]));
    this.buttonPin = Number(vehicle.start.button.code);
    this.stopPin = vehicle.stopInput && Number(vehicle.stopInput.code);
    this.encoders = new MicroPythonEncoders(vehicle);
    this.setOffByS = RELEASE_S + vehicle.start.countdownS + SET_OFF_S;
  }

  isSensor(gpio: number): boolean {
    return this.sensorOfPin.has(gpio);
  }

  isMotor(gpio: number): boolean {
    return this.motors.isMotor(gpio);
  }

  count(gpio: number): number {
    const sensor = this.sensorOfPin.get(gpio);
    return sensor === undefined ? 0 : this.plant.count(sensor);
  }

  level(gpio: number, timeS: number): boolean | undefined {
    if (gpio === this.buttonPin && this.rebooted) return undefined;
    if (gpio === this.buttonPin) return timeS >= PRESS_S && timeS < RELEASE_S ? false : undefined;
    if (gpio === this.stopPin) return stopIsOpen(this.faults, this.plant.timeS) ? undefined : false;
    const sensor = this.sensorOfPin.get(gpio);
    return sensor === undefined ? this.encoders.level(gpio) : this.plant.count(sensor) === 1;
  }

  edge(gpio: number): boolean {
    return this.encoders.edge(gpio);
  }

  readonly hangs = (): boolean =>
    this.started &&
    !this.rebooted &&
    this.faults.some(({ kind, atS }) => kind === 'program' && this.plant.timeS >= atS);

  drive(gpio: number, level: number): void {
    if (gpio === this.led) this.ledLit = level > 0 !== this.ledActiveLow;
    this.motors.drive(gpio, level);
    if (this.motors.dutyLeft !== 0 || this.motors.dutyRight !== 0) this.started = true;
  }

  advance(durationS: number): void {
    if (this.monitor.ended) this.watch(durationS);
    else if (this.started) this.roll(durationS, false);
    else this.stand(durationS);
    if (this.breaksSupply()) {
      this.supplyBroke = true;
      throw new ChipReset('The supply broke down.');
    }
    if (this.watched || this.standsForGood) throw new PowerCut();
  }

  /** Waits for the vehicle to set off; with faults it may not, and its LED says why. */
  private stand(durationS: number): void {
    this.standingS += durationS;
    if (this.standingS > this.setOffByS) this.reader.look(this.ledLit, this.standingS);
  }

  private get standsForGood(): boolean {
    if (this.started || this.standingS <= this.setOffByS) return false;
    const seen = this.faults.length === 0 || this.reader.flashes !== undefined;
    return seen || this.standingS > this.setOffByS + WATCHED_S;
  }

  /** Nothing more is to be learnt from this run. */
  private get watched(): boolean {
    if (!this.monitor.ended || this.faults.length === 0) return this.monitor.ended;
    return this.reader.flashes !== undefined || this.watchedS > WATCHED_S || !this.motorsOff;
  }

  private get motorsOff(): boolean {
    return this.monitor.stoppedByFirmware;
  }

  private breaksSupply(): boolean {
    if (this.supplyBroke || !this.started) return false;
    return this.faults.some(({ kind, atS }) => kind === 'supply' && this.plant.timeS >= atS);
  }

  /** Reads the LED of a vehicle whose motors are off. */
  private watch(durationS: number): void {
    this.watchedS += durationS;
    this.reader.look(this.ledLit, this.watchedS);
    if (this.motors.dutyLeft !== 0 || this.motors.dutyRight !== 0) this.restarted = true;
  }

  /** Lets the vehicle drive on with the duties in force, until the time is over or the run is. */
  private roll(durationS: number, programEnded: boolean): void {
    const { plant, monitor, motors, state } = this;
    state.dutyLeft = motors.dutyLeft;
    state.dutyRight = motors.dutyRight;
    const driven = state.dutyLeft !== 0 || state.dutyRight !== 0;
    const steps = Math.ceil(durationS / LOOK_S - 1e-9);
    for (let i = 0; i < steps && !monitor.ended; i++) {
      plant.step(state.dutyLeft, state.dutyRight, durationS / steps);
      this.encoders.look(plant);
      this.undrivenS = driven ? 0 : this.undrivenS + durationS / steps;
      monitor.observe(state, this.undrivenS > STOPPED_S || (programEnded && !driven));
    }
  }

  /** The outcome, after the program has ended. */
  result(end: ProgramEnd): RunResult {
    const result = this.outcome(end);
    if (result.ending === undefined) return result;
    const { reason } = this.reader;
    return { ...result, ending: { ...result.ending, reason, restarted: this.restarted } };
  }

  /** Takes the pins back to where they are after a reset; the vehicle rolls on until the observer has seen it. */
  afterReset(): void {
    this.rebooted = true;
    this.motors.release();
    this.ledLit = false;
    while (!this.monitor.ended) this.roll(LOOK_S, true);
  }

  private outcome(end: ProgramEnd): RunResult {
    if (end.by === 'reset') this.motors.release();
    while (!this.monitor.ended) this.roll(LOOK_S, true);
    const result = this.monitor.result();
    const detail = end.detail !== '' || this.started ? end.detail : 'The firmware did not set off.';
    if (result.loss === undefined || detail === '') return result;
    return { ...result, loss: { ...result.loss, detail } };
  }
}
