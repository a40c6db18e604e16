/**
 * The steering loop of one speed class: sampled lane plant and the firmware's control law.
 *
 * The law, per sample (y offset of the line at the bar, kappa curvature, a the filter coefficient):
 *
 *   change   = y - filtered;   filtered += a change
 *   kappa    = kp y + kd change
 *
 * so that from lateral error to commanded turn rate omega = v kappa
 *
 *   C(z) = v kp (1 + g (1 - z^-1) / (1 - (1 - a) z^-1)),   g = kd / kp = Td a / h
 *
 * a derivative of time Td with a first-order filter of time Tf, a = 1 - e^(-h/Tf).
 */
import type { Margins } from './design.js';
import { type LanePlant, type SampledLanePlant, plantResponse, samplePlant } from './lane-plant.js';
import { type Response, quickPeak, scanLoop } from './margins.js';

/** Gains of the law in physical units. */
export interface SteeringGains {
  /** Curvature per offset, 1/m^2. */
  proportionalPerM2: number;
  /** Derivative time, s. */
  derivativeTimeS: number;
  /** Coefficient of the derivative filter per sample, 0..1. */
  filterCoefficient: number;
}

/** Polynomials in z^-1, lowest power first. */
export interface SampledController {
  numerator: [number, number];
  denominator: [number, number];
  samplePeriodS: number;
}

/** The law as a transfer function from lateral error (m) to commanded turn rate (rad/s). */
export function controllerOf(
  gains: SteeringGains,
  speedMps: number,
  samplePeriodS: number,
): SampledController {
  const scale = speedMps * gains.proportionalPerM2;
  const ratio = (gains.derivativeTimeS * gains.filterCoefficient) / samplePeriodS;
  const pole = 1 - gains.filterCoefficient;
  return {
    numerator: [scale * (1 + ratio), -scale * (pole + ratio)],
    denominator: [1, -pole],
    samplePeriodS,
  };
}

/** Response of the controller at a frequency in rad/s. */
function controllerResponse(controller: SampledController, frequencyRadS: number): [number, number] {
  const angle = frequencyRadS * controller.samplePeriodS;
  const zr = Math.cos(angle);
  const zi = -Math.sin(angle);
  const [n0, n1] = controller.numerator;
  const [d0, d1] = controller.denominator;
  const nr = n0 + n1 * zr;
  const ni = n1 * zi;
  const dr = d0 + d1 * zr;
  const di = d1 * zi;
  const size = dr * dr + di * di;
  return [(nr * dr + ni * di) / size, (ni * dr - nr * di) / size];
}

/** Lowest frequency at which a lane loop is looked at, as a share of 1 / lag: far below any crossover. */
const LOWEST_SHARE = 0.01;

/** Open loop of plant and controller. */
function openLoop(sampled: SampledLanePlant, controller: SampledController): Response {
  return (w) => {
    const [gr, gi] = plantResponse(sampled, w);
    const [cr, ci] = controllerResponse(controller, w);
    return [gr * cr - gi * ci, gr * ci + gi * cr];
  };
}

/** Ms of the loop, for searches: coarse grid, refined peak; Infinity where it is unstable or only conditionally stable. */
export function loopPeak(plant: LanePlant, controller: SampledController): number {
  const loop = openLoop(samplePlant(plant), controller);
  return quickPeak(loop, LOWEST_SHARE / plant.lagS, Math.PI / plant.samplePeriodS);
}

/** Margins of the loop of plant and controller; an unstable loop has none of them. */
export function loopMargins(plant: LanePlant, controller: SampledController): Margins {
  const sampled = samplePlant(plant);
  const loop = openLoop(sampled, controller);
  const { beyondMinusOne, ...margins } = scanLoop(
    loop,
    LOWEST_SHARE / plant.lagS,
    Math.PI / plant.samplePeriodS,
  );
  const stable = !beyondMinusOne || closedLoopRadius(sampled, controller) < 1;
  return stable ? margins : { gainMargin: 0, phaseMarginDeg: 0, ms: Infinity };
}

/** Matrix of the closed loop; states e, psi, omega, filter memory, then the delayed commands. */
function closedLoopMatrix(plant: SampledLanePlant, controller: SampledController): number[][] {
  const [n0, n1] = controller.numerator;
  const pole = -controller.denominator[1];
  const delays = plant.wholeDelay + 1;
  const size = 4 + delays;
  const rows = Array.from({ length: size }, () => new Array<number>(size).fill(0));
  const set = (row: number, column: number, value: number) => {
    const line = rows[row] as number[];
    line[column] = (line[column] as number) + value;
  };
  // u[k] = -(n0 y[k] + w[k]),  w[k+1] = pole w[k] + (n1 + pole n0) y[k]
  const command: [number, number][] = [
    [0, -n0],
    [1, -n0 * plant.lookaheadM],
    [3, -1],
  ];
  const phi = [
    [1, plant.phi12, plant.phi13],
    [0, 1, plant.phi23],
    [0, 0, plant.phi33],
  ];
  for (let i = 0; i < 3; i++) {
    for (let j = 0; j < 3; j++) set(i, j, phi[i]![j]!);
    // gamma0 acts with the command of wholeDelay samples ago, gamma1 with the one before that
    if (plant.wholeDelay === 0) for (const [j, k] of command) set(i, j, plant.gamma0[i]! * k);
    else set(i, 3 + plant.wholeDelay, plant.gamma0[i]!);
    set(i, 4 + plant.wholeDelay, plant.gamma1[i]!);
  }
  set(3, 3, pole);
  set(3, 0, n1 + pole * n0);
  set(3, 1, (n1 + pole * n0) * plant.lookaheadM);
  for (const [j, k] of command) set(4, j, k);
  for (let i = 1; i < delays; i++) set(4 + i, 3 + i, 1);
  return rows;
}

/** Largest distance of a closed-loop pole from the origin, by Gelfand's formula on repeated squares. */
export function closedLoopRadius(plant: SampledLanePlant, controller: SampledController): number {
  let matrix = closedLoopMatrix(plant, controller);
  let log = 0;
  const squarings = 18;
  for (let i = 0; i < squarings; i++) {
    const norm = Math.max(...matrix.map((row) => row.reduce((sum, x) => sum + Math.abs(x), 0)));
    if (norm === 0) return 0;
    log += Math.log(norm) / 2 ** i;
    const scaled = matrix.map((row) => row.map((x) => x / norm));
    matrix = scaled.map((row) =>
      row.map((_, j) => row.reduce((sum, x, k) => sum + x * (scaled[k] as number[])[j]!, 0)),
    );
  }
  return Math.exp(log);
}

/** Time constant of the derivative filter, s. */
export function filterTimeS(gains: SteeringGains, samplePeriodS: number): number {
  return -samplePeriodS / Math.log1p(-gains.filterCoefficient);
}
