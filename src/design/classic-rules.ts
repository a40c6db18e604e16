/**
 * Published tuning rules, for comparison with the design's own law.
 *
 * First-order process with delay K e^(-L s) / (T s + 1), integrating process k e^(-L s) / s, and the ultimate
 * gain Ku and period Pu of a loop under proportional control. Controllers are Kc (1 + 1/(Ti s) + Td s), the
 * ideal form, unless a rule says series form: Kc (1 + 1/(Ti s)) (1 + Td s).
 */

/** A first-order process with delay. */
export interface LagProcess {
  /** Steady gain, output unit per input unit. */
  gain: number;
  lagS: number;
  delayS: number;
}

/** An integrating process with delay; `slope` is output unit per input unit and second. */
export interface IntegratingProcess {
  slope: number;
  delayS: number;
}

/** Settings of a controller; integral and derivative times are absent where the controller has none. */
export interface Settings {
  gain: number;
  integralTimeS?: number;
  derivativeTimeS?: number;
}

/** Ziegler and Nichols, Trans. ASME 64 (1942) 759-768, open loop: 1/r, 0.9/r and 3.33 L, 1.2/r, 2 L, 0.5 L; r = K L / T. */
export function zieglerNicholsOpen({ gain, lagS, delayS }: LagProcess): {
  p: Settings;
  pi: Settings;
  pid: Settings;
} {
  const inverse = lagS / (gain * delayS);
  return {
    p: { gain: inverse },
    pi: { gain: 0.9 * inverse, integralTimeS: delayS / 0.3 },
    pid: { gain: 1.2 * inverse, integralTimeS: 2 * delayS, derivativeTimeS: 0.5 * delayS },
  };
}

/** Ziegler and Nichols 1942, closed loop; PI and PID in the 0.45 Ku and 0.6 Ku variant. */
export function zieglerNicholsClosed(
  ultimateGain: number,
  ultimatePeriodS: number,
): { p: Settings; pi: Settings; pid: Settings } {
  return {
    p: { gain: 0.5 * ultimateGain },
    pi: { gain: 0.45 * ultimateGain, integralTimeS: ultimatePeriodS / 1.2 },
    pid: {
      gain: 0.6 * ultimateGain,
      integralTimeS: ultimatePeriodS / 2,
      derivativeTimeS: ultimatePeriodS / 8,
    },
  };
}

/** Cohen and Coon, Trans. ASME 75 (1953) 827-834. */
export function cohenCoon({ gain, lagS, delayS }: LagProcess): {
  p: Settings;
  pi: Settings;
  pd: Settings;
  pid: Settings;
} {
  const r = delayS / lagS;
  const inverse = 1 / (gain * r);
  return {
    p: { gain: inverse * (1 + r / 3) },
    pi: { gain: inverse * (0.9 + r / 12), integralTimeS: (delayS * (30 + 3 * r)) / (9 + 20 * r) },
    pd: { gain: inverse * (5 / 4 + r / 6), derivativeTimeS: (delayS * (6 - 2 * r)) / (22 + 3 * r) },
    pid: {
      gain: inverse * (4 / 3 + r / 4),
      integralTimeS: (delayS * (32 + 6 * r)) / (13 + 8 * r),
      derivativeTimeS: (4 * delayS) / (11 + 2 * r),
    },
  };
}

/**
 * Skogestad, SIMC, J. Process Control 13 (2003) 291-309, series form.
 *
 * @param closedLoopS wanted closed-loop time constant; the paper's choice is the delay
 * @param secondLagS second time constant, cancelled by the derivative
 */
export function simcLag({ gain, lagS, delayS }: LagProcess, closedLoopS = delayS, secondLagS = 0): Settings {
  const pace = closedLoopS + delayS;
  const settings: Settings = { gain: lagS / (gain * pace), integralTimeS: Math.min(lagS, 4 * pace) };
  return secondLagS > 0 ? { ...settings, derivativeTimeS: secondLagS } : settings;
}

/** SIMC for an integrating process, series form; see simcLag. */
export function simcIntegrating(
  { slope, delayS }: IntegratingProcess,
  closedLoopS = delayS,
  secondLagS = 0,
): Settings {
  const pace = closedLoopS + delayS;
  const settings: Settings = { gain: 1 / (slope * pace), integralTimeS: 4 * pace };
  return secondLagS > 0 ? { ...settings, derivativeTimeS: secondLagS } : settings;
}

/** SIMC for a double integrator k e^(-L s) / s^2, series form. */
export function simcDoubleIntegrating(curvature: number, delayS: number, closedLoopS = delayS): Settings {
  const pace = closedLoopS + delayS;
  return { gain: 1 / (4 * curvature * pace * pace), integralTimeS: 4 * pace, derivativeTimeS: 4 * pace };
}

/**
 * Astrom and Hagglund, AMIGO, J. Process Control 14 (2004) 635-650, PID for a first-order process with delay.
 * The same in Astrom and Hagglund, Advanced PID Control (2006), equations 7.7 and 7.33.
 */
export function amigoLag({ gain, lagS, delayS }: LagProcess): { pi: Settings; pid: Settings } {
  const sum = delayS + lagS;
  return {
    pi: {
      gain: 0.15 / gain + ((0.35 - (delayS * lagS) / (sum * sum)) * lagS) / (gain * delayS),
      integralTimeS:
        0.35 * delayS +
        (13 * delayS * lagS * lagS) / (lagS * lagS + 12 * delayS * lagS + 7 * delayS * delayS),
    },
    pid: {
      gain: (0.2 + (0.45 * lagS) / delayS) / gain,
      integralTimeS: (delayS * (0.4 * delayS + 0.8 * lagS)) / (delayS + 0.1 * lagS),
      derivativeTimeS: (0.5 * delayS * lagS) / (0.3 * delayS + lagS),
    },
  };
}

/** AMIGO PID for an integrating process: the limit of amigoLag for a long lag with slope = gain / lag. */
export function amigoIntegrating({ slope, delayS }: IntegratingProcess): Settings {
  return { gain: 0.45 / (slope * delayS), integralTimeS: 8 * delayS, derivativeTimeS: 0.5 * delayS };
}
