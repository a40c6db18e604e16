/** What floor, light and wear do to a vehicle, and its image in a mirror. */
import { describe, expect, it } from 'vitest';
import { compileCourse } from '../../src/course/lane.js';
import { Plant } from '../../src/rehearsal/plant.js';
import { nominalPlant, perturbedPlant } from '../../src/rehearsal/plant-parameters.js';
import { spreads, stallForceN } from '../../src/rehearsal/plant-table.js';
import { example, mirrored, open } from '../course/courses.js';
import { mirroredPlant } from './mirrored-plant.js';
import { trayCart } from './tray-cart.js';
import { plainPlant } from './vehicles.js';

const lane = compileCourse(open({ straightMm: 6000 }));
const cart = trayCart();

describe('a joint of the floor', () => {
  it('shifts and turns the vehicle each time it has driven so far', () => {
    const plant = new Plant(
      plainPlant({ bumpEveryM: 0.5, bumpLateralM: 0.002, bumpHeadingRad: 0, grip: 100, lagS: 1e-6 }),
      lane,
    );
    const seen: number[] = [];
    for (let i = 0; i < 900; i++) {
      plant.step(0.5, 0.5, 2e-3);
      if (plant.yM > 0.002 * seen.length + 0.001) seen.push(plant.xM);
    }
    expect(seen).toHaveLength(2);
    expect(seen[0]).toBeCloseTo(0.5, 2);
    expect(seen[1]).toBeCloseTo(1, 2);
    expect(plant.yM).toBeCloseTo(0.004, 12);
  });
});

describe('light and wear', () => {
  /** Largest and smallest reading of a sensor in the middle of the line, all along it. */
  function readings(changes: Parameters<typeof plainPlant>[0]): [number, number] {
    const plant = new Plant(plainPlant({ positionsM: [0], ground: [100], line: [900], ...changes }), lane);
    const seen: number[] = [];
    for (let i = 0; i < 2500; i++) {
      seen.push(plant.count(0));
      plant.step(0.5, 0.5, 2e-3);
      expect(plant.place.lateralM).toBe(0);
    }
    return [Math.min(...seen), Math.max(...seen)];
  }

  it('are without effect at their nominal figures', () => {
    expect(readings({})).toEqual([900, 900]);
  });

  it('scale and shift the reading by their share of the difference between line and ground', () => {
    expect(readings({ contrast: 0.95 })).toEqual([860, 860]);
    expect(readings({ lightShare: 0.03 })).toEqual([876, 924]);
    expect(readings({ wearShare: 0.1 })).toEqual([820, 900]);
  });

  it('leave a digital sensor right until half the contrast is gone', () => {
    const digital = { kinds: ['digital'], ground: [0], line: [1] } as const;
    expect(readings({ ...digital, wearShare: 0.49 })).toEqual([1, 1]);
    expect(readings({ ...digital, wearShare: 0.51 })).toEqual([0, 1]);
  });
});

describe('the vehicle in a mirror', () => {
  const course = example('winding');

  it('drives the mirrored course to the last bit, with all its imperfections', () => {
    const drawn = { ...perturbedPlant(cart, 7), noiseShare: 0 };
    const plant = new Plant(drawn, compileCourse(course));
    const image = new Plant(mirroredPlant(drawn), compileCourse(mirrored(course)));
    const last = plant.sensorCount - 1;
    for (let i = 0; i < 1500; i++) {
      const [left, right] = [0.4 + 0.3 * Math.sin(i / 7), 0.4 + 0.3 * Math.sin(i / 11)];
      plant.step(left, right, 2e-3);
      image.step(right, left, 2e-3);
      expect([image.xM, image.yM]).toEqual([plant.xM, -plant.yM]);
      for (let k = 0; k <= last; k++) expect(image.count(last - k)).toBe(plant.count(k));
    }
  });

  it('of its image is the vehicle itself', () => {
    const drawn = perturbedPlant(cart, 9);
    expect(mirroredPlant(mirroredPlant(drawn))).toEqual(drawn);
    expect(mirroredPlant(drawn)).not.toEqual(drawn);
  });
});

describe('the table of spreads', () => {
  it('draws every figure within its range', () => {
    const nominal = nominalPlant(cart);
    for (let seed = 1; seed <= 300; seed++) {
      const plant = perturbedPlant(cart, seed);
      for (const { key, by, low, high, title } of spreads(cart)) {
        if (by === 'sensor') continue;
        const drawn = by === 'factor' ? plant[key] / nominal[key] : plant[key];
        expect(drawn, title).toBeGreaterThanOrEqual(low - 1e-12);
        expect(drawn, title).toBeLessThanOrEqual(high + 1e-12);
      }
    }
  });

  it('knows the force of a stalled wheel: k I / r', () => {
    // 6 V and 1.2 A at stall, 682 rpm without load, wheels of 42 mm.
    const constant = 6 / ((682 * 2 * Math.PI) / 60);
    expect(stallForceN(cart)).toBeCloseTo((constant * 1.2) / 0.021, 6);
  });
});
