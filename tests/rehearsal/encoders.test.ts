/** Encoders from end to end: what they are good for, on every engine, and what happens when a wheel is blocked. */
import { describe, expect, it } from 'vitest';
import { chipEngine } from '../../src/rehearsal/chip-engine.js';
import { micropythonEngine } from '../../src/rehearsal/micropython-engine.js';
import { perturbedPlant } from '../../src/rehearsal/plant-parameters.js';
import { runSetup } from '../../src/rehearsal/runner.js';
import { twinEngine } from '../../src/rehearsal/twin-maker.js';
import { WheelEdges } from '../../src/rehearsal/wheel-edges.js';
import { compileCourse } from '../../src/course/lane.js';
import { loadCourse } from '../../src/course/load-course.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { SHEET, cart, quickDesign } from '../firmware/cart.js';
import { MICROPYTHON_CARTS } from '../firmware/micropython-carts.js';

const SINGLE = { channels: 'single', linesPerTurn: 120, left: { a: 3 }, right: { a: 4 } };
const QUADRATURE = {
  channels: 'quadrature',
  linesPerTurn: 120,
  left: { a: 3, b: 12 },
  right: { a: 11, b: 4, inverted: true },
};
const { lane } = await loadCourse('examples/tray-cart/nursery-lane.json');
const straight = compileCourse({
  courseVersion: 1,
  closed: false,
  lineWidthMm: 19,
  pieces: [{ straightMm: 6000 }],
});

it('edges are those of the distance rolled, with a sign only from two channels', () => {
  const encoders = { linesPerTurn: 10, single: false } as ConstructorParameters<typeof WheelEdges>[0];
  const turnM = Math.PI * 0.05;
  const edges = new WheelEdges(encoders, 0.05);
  edges.look({ leftRolledM: 2.5 * turnM, rightRolledM: -turnM / 2 });
  expect([edges.left, edges.right]).toEqual([50, -10]);
  edges.look({ leftRolledM: 2 * turnM, rightRolledM: -turnM / 2 });
  expect([edges.left, edges.right]).toEqual([-10, 0]);
  const single = new WheelEdges({ ...encoders, single: true }, 0.05);
  single.look({ leftRolledM: -turnM, rightRolledM: turnM });
  expect([single.left, single.right]).toEqual([20, 20]);
});

/** Mean offset of the axle beside a straight with one motor 14 % stronger than the other, mm. */
function offsetMm(vehicle: Vehicle): number {
  const engine = twinEngine(vehicle, quickDesign(vehicle).controller);
  const setup = runSetup(vehicle, straight, 0, 1, true);
  const plant = {
    ...setup.plant,
    topLeftMps: 1.07 * setup.plant.topLeftMps,
    topRightMps: 0.93 * setup.plant.topRightMps,
  };
  const { loss, trace } = engine.runNow({ ...setup, plant });
  expect(loss).toBeUndefined();
  const late = trace!.lateralM.subarray(trace!.lateralM.length / 2);
  return (1000 * late.reduce((sum, each) => sum + each, 0)) / late.length;
}

it('unequal motors hold the vehicle beside the line, but not with encoders', () => {
  expect(Math.abs(offsetMm(cart()))).toBeGreaterThan(2);
  expect(Math.abs(offsetMm(cart({ '/encoders': SINGLE })))).toBeLessThan(1);
});

it('an empty battery makes the lap longer, but hardly with encoders', () => {
  const slower = (vehicle: Vehicle): number => {
    const engine = twinEngine(vehicle, quickDesign(vehicle).controller);
    const setup = runSetup(vehicle, lane, 0, 2, false);
    const lapS = (batteryFactor: number) =>
      engine.runNow({ ...setup, plant: { ...setup.plant, batteryFactor } }).lapsS[1]!;
    return lapS(5.2 / 6) / lapS(1);
  };
  expect(slower(cart())).toBeGreaterThan(1.1);
  expect(slower(cart({ '/encoders': SINGLE }))).toBeLessThan(1.04);
});

describe.each([
  ['single', SINGLE],
  ['quadrature', QUADRATURE],
])('on the emulated chip, %s', { timeout: 120_000 }, (_, encoders) => {
  const vehicle = cart({ '/encoders': encoders });
  const design = quickDesign(vehicle);

  it('drives as the twin does, also a vehicle with unequal motors', async () => {
    const engine = await chipEngine(SHEET, design);
    const setup = runSetup(vehicle, straight, 3, 1, false);
    const chip = await engine.run(setup);
    const twin = twinEngine(vehicle, design.controller).runNow(setup);
    expect(chip.loss).toBeUndefined();
    expect(Math.abs(chip.lapsS[0]! / twin.lapsS[0]! - 1)).toBeLessThan(0.02);
  });
});

it('a blocked wheel stops the emulated chip and the twin', { timeout: 120_000 }, async () => {
  const vehicle = cart({ '/encoders': SINGLE });
  const design = quickDesign(vehicle);
  const setup = runSetup(vehicle, straight, 0, 1, false);
  const plant = { ...perturbedPlant(vehicle, 0), topLeftMps: 1e-6 };
  for (const engine of [await chipEngine(SHEET, design), twinEngine(vehicle, design.controller)]) {
    const { loss } = await engine.run({ ...setup, plant });
    expect(loss?.timeS).toBeLessThan(1.5);
  }
});

it.each(['esp32, encoders', 'pico, quadrature encoders, rules'])(
  'in the MicroPython interpreter: %s',
  async (name) => {
    const vehicle = cart(MICROPYTHON_CARTS[name]);
    const design = quickDesign(vehicle);
    const engine = await micropythonEngine(SHEET, design);
    const setup = runSetup(vehicle, straight, 3, 1, false);
    const result = await engine.run(setup);
    const twin = twinEngine(vehicle, design.controller).runNow(setup);
    expect(result.loss).toBeUndefined();
    expect(Math.abs(result.timeS / twin.timeS - 1)).toBeLessThan(0.3);
    expect(Math.abs(result.lapsS[0]! / twin.lapsS[0]! - 1)).toBeLessThan(0.03);
  },
);
