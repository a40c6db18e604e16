/** Poles of the closed loop of a sampled lane plant and a controller, as one number: how far out the outermost lies. */
import type { SampledLanePlant } from './lane-plant.js';
import type { SampledController } from './sampled-controller.js';

/** Squarings of the matrix: at a power of 2^24 the norm tells the logarithm of the radius to 1e-6, less than a slow integral part needs. */
const SQUARINGS = 24;

/**
 * Matrix of the closed loop. States: e, psi, omega, the controller's own in observer form, then the commands
 * of the last samples.
 *
 *   u[k] = -(n0 y[k] + c1[k]),  ci[k+1] = -di c1[k] + c(i+1)[k] + (ni - di n0) y[k]
 */
function closedLoopMatrix(plant: SampledLanePlant, controller: SampledController): number[][] {
  const order = Math.max(controller.numerator.length, controller.denominator.length) - 1;
  const n = (i: number) => controller.numerator[i] ?? 0;
  const d = (i: number) => controller.denominator[i] ?? 0;
  const commands = plant.wholeDelay + 1;
  const firstCommand = 3 + order;
  const size = firstCommand + commands;
  const rows = Array.from({ length: size }, () => new Array<number>(size).fill(0));
  const add = (row: number, column: number, value: number) => {
    const line = rows[row] as number[];
    line[column] = (line[column] as number) + value;
  };
  const command: [number, number][] = [
    [0, -n(0)],
    [1, -n(0) * plant.lookaheadM],
  ];
  if (order > 0) command.push([3, -1]);
  const phi = [
    [1, plant.phi12, plant.phi13],
    [0, 1, plant.phi23],
    [0, 0, plant.phi33],
  ];
  for (let i = 0; i < 3; i++) {
    for (let j = 0; j < 3; j++) add(i, j, phi[i]![j]!);
    // gamma0 acts with the command of wholeDelay samples ago, gamma1 with the one before that
    if (plant.wholeDelay === 0) for (const [j, k] of command) add(i, j, plant.gamma0[i]! * k);
    else add(i, firstCommand - 1 + plant.wholeDelay, plant.gamma0[i]!);
    add(i, firstCommand + plant.wholeDelay, plant.gamma1[i]!);
  }
  for (let i = 1; i <= order; i++) {
    const gain = n(i) - d(i) * n(0);
    add(2 + i, 3, -d(i));
    if (i < order) add(2 + i, 3 + i, 1);
    add(2 + i, 0, gain);
    add(2 + i, 1, gain * plant.lookaheadM);
  }
  for (const [j, k] of command) add(firstCommand, j, k);
  for (let i = 1; i < commands; i++) add(firstCommand + i, firstCommand + i - 1, 1);
  return rows;
}

/** Largest distance of a closed-loop pole from the origin, by Gelfand's formula on repeated squares. */
export function closedLoopRadius(plant: SampledLanePlant, controller: SampledController): number {
  let matrix = closedLoopMatrix(plant, controller);
  let log = 0;
  for (let i = 0; i < SQUARINGS; i++) {
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
