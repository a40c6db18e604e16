/**
 * The design's numbers against a general reference library, live: random plants, loops and staircases, worked out by scipy and
 * numpy (packages python3-scipy and python3-numpy of Debian) in one Python process. Its text is in scipy/.
 */
import { describe, expect, test } from 'vitest';
import { closedLoopRadius } from '../../src/design/closed-loop.js';
import { describingGain } from '../../src/design/describing-function.js';
import { plantResponse, samplePlant } from '../../src/design/lane-plant.js';
import { loopMargins } from '../../src/design/steering-loop.js';
import { CASES } from './scipy/cases.js';
import { askScipy } from './scipy/ask.js';

const answers = askScipy(CASES);

/** Rounding of a double. */
const EPSILON = 2 ** -52;

function near(got: number, want: number, relative: number, absolute = 0): void {
  expect(Math.abs(got - want), `${got} for ${want}`).toBeLessThanOrEqual(
    relative * Math.abs(want) + absolute,
  );
}

describe('lane plants with fractional delay', () => {
  test.each(CASES.plants.map(({ plant }, i) => ({ plant, i })))('plant $i', ({ plant, i }) => {
    const got = samplePlant(plant);
    const want = answers.plants[i]!;
    const { samplePeriodS: h, lagS, speedMps } = plant;
    // a closed form loses what it subtracts: h - tau (1 - e^(-h/tau)) is known to eps h, its integral to eps tau h
    const lost = [4 * EPSILON * speedMps * lagS * h, 4 * EPSILON * h, EPSILON] as const;
    expect(got.wholeDelay).toBe(want.wholeDelay);
    for (const phi of [want.phi, want.phiByC2d]) {
      near(got.phi12, phi[0]![1]!, 1e-10);
      near(got.phi13, phi[0]![2]!, 1e-10, lost[0]);
      near(got.phi23, phi[1]![2]!, 1e-10);
      near(got.phi33, phi[2]![2]!, 1e-10);
    }
    for (const row of [0, 1, 2] as const) {
      near(got.gamma0[row], want.gamma0[row]!, 1e-10, lost[row]);
      near(got.gamma1[row], want.gamma1[row]!, 1e-10, lost[row]);
      // an input that stays the same does not show where the sample is split
      near(got.gamma0[row] + got.gamma1[row], want.gammaByC2d[row]![0]!, 1e-10, lost[row]);
    }
  });

  test('have the same frequency response', () => {
    CASES.plants.forEach(({ plant, frequenciesRadS }, i) => {
      const sampled = samplePlant(plant);
      frequenciesRadS.forEach((frequency, k) => {
        const [re, im] = plantResponse(sampled, frequency);
        const [wantRe, wantIm] = answers.plants[i]!.responses[k]!;
        const error = Math.hypot(re - wantRe, im - wantIm) / Math.hypot(wantRe, wantIm);
        expect(error, `plant ${i} at ${frequency} rad/s`).toBeLessThan(1e-9);
      });
    });
  });
});

describe('loops of lane plant and steering law', () => {
  const judged = CASES.loops.map((loop, i) => ({ ...loop, want: answers.loops[i]! }));
  const stable = judged.filter(({ want }) => want.radius < 1);

  test('are of both kinds, stable and unstable', () => {
    expect(stable.length).toBeGreaterThan(40);
    expect(judged.length - stable.length).toBeGreaterThan(20);
  });

  test.each(judged.map((each, i) => ({ ...each, i })))('loop $i: poles', ({ plant, controller, want }) => {
    near(closedLoopRadius(samplePlant(plant), controller), want.radius, 1e-4);
  });

  test.each(stable.map((each, i) => ({ ...each, i })))('stable loop $i: margins', (loop) => {
    const got = loopMargins(loop.plant, loop.controller);
    near(got.ms, loop.want.ms, 1e-6);
    for (const key of ['gainMargin', 'phaseMarginDeg'] as const) {
      const want = loop.want[key];
      if (want === null) expect(got[key]).toBe(Infinity);
      else near(got[key], want, 1e-6);
    }
  });

  test('unstable ones have no margins', () => {
    for (const { plant, controller, want } of judged) {
      if (want.radius > 1) expect(loopMargins(plant, controller).ms).toBe(Infinity);
    }
  });
});

describe('describing function of a staircase, by integration over a period', () => {
  test.each(CASES.staircases.map((each, i) => ({ ...each, i })))(
    'staircase $i',
    ({ steps, amplitude, i }) => {
      near(describingGain(steps, amplitude), answers.staircases[i]!, 1e-10, 1e-12);
    },
  );
});
