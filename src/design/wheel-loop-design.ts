/**
 * The wheel loop of a vehicle with encoders.
 *
 * Wheel: gain g and lag tau from the duty's speed to the wheel's, first order, sampled exactly with its delay (Astrom and Wittenmark,
 * Computer-Controlled Systems); the encoder shows the mean speed over a window. Controller: PI by the SIMC rule (Skogestad 2003),
 *
 *   Kc = tau / (tc + theta),  Ti = min(tau, 4 (tc + theta)),   theta = delay of command and window,
 *
 * with the quickest tc that keeps gain margin, phase margin and Ms over the whole tolerance box. Tracking time of the
 * back-calculation: Ti (Astrom and Hagglund, PID Controllers).
 */
import type { WheelLoopConstants } from '../controller/constants.js';
import { edgesPerS, windowBits } from '../vehicle/encoder.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { delayBudget } from './delay.js';
import type { Margins } from './design.js';
import { type Response, marginsOf } from './margins.js';
import { toleranceCorners } from './tolerance-box.js';
import { wheelLoopConstants } from './wheel-loop-constants.js';

/** What every corner keeps: more than the lane loop's, so that the wheel is quicker and calmer than what it serves. */
export const WHEEL_MARGINS: Margins = { gainMargin: 2.5, phaseMarginDeg: 45, ms: 1.6 };
/** Growth of tc from try to try, and the most tries. */
const SLOWER = 1.15;
const TRIES = 40;

export interface WheelLoopDesign {
  /** Samples over which edges are counted. */
  windowSamples: number;
  /** Edges in a window at full speed. */
  edgesAtTop: number;
  /** Delay of command and window together, s. */
  delayS: number;
  closedLoopTimeS: number;
  gain: number;
  integralTimeS: number;
  /** At the nominal motor, and the worst over the tolerance box. */
  margins: Margins;
  worstMargins: Margins;
  constants: WheelLoopConstants;
}

interface Motor {
  gain: number;
  lagS: number;
}

/** A lag of first order and unit gain, sampled with a delay of less than a period: x(k + 1) = kept x + late u(k) + early u(k - 1). */
export function sampledLag(
  lagS: number,
  delayS: number,
  periodS: number,
): { kept: number; late: number; early: number } {
  const kept = Math.exp(-periodS / lagS);
  const late = -Math.expm1(-(periodS - delayS) / lagS);
  return { kept, late, early: 1 - kept - late };
}

/** Response of command to measured speed: hold, delay, motor and window, at w rad/s. */
function wheelResponse(
  motor: Motor,
  commandDelayS: number,
  windowSamples: number,
  periodS: number,
): Response {
  const whole = Math.floor(commandDelayS / periodS + 1e-9);
  const part = Math.max(0, commandDelayS - whole * periodS);
  const { kept, late, early } = sampledLag(motor.lagS, part, periodS);
  return (w) => {
    const angle = w * periodS;
    const [zr, zi] = [Math.cos(angle), Math.sin(angle)];
    // (late + early / z) / (z - kept), 1/z being the conjugate
    const [nr, ni] = [late + early * zr, -early * zi];
    const [dr, di] = [zr - kept, zi];
    const size = dr * dr + di * di;
    const [pr, pi] = [(motor.gain * (nr * dr + ni * di)) / size, (motor.gain * (ni * dr - nr * di)) / size];
    // the encoder shows the mean over `windowSamples` periods, half a window late
    const half = (windowSamples * angle) / 2;
    const mean = half < 1e-9 ? 1 : Math.sin(half) / half;
    const turn = -half - whole * angle;
    const [mr, mi] = [mean * Math.cos(turn), mean * Math.sin(turn)];
    return [pr * mr - pi * mi, pr * mi + pi * mr];
  };
}

function loopOf(wheel: Response, gain: number, integralTimeS: number, periodS: number): Response {
  return (w) => {
    const [pr, pi] = wheel(w);
    // gain (1 + h / (Ti (z - 1))), summed after use
    const angle = w * periodS;
    const sum = periodS / integralTimeS;
    const [dr, di] = [Math.cos(angle) - 1, Math.sin(angle)];
    const size = dr * dr + di * di;
    const [cr, ci] = [gain * (1 + (sum * dr) / size), (-gain * sum * di) / size];
    return [cr * pr - ci * pi, cr * pi + ci * pr];
  };
}

function keepsAll({ gainMargin, phaseMarginDeg, ms }: Margins): boolean {
  return (
    gainMargin >= WHEEL_MARGINS.gainMargin &&
    phaseMarginDeg >= WHEEL_MARGINS.phaseMarginDeg &&
    ms <= WHEEL_MARGINS.ms
  );
}

function worst(all: readonly Margins[]): Margins {
  return {
    gainMargin: Math.min(...all.map((each) => each.gainMargin)),
    phaseMarginDeg: Math.min(...all.map((each) => each.phaseMarginDeg)),
    ms: Math.max(...all.map((each) => each.ms)),
  };
}

/** The wheel loop of a vehicle; undefined without encoders. */
export function wheelLoopDesign(vehicle: Vehicle): WheelLoopDesign | undefined {
  const { encoders, drive, board } = vehicle;
  if (encoders === undefined) return undefined;
  const periodS = board.samplePeriodS;
  const edgesInSample = edgesPerS(encoders.linesPerTurn, drive.wheelDiameterM, drive.topSpeedMps) * periodS;
  const bits = windowBits(edgesInSample, drive.lagS, periodS);
  const windowSamples = 2 ** bits;
  const commandDelayS = delayBudget(vehicle).totalS;
  const delayS = commandDelayS + (periodS * (windowSamples + 1)) / 2;
  const motors = toleranceCorners(vehicle).map(({ gain, lag }) => ({ gain, lagS: drive.lagS * lag }));
  const wheels = motors.map((motor) => wheelResponse(motor, commandDelayS, windowSamples, periodS));
  const marginsAt = (gain: number, integralTimeS: number): Margins[] =>
    wheels.map((wheel) =>
      marginsOf(loopOf(wheel, gain, integralTimeS, periodS), 0.01 / drive.lagS, Math.PI / periodS),
    );
  let closedLoopTimeS = delayS;
  let gain = 0;
  let integralTimeS = 0;
  let found: Margins[] = [];
  for (let i = 0; i < TRIES; i++) {
    gain = drive.lagS / (closedLoopTimeS + delayS);
    integralTimeS = Math.min(drive.lagS, 4 * (closedLoopTimeS + delayS));
    found = marginsAt(gain, integralTimeS);
    if (keepsAll(worst(found))) break;
    closedLoopTimeS *= SLOWER;
  }
  return {
    windowSamples,
    edgesAtTop: edgesInSample * windowSamples,
    delayS,
    closedLoopTimeS,
    gain,
    integralTimeS,
    margins: found[0]!,
    worstMargins: worst(found),
    constants: wheelLoopConstants(vehicle, { windowBits: bits, edgesInSample, gain, integralTimeS }),
  };
}
