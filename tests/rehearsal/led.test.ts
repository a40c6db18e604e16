/**
 * The LED tells why the vehicle stands, on every board: the board's own, one on a chosen pin, lit while high or while low. It is read
 * from its light. faults.test.ts has the Uno's and the Pico's own; the Nano's is the Uno's.
 */
import { describe, expect, it } from 'vitest';
import { loadCourse } from '../../src/course/load-course.js';
import { chipEngine } from '../../src/rehearsal/chip-engine.js';
import { parseFault } from '../../src/rehearsal/fault.js';
import { renderFirmware } from '../../src/firmware/render.js';
import { micropythonEngine } from '../../src/rehearsal/micropython-engine.js';
import { runSetup } from '../../src/rehearsal/runner.js';
import type { BoardId } from '../../src/vehicle/board-facts.js';
import { SHEET, cart, quickDesign } from '../firmware/cart.js';
import type { Changes } from '../sheet/example-sheet.js';
import { plannedCart } from '../vehicle/planned-cart.js';

const request = { sensorKind: 'digital', sensorCount: 6, scheme: 'pwm-dir' } as const;

async function reasonShown(board: BoardId, more: Changes): Promise<string | null> {
  const design = quickDesign(cart({ ...plannedCart(board, request), '/start/countdownS': 0, ...more }));
  const { vehicle } = design;
  const engine = await (vehicle.language === 'arduino' ? chipEngine : micropythonEngine)(SHEET, design);
  const { lane } = await loadCourse('examples/tray-cart/nursery-lane.json');
  const { ending } = await engine.run(runSetup(vehicle, lane, 0, 1, false, [parseFault('line=gone@0.2s')]));
  expect(ending).toMatchObject({ motorsOff: true, restarted: false });
  return ending!.reason;
}

/** Pins that the plan for these boards leaves free. */
const OWN: [BoardId, Changes][] = [
  ['leonardo', { '/led': { pin: 'A5', activeLow: true } }],
  ['pico', { '/led': { pin: 'GP28', activeLow: true } }],
  ['esp32', { '/led': { pin: 33 } }],
];

describe('the LED', { timeout: 120_000 }, () => {
  it.each<BoardId>(['mega2560', 'esp32'])("%s, the board's own", async (board) => {
    expect(await reasonShown(board, {})).toBe('LineLost');
  });

  it.each(OWN)('%s, on a chosen pin', async (board, led) => {
    expect(await reasonShown(board, led)).toBe('LineLost');
  });

  it('is left out where its pin serves otherwise', async () => {
    const taken = { '/start/buttonPin': 13 };
    const named = async (changes: Changes) =>
      (await renderFirmware(SHEET, quickDesign(cart(changes)))).some(({ path }) => path.includes('blink'));
    expect([await named(taken), await named({ ...taken, '/led': { pin: 4 } })]).toEqual([false, true]);
  });
});
