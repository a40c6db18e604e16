/** The random cases, the same in each run. */
import type { Step } from '../../../src/design/describing-function.js';
import type { LanePlant } from '../../../src/design/lane-plant.js';
import type { SampledController } from '../../../src/design/sampled-controller.js';
import { controllerOf } from '../../../src/design/steering-loop.js';
import { Random } from '../../../src/rehearsal/random.js';

const PLANTS = 30;
const LOOPS = 120;
const STAIRCASES = 30;
const FREQUENCIES = 40;

export interface Cases {
  plants: { plant: LanePlant; frequenciesRadS: number[] }[];
  loops: { plant: LanePlant; controller: SampledController }[];
  staircases: { steps: Step[]; amplitude: number }[];
}

const random = new Random(3, 1);

/** Uniform in the logarithm. */
function spread(low: number, high: number): number {
  return Math.exp(random.uniform(Math.log(low), Math.log(high)));
}

function randomPlant(): LanePlant {
  return {
    lookaheadM: random.uniform(0.02, 0.2),
    speedMps: random.uniform(0.1, 3),
    lagS: spread(0.01, 0.3),
    delayS: random.uniform(0, 0.02),
    samplePeriodS: spread(0.001, 0.01),
  };
}

function plantCase(): Cases['plants'][number] {
  const plant = randomPlant();
  const lowest = 0.01 / plant.lagS;
  const ratio = Math.PI / plant.samplePeriodS / lowest;
  const frequenciesRadS = Array.from(
    { length: FREQUENCIES },
    (_, k) => lowest * ratio ** (k / (FREQUENCIES - 1)),
  );
  return { plant, frequenciesRadS };
}

function loopCase(): Cases['loops'][number] {
  const plant = randomPlant();
  const law = {
    proportionalPerM2: spread(20, 3000),
    derivativeTimeS: random.uniform(0, 2.5) * plant.lagS,
    filterCoefficient: random.uniform(0.02, 0.9),
  };
  return { plant, controller: controllerOf(law, plant.speedMps, plant.samplePeriodS) };
}

/** Jumps up and a few down, as a rule table changed by hand may have. */
function staircaseCase(): Cases['staircases'][number] {
  const count = 1 + (random.bits() % 12);
  const steps = Array.from({ length: count }, () => ({
    at: random.uniform(0, 0.05),
    height: random.uniform(-1, 4),
  }));
  return { steps, amplitude: random.uniform(0.001, 0.08) };
}

export const CASES: Cases = {
  plants: Array.from({ length: PLANTS }, plantCase),
  loops: Array.from({ length: LOOPS }, loopCase),
  staircases: Array.from({ length: STAIRCASES }, staircaseCase),
};
