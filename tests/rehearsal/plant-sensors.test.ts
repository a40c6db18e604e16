import { describe, expect, it } from 'vitest';
import { compileCourse } from '../../src/course/lane.js';
import { Plant } from '../../src/rehearsal/plant.js';
import type { PlantParameters } from '../../src/rehearsal/plant-parameters.js';
import { coveredShare } from '../../src/vehicle/sensor-bar.js';
import { open } from '../course/courses.js';
import { plainPlant } from './vehicles.js';

const lane = compileCourse(open({ straightMm: 3000 }));

function makePlant(changes: Partial<PlantParameters> = {}): Plant {
  return new Plant(plainPlant(changes), lane);
}

const DIGITAL = new Array<'digital'>(6).fill('digital');

describe('sensors', () => {
  const counts = new Int32Array(6);

  it('read ground, line and what lies between', () => {
    // Line half width 9.5 mm, spots of 4 mm: the pair at 5 mm is on the line, the next at 15 mm is off it.
    makePlant().readCounts(counts);
    expect([...counts]).toEqual([100, 100, 900, 900, 100, 100]);
    // 4.5 mm right of the line: one sensor's middle is over its edge, the next one out 1 mm beyond the other edge.
    makePlant({ startLateralM: -0.0045 }).readCounts(counts);
    const beyond = Math.round(100 + 800 * coveredShare(0.0105, 0.019, 0.004));
    expect([...counts]).toEqual([100, beyond, 900, 500, 100, 100]);
    makePlant({ startLateralM: 0.0045 }).readCounts(counts);
    expect([...counts]).toEqual([100, 100, 500, 900, beyond, 100]);
  });

  it('read downward where the line is darker', () => {
    const dark = { ground: Array<number>(6).fill(800), line: Array<number>(6).fill(200) };
    expect(makePlant(dark).count(2)).toBe(200);
    expect(makePlant(dark).count(0)).toBe(800);
  });

  it('stay within the converter', () => {
    const wide = makePlant({ ground: Array<number>(6).fill(-50), line: Array<number>(6).fill(2000) });
    expect([wide.count(0), wide.count(2)]).toEqual([0, 1023]);
  });

  it('see the floor ahead of the axle and to the left', () => {
    const ahead = new Plant(
      plainPlant(),
      compileCourse(open({ straightMm: 75 }, { gapMm: 100 }, { straightMm: 500 })),
    );
    expect(ahead.count(2)).toBe(500);
    expect(makePlant({ startHeadingRad: -0.3 }).count(0)).toBeGreaterThan(800);
  });

  it('have normal noise of the given size', () => {
    const noisy = makePlant({ noiseShare: 0.02, seed: 3 });
    const values = Array.from({ length: 20000 }, () => noisy.count(0));
    const mean = values.reduce((sum, value) => sum + value, 0) / values.length;
    const variance = values.reduce((sum, value) => sum + (value - mean) ** 2, 0) / values.length;
    expect(mean).toBeCloseTo(100, 0);
    expect(Math.sqrt(variance - 1 / 12)).toBeCloseTo(0.02 * 1023, 0);
  });

  it.each([
    ['high', [0, 0, 1, 1, 0, 0]],
    ['low', [1, 1, 0, 0, 1, 1]],
  ] as const)('give the level of the pin when digital, %s over the line', (lineLevel, levels) => {
    makePlant({ kinds: DIGITAL, lineLevel }).readCounts(counts);
    expect([...counts]).toEqual(levels);
  });

  it('switch at half the spot when digital', () => {
    expect(makePlant({ kinds: DIGITAL, startLateralM: 0.0044 }).count(2)).toBe(1);
    expect(makePlant({ kinds: DIGITAL, startLateralM: 0.0046 }).count(2)).toBe(0);
  });
});
