import { compileCourse } from '../../src/course/lane.js';
import { Plant } from '../../src/rehearsal/plant.js';
import { describe, expect, it } from 'vitest';
import { nominalPlant, perturbedPlant, type PlantParameters } from '../../src/rehearsal/plant-parameters.js';
import { trayCart } from './tray-cart.js';

const cart = trayCart();
const nominal = nominalPlant(cart);
const drawn = Array.from({ length: 3000 }, (_, i) => perturbedPlant(cart, i + 1));

/** How far a figure of the drawn vehicles is from nominal, at least and at most. */
function range(figure: (plant: PlantParameters) => number): [number, number] {
  const values = drawn.map(figure);
  return [Math.min(...values), Math.max(...values)];
}

describe('nominalPlant', () => {
  it('is the vehicle of the sheet, without noise', () => {
    expect(nominal.topLeftMps).toBe(cart.drive.topSpeedMps);
    expect(nominal.positionsM).toHaveLength(6);
    expect(nominal).toMatchObject({
      seed: 0,
      nominalV: 6,
      batteryFactor: 1,
      noiseShare: 0,
      startLateralM: 0,
      startHeadingRad: 0,
    });
    expect(perturbedPlant(cart, 0)).toEqual(nominal);
  });

  it('is a vehicle that needs the trim which the sheet gives', () => {
    const trimmed = nominalPlant({ ...cart, drive: { ...cart.drive, trimLeft: 0.95 } });
    const lane = compileCourse({ courseVersion: 1, pieces: [{ straightMm: 2000 }] });
    const plant = new Plant(trimmed, lane);
    for (let i = 0; i < 100; i += 1) plant.step(0.95 * 0.4, 0.4, 2e-3);
    expect(plant.leftMps).toBeGreaterThan(0.3);
    expect(plant.leftMps).toBeCloseTo(plant.rightMps, 12);
  });
});

describe('perturbedPlant', () => {
  it.each<[string, (plant: PlantParameters) => number, number, number]>([
    ['left motor', (plant) => plant.topLeftMps / nominal.topLeftMps, 0.93, 1.07],
    ['right motor', (plant) => plant.topRightMps / nominal.topRightMps, 0.93, 1.07],
    ['time constant', (plant) => plant.lagS / nominal.lagS, 0.65, 1.35],
    ['grip', (plant) => plant.grip / nominal.grip, 0.8, 1.2],
    ['battery', (plant) => plant.batteryFactor, 5.2 / 6, 6.6 / 6],
    ['place at the start', (plant) => plant.startLateralM, -0.005, 0.005],
    ['heading at the start', (plant) => plant.startHeadingRad, (-3 * Math.PI) / 180, (3 * Math.PI) / 180],
    ['reading over ground', (plant) => plant.ground[2]!, 123 - 0.03 * 716, 123 + 0.03 * 716],
    ['reading over line', (plant) => plant.line[5]!, 839 - 0.03 * 716, 839 + 0.03 * 716],
  ])('spreads the %s over its whole range and no further', (_, figure, low, high) => {
    const [least, most] = range(figure);
    const spread = high - low;
    expect(least).toBeGreaterThanOrEqual(low);
    expect(most).toBeLessThanOrEqual(high);
    expect(least).toBeLessThan(low + 0.02 * spread);
    expect(most).toBeGreaterThan(high - 0.02 * spread);
  });

  it('draws each sensor and each motor by itself', () => {
    const [one] = drawn;
    expect(new Set(one!.ground).size).toBe(6);
    expect(one!.topLeftMps).not.toBe(one!.topRightMps);
    expect(one!.noiseShare).toBe(0.003);
  });

  it('is repeated by its seed alone', () => {
    expect(perturbedPlant(cart, 77)).toEqual(drawn[76]);
    expect(perturbedPlant(cart, 78)).not.toEqual(drawn[76]);
  });

  it('keeps what is exact in the sheet', () => {
    const exact = { ...cart, tolerance: { motorGain: 0, lag: 0, grip: 0 } };
    const plant = perturbedPlant(exact, 5);
    expect([plant.topLeftMps, plant.lagS, plant.grip]).toEqual([
      nominal.topLeftMps,
      nominal.lagS,
      nominal.grip,
    ]);
  });
});
