/**
 * The design's law beside the classic tuning rules, each judged by the same measures on the same lane loop.
 *
 * Near its crossover the lane plant acts like an integrating process: G ~ L e^(-theta s) / s, with theta the
 * delay, half a sample of hold and the turn-rate lag. The rules for such a process are applied to that; the
 * rules by ultimate gain to the lane loop itself, where proportional control alone has one. A published PID
 * is sampled as a sum: proportional, backward-difference integral, and the firmware's own filtered derivative.
 */
import {
  type Settings,
  amigoIntegrating,
  simcIntegrating,
  zieglerNicholsClosed,
  zieglerNicholsOpen,
  cohenCoon,
} from './classic-rules.js';
import type { DesignedClass, Margins } from './design.js';
import { type LanePlant, type SampledLanePlant, plantResponse, samplePlant } from './lane-plant.js';
import { type SampledController, productOf, sumOf } from './sampled-controller.js';
import { loopMargins } from './steering-loop.js';

/** One law on the lane loop of a class. */
export interface ComparedLaw {
  name: string;
  /** Turn rate per lateral error, rad/s per m; absent where the rule does not apply. */
  settings?: Settings;
  /** Margins at the nominal vehicle; absent where the loop is unstable or the rule does not apply. */
  margins?: Margins;
  note?: string;
}

/** Far more than any lag of the integrating process: the limit in which a lag becomes an integrator. */
const LONG_LAG_S = 1e6;
const GRID_POINTS = 2000;

/** Ultimate gain and period of a loop under proportional control; undefined where it has none. */
export function ultimateOf(plant: SampledLanePlant): { gain: number; periodS: number } | undefined {
  const nyquist = Math.PI / plant.samplePeriodS;
  const imaginary = (w: number) => plantResponse(plant, w)[1];
  let before = nyquist / 1e4;
  // below the negative real axis at low frequency: more phase than 180 deg is missing there for any gain
  if (imaginary(before) > 0) return undefined;
  for (let i = 1; i <= GRID_POINTS; i++) {
    const w = (nyquist / 1e4) * Math.pow(1e4, i / GRID_POINTS);
    if (imaginary(w) > 0) {
      let [low, high] = [before, w];
      for (let k = 0; k < 60; k++) {
        const middle = (low + high) / 2;
        if (imaginary(middle) > 0) high = middle;
        else low = middle;
      }
      const [re, im] = plantResponse(plant, low);
      return { gain: 1 / Math.hypot(re, im), periodS: (2 * Math.PI) / low };
    }
    before = w;
  }
  return undefined;
}

/**
 * A published PID in ideal form, sampled: backward-difference integral, filtered derivative.
 *
 *   K (1 + h/Ti / (1 - z^-1) + Td a/h (1 - z^-1) / (1 - (1 - a) z^-1))
 */
function sampledPid(settings: Settings, filterCoefficient: number, samplePeriodS: number): SampledController {
  const { gain, integralTimeS, derivativeTimeS = 0 } = settings;
  const difference = [1, -1];
  const filter = [1, filterCoefficient - 1];
  const slope = (derivativeTimeS * filterCoefficient) / samplePeriodS;
  const proportional = sumOf(
    filter,
    difference.map((x) => x * slope),
  );
  if (integralTimeS === undefined) {
    return { numerator: proportional.map((x) => x * gain), denominator: filter, samplePeriodS };
  }
  const share = samplePeriodS / integralTimeS;
  const numerator = sumOf(
    productOf(proportional, difference),
    filter.map((x) => x * share),
  );
  return {
    numerator: numerator.map((x) => x * gain),
    denominator: productOf(filter, difference),
    samplePeriodS,
  };
}

/** Series form to ideal form (Astrom and Hagglund, PID Controllers, 1995, section 3.2). */
function idealOf({ gain, integralTimeS, derivativeTimeS = 0 }: Settings): Settings {
  if (integralTimeS === undefined) return { gain, derivativeTimeS };
  const sum = integralTimeS + derivativeTimeS;
  return {
    gain: (gain * sum) / integralTimeS,
    integralTimeS: sum,
    derivativeTimeS: (integralTimeS * derivativeTimeS) / sum,
  };
}

function judged(name: string, settings: Settings, plant: LanePlant, filterCoefficient: number): ComparedLaw {
  const margins = loopMargins(plant, sampledPid(settings, filterCoefficient, plant.samplePeriodS));
  return Number.isFinite(margins.ms) ? { name, settings, margins } : { name, settings, note: 'unstable' };
}

/** The class's own law and the classic rules on its lane loop. */
export function comparedLaws(designed: DesignedClass): ComparedLaw[] {
  const { plant, gains, margins } = designed;
  const theta = plant.delayS + plant.samplePeriodS / 2 + plant.lagS;
  const slope = plant.lookaheadM;
  const filter = gains.filterCoefficient;
  const asLag = { gain: slope * LONG_LAG_S, lagS: LONG_LAG_S, delayS: theta };
  const judge = (name: string, settings: Settings) => judged(name, settings, plant, filter);
  const ultimate = ultimateOf(samplePlant(plant));
  const ownGain = gains.proportionalPerM2 * plant.speedMps;
  return [
    { name: 'this design', settings: { gain: ownGain, derivativeTimeS: gains.derivativeTimeS }, margins },
    ultimate
      ? judge(
          'Ziegler-Nichols 1942, ultimate gain',
          zieglerNicholsClosed(ultimate.gain, ultimate.periodS).pid,
        )
      : {
          name: 'Ziegler-Nichols 1942, ultimate gain',
          note: 'proportional control alone is unstable at any gain',
        },
    judge('Ziegler-Nichols 1942, step response', zieglerNicholsOpen(asLag).pid),
    judge('Cohen-Coon 1953', cohenCoon(asLag).pid),
    judge('SIMC 2003', idealOf(simcIntegrating({ slope, delayS: theta - plant.lagS }, theta, plant.lagS))),
    judge('AMIGO 2004', amigoIntegrating({ slope, delayS: theta })),
  ];
}
