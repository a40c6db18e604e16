/** Speeds are proven by rehearsal: as many runs as the statement takes, and mirror images alike. */
import { describe, expect, it } from 'vitest';
import { deriveDesign } from '../../src/design/derive.js';
import { VehicleDraws, demandRatio } from '../../src/design/drawn-vehicles.js';
import { quickestScale, SHARES } from '../../src/design/speed-search.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { cart } from '../firmware/cart.js';
import { mirroredVehicle } from '../../src/vehicle/mirror.js';

/** A board that samples slowly: a proof takes few samples. */
const PICO = {
  '/target': { board: 'pico', language: 'micropython' },
  '/sensors/kind': 'digital',
  '/sensors/calibration': undefined,
  '/sensors/pins': [2, 3, 4, 5, 6, 7],
  '/drive/driver': {
    scheme: 'pwm-in-in',
    left: { pwm: 8, in1: 9, in2: 10 },
    right: { pwm: 11, in1: 12, in2: 13 },
  },
  '/start/buttonPin': 14,
};
const speeds = (vehicle: Vehicle) => deriveDesign(vehicle).classes.map(({ speedMps }) => speedMps);

describe('the proof', { timeout: 60_000 }, () => {
  it('drives the runs that show the target with 95 %, where the budget reaches', () => {
    const { proof } = deriveDesign(cart({ ...PICO, '/speeds/finishTargetPercent': 99 }));
    expect(proof).toMatchObject({ runs: 299, finished: 299, targetShare: 0.99 });
    expect(proof.confidenceShare).toBeGreaterThanOrEqual(0.95);
    expect(proof.confidenceShare).toBeLessThan(0.951);
  });

  it('says the confidence that fewer runs give', () => {
    const { proof } = deriveDesign(cart({ '/speeds/finishTargetPercent': 99.9 }));
    expect(proof.finished).toBe(proof.runs);
    expect(proof.runs).toBeLessThan(2995);
    expect(proof.confidenceShare).toBeCloseTo(1 - 0.999 ** proof.runs, 10);
  });

  it('judges speeds of the sheet by how many finish', () => {
    const at = (speedMps: number, gripCoefficient: number) =>
      deriveDesign(
        cart({
          '/speeds/finishTargetPercent': 95,
          '/drive/gripCoefficient': gripCoefficient,
          '/speeds/classes': [{ name: 'all', minRadiusMm: 120, speedMps }],
        }),
      );
    const slow = at(0.4, 0.7);
    expect(slow.proof.finished).toBe(slow.proof.runs);
    expect(slow.remarks).toEqual([]);
    const fast = at(0.95, 0.35);
    expect(fast.proof.finished).toBeLessThan(0.95 * fast.proof.runs);
    expect(fast.proof.confidenceShare).toBeLessThan(0.05);
    expect(fast.remarks[0]).toContain('miss the finish target at the speeds of the sheet');
  });

  it('gives a lopsided vehicle and its image in a mirror the same speeds', () => {
    const lopsided = cart({ ...PICO, '/drive/trim': { leftPercent: 96 }, '/speeds/finishTargetPercent': 95 });
    const image = mirroredVehicle(lopsided);
    expect(speeds(image)).toEqual(speeds(lopsided));
  });
});

describe('drawn vehicles', () => {
  const lopsided = cart({ '/drive/trim': { leftPercent: 96 } });
  const draws = new VehicleDraws(lopsided, lopsided);

  it('drive the lane and its image by turns', () => {
    expect(draws.drawn(1).lane.poseAt(2).yM).toBeCloseTo(-draws.drawn(2).lane.poseAt(2).yM, 9);
  });

  it('are the more demanding the faster, slower to follow and slipperier they are', () => {
    const drawn = draws.drawn(5);
    const changed = (changes: object) => demandRatio({ ...drawn, plant: { ...drawn.plant, ...changes } });
    const own = changed({});
    expect(changed({ topLeftMps: 3 })).toBeGreaterThan(own);
    expect(changed({ lagS: 0.3 })).toBeGreaterThan(own);
    expect(changed({ grip: 0.1 })).toBeGreaterThan(own);
  });
});

describe('quickestScale', () => {
  it('finds the cap and the share of a known optimum', () => {
    // passes while top + share <= 1.9; the time falls with both
    const found = quickestScale(SHARES, 1.5, {
      passes: ({ top, share }) => top + share <= 1.9,
      timeS: ({ top, share }) => (top + share <= 1.9 ? 10 - 2 * top - share : undefined),
    });
    expect(found!.scale.share).toBe(0.7);
    expect(found!.scale.top).toBeCloseTo(1.2, 1);
  });

  it('is undefined where nothing passes', () => {
    expect(quickestScale(SHARES, 1.5, { passes: () => false, timeS: () => 1 })).toBeUndefined();
  });
});
