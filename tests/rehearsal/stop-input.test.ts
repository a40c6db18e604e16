/**
 * The stop input: a contact to ground that is closed while the vehicle may move. Open, or with a broken wire, it stops the vehicle: the
 * fail-safe way round, common practice. Driven on the emulated chip and in the interpreter.
 */
import { beforeAll, describe, expect, it } from 'vitest';
import { loadCourse } from '../../src/course/load-course.js';
import { stopBoundS } from '../../src/design/delay.js';
import { chipEngine } from '../../src/rehearsal/chip-engine.js';
import type { ChipImage } from '../../src/rehearsal/chip-build.js';
import type { Engine } from '../../src/rehearsal/engine.js';
import { parseFault } from '../../src/rehearsal/fault.js';
import { micropythonEngine } from '../../src/rehearsal/micropython-engine.js';
import { runSetup } from '../../src/rehearsal/runner.js';
import { SHEET, cart, quickDesign } from '../firmware/cart.js';
import { MICROPYTHON_CARTS } from '../firmware/micropython-carts.js';
import { drivenFromS, flashCodes, offFromS, onStand } from '../firmware/micropython-stand.js';
import { plannedCart } from '../vehicle/planned-cart.js';
import { ChipBench, imageOf, lineAt } from './chip-bench.js';

const { lane } = await loadCourse('examples/tray-cart/nursery-lane.json');
const STOP_FLASHES = 11;
/** Time between two looks of an engine at the motors, s. */
const LOOK_S = 2e-3;

const onMega = plannedCart('mega2560', {
  sensorKind: 'analog',
  sensorCount: 6,
  scheme: 'pwm-dir',
  stopInput: true,
});

/** On the chip each case costs seconds, so that each kind of opening is tried on one of the boards. */
describe.each([
  ['chip, uno', cart({ '/stopPin': 12 }), ['stop=open@1s+0.01s', 'stop=open@0s']],
  ['chip, mega2560, planned', cart(onMega), ['stop=open@1s']],
  [
    'micropython, esp32',
    cart({ ...MICROPYTHON_CARTS['esp32, analog'], '/stopPin': 18 }),
    ['stop=open@1s', 'stop=open@1s+0.01s', 'stop=open@0s'],
  ],
])('%s', { timeout: 120_000 }, (_name, vehicle, faults) => {
  let engine: Engine;
  beforeAll(async () => {
    const make = vehicle.language === 'arduino' ? chipEngine : micropythonEngine;
    engine = await make(SHEET, quickDesign(vehicle));
  });

  it.each(faults)('%s: motors off at once, for good, with the reason', async (fault) => {
    const { ending } = await engine.run(runSetup(vehicle, lane, 0, 1, false, [parseFault(fault)]));
    expect(ending).toMatchObject({ motorsOff: true, reason: 'StopInput', restarted: false });
    // a vehicle that does not set off was never driven
    if (fault.endsWith('@0s')) expect(ending!.reactionS).toBe(0);
    expect(ending!.reactionS).toBeLessThanOrEqual(stopBoundS(vehicle) + LOOK_S);
  });
});

describe('on the chip, after a stop', { timeout: 120_000 }, () => {
  const vehicle = cart({ '/stopPin': 12 });
  let image: ChipImage;
  beforeAll(async () => {
    image = await imageOf(quickDesign(vehicle));
  });
  const driving = (): ChipBench => {
    const rig = new ChipBench(image, vehicle, lineAt(vehicle, 0));
    rig.start();
    rig.run(0.5);
    expect(rig.isDriven).toBe(true);
    return rig;
  };

  it('closing the contact starts nothing; the button does', () => {
    const rig = driving();
    rig.openStop(true);
    rig.run(0.1);
    rig.openStop(false);
    rig.run(1);
    expect(rig.isDriven).toBe(false);
    expect(rig.flashes()).toContain(STOP_FLASHES);
    rig.press();
    expect(rig.run(1, () => rig.isDriven)).toBe(true);
  });

  it('the button does nothing while it is open, and stops the countdown', () => {
    const rig = driving();
    rig.openStop(true);
    rig.run(0.1);
    const { lastDriven } = rig.motors;
    rig.press();
    rig.run(1);
    rig.openStop(false);
    rig.press();
    rig.run(0.2);
    rig.openStop(true);
    rig.run(0.01);
    rig.openStop(false);
    rig.run(1);
    expect(rig.motors.lastDriven).toBe(lastDriven);
  });

  it('stops the sweep of a calibration too', async () => {
    const sweeping = cart({ '/sensors/calibration': { mode: 'sweep' }, '/stopPin': 12 });
    const rig = new ChipBench(await imageOf(quickDesign(sweeping)), sweeping, lineAt(sweeping, 0));
    rig.start();
    expect(rig.isDriven).toBe(true);
    rig.openStop(true);
    rig.run(0.1);
    rig.openStop(false);
    rig.run(0.5);
    expect(rig.isDriven).toBe(false);
  });
});

describe('in MicroPython, after a stop', { timeout: 120_000 }, () => {
  const design = quickDesign(cart({ ...MICROPYTHON_CARTS['pico, digital, rules'], '/stopPin': 'GP14' }));

  it('closing the contact starts nothing; the button does', async () => {
    const seen = await onStand(design, { pressed: [[1, 1.2]], opened: [[3, 3.01]], endS: 16 });
    expect(offFromS(seen)).toBeGreaterThan(3);
    expect(offFromS(seen)).toBeLessThanOrEqual(3 + stopBoundS(design.vehicle));
    expect(flashCodes(seen, 8)).toContain(STOP_FLASHES);
    const again = await onStand(design, {
      pressed: [
        [1, 1.2],
        [5, 5.2],
      ],
      opened: [[3, 3.01]],
      endS: 7,
    });
    expect(again.duties.some(({ timeS, left }) => timeS > 5.5 && left !== 0)).toBe(true);
  });

  it('the button does nothing while it is open', async () => {
    const seen = await onStand(design, { pressed: [[1, 1.2]], opened: [[0, 9]], endS: 4 });
    expect(drivenFromS(seen)).toBeUndefined();
  });
});
