/**
 * The boards with other AVR chips than the demo's: the firmware fits, compiles without a warning and drives the demo's lane on the
 * emulated chip as the twin does, with sensors on converter channels beyond 8 and each kind of driver.
 */
import { describe, expect, it } from 'vitest';
import { loadCourse } from '../../src/course/load-course.js';
import type { FirmwareDesign } from '../../src/firmware/render.js';
import { chipEngine } from '../../src/rehearsal/chip-engine.js';
import { runSetup } from '../../src/rehearsal/runner.js';
import { twinEngine } from '../../src/rehearsal/twin-maker.js';
import type { BoardId } from '../../src/vehicle/board-facts.js';
import { BOARDS } from '../../src/vehicle/boards.js';
import type { DriverSchemeId } from '../../src/vehicle/drivers.js';
import { SHEET, cart, quickDesign } from '../firmware/cart.js';
import type { Changes } from '../sheet/example-sheet.js';
import { plannedCart } from '../vehicle/planned-cart.js';
import { ChipBench, imageOf } from './chip-bench.js';

/** Long enough for a bend of the lane, the gap and the crossing, s. */
const DRIVEN_S = 2.5;
const NURSERY = 'examples/tray-cart/nursery-lane.json';

function design(
  board: BoardId,
  sensorKind: 'analog' | 'digital',
  sensorCount: number,
  scheme: DriverSchemeId,
  more: Changes = {},
): FirmwareDesign {
  const pitchMm = Math.min(10, 90 / sensorCount);
  return quickDesign(
    cart({
      ...plannedCart(board, { sensorKind, sensorCount, scheme }),
      '/sensors/pitchMm': pitchMm,
      ...more,
    }),
  );
}

/** Timer 3 of the ATmega32U4 drives one wheel, its timer 4 the other. */
function cartOnTimer4(): FirmwareDesign {
  const driver = { scheme: 'pwm-dir', left: { pwm: 5, dir: 7 }, right: { pwm: 6, dir: 8 } };
  return design('leonardo', 'analog', 6, 'pwm-dir', {
    '/sensors/pins': ['A0', 'A1', 'A2', 'A3', 'A4', 'A5'],
    '/drive/driver': driver,
    '/start/buttonPin': 12,
  });
}

const CASES: [string, FirmwareDesign][] = [
  ['mega2560, 16 analog sensors, dual-pwm', design('mega2560', 'analog', 16, 'dual-pwm')],
  ['leonardo, 10 analog sensors, pwm-in-in', design('leonardo', 'analog', 10, 'pwm-in-in')],
  ['leonardo, 6 analog sensors, timers 3 and 4', cartOnTimer4()],
];

describe('firmware on the emulated chip', { timeout: 120_000 }, () => {
  it.each(CASES)('%s: fits, and drives as on the twin', async (_, made) => {
    const { lane } = await loadCourse(NURSERY);
    const engine = await chipEngine(SHEET, made);
    const { flashBytes = 0, ramBytes = 0 } = made.vehicle.board;
    expect(engine.image.warnings).toEqual([]);
    expect(engine.image.flashBytes).toBeLessThan(flashBytes / 2);
    expect(engine.image.ramBytes).toBeLessThan(ramBytes / 2);
    const setup = { ...runSetup(made.vehicle, lane, 0, 1, false), timeLimitS: DRIVEN_S };
    const { loss: chipEnd } = await engine.run(setup);
    const { loss: twinEnd } = await twinEngine(made.vehicle, made.controller).run(setup);
    expect([chipEnd?.reason, twinEnd?.reason]).toEqual(['time-limit', 'time-limit']);
    expect(Math.abs(chipEnd!.sM / twinEnd!.sM - 1)).toBeLessThan(0.03);
  });

  it.each(['mega2560', 'leonardo'] as const)('%s: the sample clock keeps time', async (board) => {
    const made = design(board, 'analog', 6, 'pwm-in-in');
    const bench = new ChipBench(await imageOf(made), made.vehicle, new Array<number>(6).fill(123));
    bench.run(0.1);
    bench.hold();
    bench.run(0.1);
    bench.release();
    bench.run(2);
    const periods = bench.sampledS.slice(1).map((timeS, i) => timeS - bench.sampledS[i]!);
    expect(periods.length).toBeGreaterThan(50);
    const meanS = periods.reduce((sum, each) => sum + each, 0) / periods.length;
    expect(meanS).toBeCloseTo(BOARDS[board].samplePeriodS, 5);
  });
});
