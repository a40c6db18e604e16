/**
 * Rehearses the controller itself, the twin of the firmware's arithmetic.
 *
 * One sample period: the sensors are read at its start; scanning and computing take `delayS`, during which the duties of the
 * period before stay on; then the new ones take over; at its end the observer looks. The delay varies by the plant's loop jitter;
 * the period, a hardware tick, does not. Duties are rounded to the steps of the board's PWM.
 */
import { FULL_DUTY } from '../controller/constants.js';
import type { Engine, RunResult, RunSetup } from './engine.js';
import { Plant } from './plant.js';
import { type PlantParameters, STREAM } from './plant-parameters.js';
import { Random } from './random.js';
import { RunMonitor } from './run-monitor.js';
import type { ControlState } from './trace-recorder.js';
import type { WheelEdges } from './wheel-edges.js';

/** Longest step of the plant, s. */
const STEP_S = 5e-3;

/** A controller that can be stepped once a sample period. */
export interface ControlStep {
  /** @param counts one reading a sensor, leftmost first: counts; pin levels 0 and 1 of a digital bar */
  step(counts: Int32Array): void;
  /** The wheel loops, with encoders. */
  readonly wheels?: { count(left: number, right: number): void; readonly blocked: boolean } | undefined;
  /** -4096 (full reverse) to 4096. */
  readonly dutyLeft: number;
  readonly dutyRight: number;
  readonly classIndex: number;
  readonly phase: number;
  /** The controller has given up and keeps the motors off. */
  readonly stopped: boolean;
}

export interface TwinTiming {
  samplePeriodS: number;
  /** From reading the sensors to the new duties, s; above 0 and below the sample period. */
  delayS: number;
  /** PWM steps from off to full. */
  pwmSteps: number;
  /** Makes the encoders of a run, for a vehicle that has them. */
  makeEdges?: () => WheelEdges;
}

export class TwinEngine implements Engine {
  readonly name = 'twin';

  /** @param makeControl makes a controller in its initial state, about to drive off */
  constructor(
    private readonly makeControl: () => ControlStep,
    private readonly timing: TwinTiming,
  ) {
    if (!(timing.delayS > 0 && timing.delayS < timing.samplePeriodS)) {
      throw new RangeError(
        `A delay of ${timing.delayS} s does not fit into a sample period of ${timing.samplePeriodS} s.`,
      );
    }
  }

  async run(setup: RunSetup): Promise<RunResult> {
    return this.runNow(setup);
  }

  /** The same without a promise. */
  runNow(setup: RunSetup): RunResult {
    const { samplePeriodS, delayS, pwmSteps } = this.timing;
    const earliestS = 0.01 * samplePeriodS;
    const latestS = 0.995 * samplePeriodS;
    const { loopJitterS } = setup.plant;
    const jitter = new Random(setup.plant.seed, STREAM.jitter);
    const control = this.makeControl();
    const edges = this.timing.makeEdges?.();
    const plant = new Plant(setup.plant, setup.lane, setup.faults);
    const monitor = new RunMonitor(plant, setup);
    const counts = new Int32Array(plant.sensorCount);
    const mixed = new Set(setup.plant.kinds).size > 1;
    const state: ControlState = { dutyLeft: 0, dutyRight: 0, classIndex: -1, phase: -1 };

    while (!monitor.ended) {
      plant.readCounts(counts);
      if (mixed) levelsToCounts(counts, setup.plant);
      if (edges && control.wheels) {
        edges.look(plant);
        control.wheels.count(edges.left, edges.right);
      }
      control.step(counts);
      const lateS = loopJitterS === 0 ? 0 : jitter.uniform(-loopJitterS, loopJitterS);
      const actS = Math.min(Math.max(delayS + lateS, earliestS), latestS);
      // short times directly: a number handed on to a function would be put on the heap
      if (actS <= STEP_S) plant.step(state.dutyLeft, state.dutyRight, actS);
      else drive(plant, state, actS);
      state.dutyLeft = inPwmSteps(control.dutyLeft, pwmSteps);
      state.dutyRight = inPwmSteps(control.dutyRight, pwmSteps);
      state.classIndex = control.classIndex;
      state.phase = control.phase;
      const restS = samplePeriodS - actS;
      if (restS <= STEP_S) plant.step(state.dutyLeft, state.dutyRight, restS);
      else drive(plant, state, restS);
      monitor.observe(state, control.stopped || (control.wheels?.blocked ?? false));
    }
    return withReason(monitor.result(), control);
  }
}

/** In a mixed bar the firmware reads a level as the converter would: full scale over the line, 0 over ground. */
function levelsToCounts(counts: Int32Array, { kinds, lineLevel, adcMaxCount }: PlantParameters): void {
  const onLine = lineLevel === 'high' ? 1 : 0;
  for (let i = 0; i < counts.length; i++)
    if (kinds[i] === 'digital') counts[i] = counts[i] === onLine ? adcMaxCount : 0;
}

/** The twin itself knows why it stopped. */
function withReason(result: RunResult, { stopped, wheels }: ControlStep): RunResult {
  if (result.ending === undefined) return result;
  const reason = stopped ? 'LineLost' : wheels?.blocked === true ? 'WheelBlocked' : null;
  return { ...result, ending: { ...result.ending, reason } };
}

/** A duty, -1 to 1, as the PWM can give it: the same steps forward and in reverse. */
function inPwmSteps(duty: number, pwmSteps: number): number {
  const steps = Math.floor((Math.abs(duty) / FULL_DUTY) * pwmSteps + 0.5) / pwmSteps;
  return duty < 0 ? -steps : steps;
}

/** Lets time pass with constant duties, in steps that the plant can take. */
function drive(plant: Plant, { dutyLeft, dutyRight }: ControlState, timeS: number): void {
  const steps = Math.ceil(timeS / STEP_S - 1e-9);
  for (let i = 0; i < steps; i++) plant.step(dutyLeft, dutyRight, timeS / steps);
}
