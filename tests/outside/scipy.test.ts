/**
 * Lane loops against a general reference library: scipy and numpy of the system (Debian's python3-scipy), asked live.
 *
 * Thirty loops drawn at random: sampled plant with fractional delay, margins, Ms and closed-loop poles.
 */
import { execFileSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { beforeAll, describe, expect, test } from 'vitest';
import { closedLoopRadius } from '../../src/design/closed-loop.js';
import { type LanePlant, samplePlant } from '../../src/design/lane-plant.js';
import { controllerOf, loopMargins } from '../../src/design/steering-loop.js';
import { Random } from '../../src/rehearsal/random.js';
import { stepOutputs } from './step-outputs.js';

interface Answer {
  step: number[];
  gainMargin: number | null;
  phaseMarginDeg: number | null;
  ms: number;
  radius: number;
}

/** Python of the system, where Debian puts scipy; another python earlier in the path may lack it. */
const PYTHON = '/usr/bin/python3';
const LOOPS = 30;
const random = new Random(2024, 1);

const loops = Array.from({ length: LOOPS }, (_, i) => {
  const plant: LanePlant = {
    lookaheadM: random.uniform(0.03, 0.2),
    speedMps: random.uniform(0.2, 2),
    lagS: random.uniform(0.02, 0.2),
    // every fourth without delay: scipy's own discretisation answers those
    delayS: i % 4 === 0 ? 0 : random.uniform(0, 0.015),
    samplePeriodS: random.uniform(0.001, 0.01),
  };
  const law = {
    proportionalPerM2: random.uniform(0.2, 2) / plant.lookaheadM ** 2,
    derivativeTimeS: random.uniform(0.5, 1.5) * plant.lagS,
    filterCoefficient: random.uniform(0.1, 0.7),
  };
  return { plant, controller: controllerOf(law, plant.speedMps, plant.samplePeriodS) };
});

let answers: Answer[];
beforeAll(() => {
  const script = fileURLToPath(new URL('lane_loops.py', import.meta.url));
  const input = JSON.stringify(loops.map(({ plant, controller }) => ({ ...plant, ...controller })));
  answers = JSON.parse(execFileSync(PYTHON, [script], { input, encoding: 'utf8' })) as Answer[];
}, 120_000);

describe.each(loops.map((loop, i) => ({ i, ...loop })))('loop $i', ({ i, plant, controller }) => {
  test('sampled plant: twelve outputs to a step', () => {
    const outputs = stepOutputs(samplePlant(plant), 12);
    answers[i]!.step.forEach((want, k) => expect(Math.abs(outputs[k]! - want)).toBeLessThan(1e-12));
  });

  test('closed-loop poles', () => {
    // 18 squarings leave about 1e-5 of a radius near 1; roots of polynomials with poles near 1 lose digits too
    expect(closedLoopRadius(samplePlant(plant), controller)).toBeCloseTo(answers[i]!.radius, 3);
  });

  test('margins', () => {
    const { gainMargin, phaseMarginDeg, ms, radius } = answers[i]!;
    const found = loopMargins(plant, controller);
    if (radius >= 1) {
      expect(found).toEqual({ gainMargin: 0, phaseMarginDeg: 0, ms: Infinity });
      return;
    }
    expect(found.ms).toBeCloseTo(ms, 5);
    expect(found.gainMargin / (gainMargin ?? Infinity)).toBeCloseTo(1, 6);
    expect(found.phaseMarginDeg).toBeCloseTo(phaseMarginDeg ?? Infinity, 5);
  });
});

test('the draw is mostly of stable loops', () => {
  const stable = answers.filter(({ radius }) => radius < 1).length;
  expect(stable).toBeGreaterThan(20);
});
