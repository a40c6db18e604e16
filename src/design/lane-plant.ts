/**
 * The lane plant and its exact zero-order-hold discretisation.
 *
 *   G(s) = (L s + v) e^(-Td s) / (s^2 (tau s + 1))
 *
 * from commanded turn rate (rad/s) to the lateral error (m) seen L ahead of the axle at speed v, with
 * turn-rate lag tau and delay Td. States: lateral error of the axle e (m), heading error psi (rad), turn
 * rate omega (rad/s):
 *
 *   e' = v psi,   psi' = omega,   omega' = (u - omega) / tau,   y = e + L psi
 *
 * The state equation is triangular, so that its solution over a time h with constant u is closed: no
 * series, no companion form. A delay of d whole samples and a part delta of one splits the sample in two,
 * each with its own constant input (Astrom and Wittenmark, Computer-Controlled Systems, sampling of
 * systems with delay).
 */

export interface LanePlant {
  /** Distance from axle to bar, m. */
  lookaheadM: number;
  /** Speed of the axle's middle, m/s. */
  speedMps: number;
  /** Time constant of the turn rate, s; above 0. */
  lagS: number;
  /** Delay without the hold, s; at least 0. */
  delayS: number;
  samplePeriodS: number;
}

/** x[k+1] = phi x[k] + gamma0 u[k-d] + gamma1 u[k-d-1];  y = [1, L, 0] x. */
export interface SampledLanePlant {
  /** The entries of phi above its diagonal and its last diagonal entry; the others of the diagonal are 1. */
  phi12: number;
  phi13: number;
  phi23: number;
  phi33: number;
  gamma0: readonly [number, number, number];
  gamma1: readonly [number, number, number];
  wholeDelay: number;
  lookaheadM: number;
  samplePeriodS: number;
}

/** State transition and input response over a time `h` in s. */
function over(h: number, plant: LanePlant) {
  const { speedMps: v, lagS: tau } = plant;
  const decay = Math.exp(-h / tau);
  // integral of the turn rate's decay; expm1 keeps the digits when h is far below tau
  const reach = -tau * Math.expm1(-h / tau);
  const left = h - reach;
  return {
    phi12: v * h,
    phi13: v * tau * left,
    phi23: reach,
    phi33: decay,
    gamma: [v * ((h * h) / 2 - tau * left), left, -Math.expm1(-h / tau)] as const,
  };
}

/** Exact zero-order-hold discretisation with fractional delay. */
export function samplePlant(plant: LanePlant): SampledLanePlant {
  const period = plant.samplePeriodS;
  const wholeDelay = Math.floor(plant.delayS / period + 1e-9);
  const part = Math.max(0, plant.delayS - wholeDelay * period);
  const whole = over(period, plant);
  const late = over(period - part, plant);
  const early = over(part, plant);
  const [b1, b2, b3] = early.gamma;
  return {
    phi12: whole.phi12,
    phi13: whole.phi13,
    phi23: whole.phi23,
    phi33: whole.phi33,
    gamma0: late.gamma,
    gamma1: [b1 + late.phi12 * b2 + late.phi13 * b3, b2 + late.phi23 * b3, late.phi33 * b3],
    wholeDelay,
    lookaheadM: plant.lookaheadM,
    samplePeriodS: period,
  };
}

/**
 * Frequency response of the sampled plant.
 *
 * @param frequencyRadS above 0, at most pi / samplePeriodS
 * @returns [real, imaginary] part, m per rad/s
 */
export function plantResponse(plant: SampledLanePlant, frequencyRadS: number): [number, number] {
  const angle = frequencyRadS * plant.samplePeriodS;
  const zr = Math.cos(angle);
  const zi = Math.sin(angle);
  // input vector gamma0 + gamma1 / z; 1/z is the conjugate on the unit circle
  const input = (i: 0 | 1 | 2): [number, number] => [
    plant.gamma0[i] + plant.gamma1[i] * zr,
    -plant.gamma1[i] * zi,
  ];
  const divide = (a: [number, number], br: number, bi: number): [number, number] => {
    const size = br * br + bi * bi;
    return [(a[0] * br + a[1] * bi) / size, (a[1] * br - a[0] * bi) / size];
  };
  // z - 1 without cancellation at low frequency
  const half = Math.sin(angle / 2);
  const or = -2 * half * half;
  const turn = divide(input(2), or + 1 - plant.phi33, zi);
  const b2 = input(1);
  const heading = divide([b2[0] + plant.phi23 * turn[0], b2[1] + plant.phi23 * turn[1]], or, zi);
  const b1 = input(0);
  const error = divide(
    [
      b1[0] + plant.phi12 * heading[0] + plant.phi13 * turn[0],
      b1[1] + plant.phi12 * heading[1] + plant.phi13 * turn[1],
    ],
    or,
    zi,
  );
  const yr = error[0] + plant.lookaheadM * heading[0];
  const yi = error[1] + plant.lookaheadM * heading[1];
  const lag = angle * plant.wholeDelay;
  const dr = Math.cos(lag);
  const di = -Math.sin(lag);
  return [yr * dr - yi * di, yr * di + yi * dr];
}
