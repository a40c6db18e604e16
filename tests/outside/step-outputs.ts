import type { SampledLanePlant } from '../../src/design/lane-plant.js';

/** First outputs of the sampled plant to a unit step. */
export function stepOutputs(plant: SampledLanePlant, count: number): number[] {
  let [error, heading, turn] = [0, 0, 0];
  const outputs: number[] = [];
  for (let k = 0; k < count; k++) {
    outputs.push(error + plant.lookaheadM * heading);
    const now = k >= plant.wholeDelay ? 1 : 0;
    const late = k > plant.wholeDelay ? 1 : 0;
    const next: [number, number, number] = [
      error + plant.phi12 * heading + plant.phi13 * turn,
      heading + plant.phi23 * turn,
      plant.phi33 * turn,
    ];
    for (const i of [0, 1, 2] as const) next[i] += plant.gamma0[i] * now + plant.gamma1[i] * late;
    [error, heading, turn] = next;
  }
  return outputs;
}
