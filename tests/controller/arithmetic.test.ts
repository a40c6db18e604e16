/**
 * The interval analysis leaves nothing out: every sum, difference, product and shift of the twin is entered with what proves it, and
 * stays within that on wandering lines and on harsh readings.
 */
import fc from 'fast-check';
import { beforeAll, describe, expect, it } from 'vitest';
import type { ControllerConstants } from '../../src/controller/constants.js';
import { intermediateBounds } from '../../src/design/intervals.js';
import type { FirmwareDesign } from '../../src/firmware/render.js';
import { checkSheet } from '../../src/sheet/check.js';
import { toVehicle } from '../../src/sheet/to-vehicle.js';
import { CARTS, cart, quickDesign } from '../firmware/cart.js';
import { EdgeTrace } from '../parity/edge-trace.js';
import { BarTrace } from '../parity/traces.js';
import { validSheets } from '../properties/valid-sheets.js';
import { HarshTrace } from './instrumented/harsh-trace.js';
import { type WatchedTwin, watchedTwin } from './instrumented/instrument.js';
import { allowed } from './instrumented/proof.js';
import { SITE_BOUNDS } from './instrumented/site-bounds.js';

const SHEETS = 40;
const STEPS = 2000;
const SWEEP_SAMPLES = 60;

let watched: WatchedTwin;
beforeAll(async () => {
  watched = await watchedTwin();
});

/** A sweep on given readings; the constants with what it found. */
function swept({ controller }: FirmwareDesign, readings: (counts: Int32Array) => void): ControllerConstants {
  if (controller.sweep === undefined) return controller;
  const { sensorCount } = controller.sensing;
  const calibration = new watched.SweepCalibration(sensorCount, controller.sweep.minSpan);
  const counts = new Int32Array(sensorCount);
  for (let i = 0; i < SWEEP_SAMPLES; i++) {
    readings(counts);
    calibration.observe(counts);
  }
  const { ground, gain } = calibration.finish();
  return { ...controller, sensing: { ...controller.sensing, ground: [...ground], gain: [...gain] } };
}

function drive(design: FirmwareDesign, seed: number): void {
  const { vehicle, controller } = design;
  const line = new BarTrace(vehicle, seed);
  const harsh = new HarshTrace(vehicle.bar.kind === 'digital' ? 1 : vehicle.board.adcMaxCount, seed);
  const edges = new EdgeTrace(controller, seed);
  for (const isHarsh of [false, true]) {
    const readings = (counts: Int32Array): void => (isHarsh ? harsh.readings(counts) : line.next(counts));
    const twin = new watched.Twin(swept(design, readings));
    const counts = new Int32Array(controller.sensing.sensorCount);
    twin.start();
    for (let i = 0; i < STEPS; i++) {
      if (twin.stopped) twin.start();
      readings(counts);
      twin.wheels?.count(...(isHarsh ? harsh.edges() : edges.next(twin)));
      twin.step(counts);
    }
  }
}

/** The pieces of arithmetic that left their bounds, in words. */
function beyond(design: FirmwareDesign, seed: number, driven = design): string[] {
  watched.seen.clear();
  drive(driven, seed);
  const { controller, vehicle } = design;
  const bounds = new Map(
    intermediateBounds(controller, vehicle.board.adcMaxCount).map(({ name, magnitude }) => [name, magnitude]),
  );
  return [...watched.seen].flatMap(([site, { least, most }]) => {
    const limit = allowed(SITE_BOUNDS.get(site)!, bounds, controller);
    const reached = Math.floor(Math.max(-least, most));
    return reached > limit ? [`${site} reached ${reached}, proven is ${limit}`] : [];
  });
}

it('every piece of arithmetic of the twin is entered with what proves it, and no other', () => {
  expect(watched.sites.size).toBeGreaterThan(150);
  expect([...watched.sites].sort()).toEqual([...SITE_BOUNDS.keys()].sort());
});

describe('no value leaves the interval that is proven for it', () => {
  it.each(Object.keys(CARTS))('%s', (name) => {
    expect(beyond(quickDesign(cart(CARTS[name])), 5)).toEqual([]);
  });

  it(`${SHEETS} random sheets`, { timeout: 120_000 }, () => {
    for (const [i, given] of fc.sample(validSheets, { numRuns: SHEETS, seed: 9 }).entries()) {
      const design = quickDesign(toVehicle(checkSheet(given).sheet!));
      expect(beyond(design, i), JSON.stringify(given)).toEqual([]);
    }
  });

  it('one that does would be told', () => {
    const design = quickDesign(cart());
    const { controller } = design;
    const drive = { ...controller.drive, halfTrack: 2 * controller.drive.halfTrack };
    const said = beyond(design, 5, { ...design, controller: { ...controller, drive } });
    expect(said).toContainEqual(
      expect.stringMatching(/^twin.ts: curvature \* drive.halfTrack reached \d+, proven is \d+$/),
    );
  });

  it('and every piece was reached', () => {
    const reached = new Set<string>();
    for (const [i, name] of Object.keys(CARTS).entries()) {
      watched.seen.clear();
      drive(quickDesign(cart(CARTS[name])), i);
      for (const site of watched.seen.keys()) reached.add(site);
    }
    const once = /^(scales|constants)\.ts|clamp|[A-Z]_BITS [-+] |2 \* FULL_SPEED/;
    expect([...watched.sites].filter((site) => !reached.has(site) && !once.test(site))).toEqual([]);
  });
});
