/**
 * Every board with every driver scheme and every kind of bar: the firmware compiles without a warning or loads, and drives the demo's
 * lane on the emulated chip, or in the real interpreter, as the twin does.
 *
 * 18 cases hold every pair of board, scheme and kind; FAIRLEAD_MATRIX=full drives all 54.
 */
import { describe, expect, it } from 'vitest';
import { loadCourse } from '../../src/course/load-course.js';
import type { FirmwareDesign } from '../../src/firmware/render.js';
import { chipEngine } from '../../src/rehearsal/chip-engine.js';
import type { Engine } from '../../src/rehearsal/engine.js';
import { micropythonEngine } from '../../src/rehearsal/micropython-engine.js';
import { runSetup } from '../../src/rehearsal/runner.js';
import { twinEngine } from '../../src/rehearsal/twin-maker.js';
import type { BoardId } from '../../src/vehicle/board-facts.js';
import { BOARDS, BOARD_IDS } from '../../src/vehicle/boards.js';
import type { DriverSchemeId } from '../../src/vehicle/drivers.js';
import { SHEET, cart, quickDesign } from '../firmware/cart.js';
import { plannedCart } from '../vehicle/planned-cart.js';

const SCHEMES: readonly DriverSchemeId[] = ['pwm-dir', 'pwm-in-in', 'dual-pwm'];
const KINDS = ['analog', 'digital', 'mixed'] as const;
const DRIVEN_S = 1;
const FULL = process.env['FAIRLEAD_MATRIX'] === 'full';

/** Most sensors, up to six, that the board has pins for. */
function design(board: BoardId, scheme: DriverSchemeId, sensorKind: (typeof KINDS)[number]): FirmwareDesign {
  const onPico = { analog: 3, mixed: 5, digital: 6 };
  const sensorCount = board === 'pico' ? onPico[sensorKind] : 6;
  const pitch = sensorCount === 3 ? { '/sensors/pitchMm': 14 } : {};
  return quickDesign(cart({ ...plannedCart(board, { sensorKind, sensorCount, scheme }), ...pitch }));
}

/** The board's own engine; a sketch must compile without a warning and leave half of the memory free. */
async function engineOf(made: FirmwareDesign): Promise<Engine> {
  const { board } = made.vehicle;
  if (board.language === 'micropython') return micropythonEngine(SHEET, made);
  const engine = await chipEngine(SHEET, made);
  expect(engine.image.warnings).toEqual([]);
  expect(engine.image.flashBytes).toBeLessThan((board.flashBytes ?? 0) / 2);
  expect(engine.image.ramBytes).toBeLessThan((board.ramBytes ?? 0) / 2);
  return engine;
}

const CASES = BOARD_IDS.flatMap((board, b) =>
  SCHEMES.flatMap((scheme, s) =>
    KINDS.filter((_, k) => FULL || (b + s + k) % KINDS.length === 0).map((kind) => ({ board, scheme, kind })),
  ),
);

describe('drives on its board as on the twin', { timeout: FULL ? 60_000 : 30_000 }, () => {
  it.each(CASES)('$board, $scheme, $kind sensors', async ({ board, scheme, kind }) => {
    expect(BOARDS[board].id).toBe(board);
    const { lane } = await loadCourse('examples/tray-cart/nursery-lane.json');
    const made = design(board, scheme, kind);
    const setup = { ...runSetup(made.vehicle, lane, 0, 1, false), timeLimitS: DRIVEN_S };
    const { loss: there } = await (await engineOf(made)).run(setup);
    const { loss: twin } = await twinEngine(made.vehicle, made.controller).run(setup);
    expect([there?.reason, twin?.reason], there?.detail).toEqual(['time-limit', 'time-limit']);
    expect(Math.abs(there!.sM / twin!.sM - 1)).toBeLessThan(0.03);
  });
});
