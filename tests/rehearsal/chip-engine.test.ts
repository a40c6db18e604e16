/** The compiled firmware drives the demo's lane: bends down to 120 mm radius, a gap, a crossing. */
import { describe, expect, it } from 'vitest';
import { loadCourse } from '../../src/course/load-course.js';
import { deriveDesign } from '../../src/design/derive.js';
import type { FirmwareDesign } from '../../src/firmware/render.js';
import { chipEngine } from '../../src/rehearsal/chip-engine.js';
import type { RunResult } from '../../src/rehearsal/engine.js';
import { runSetup } from '../../src/rehearsal/runner.js';
import { twinEngine } from '../../src/rehearsal/twin-maker.js';
import { CARTS, SHEET, cart, quickDesign } from '../firmware/cart.js';

const NURSERY = 'examples/tray-cart/nursery-lane.json';

async function lapsOnChip(design: FirmwareDesign, laps: number, seed = 0): Promise<RunResult> {
  const { lane } = await loadCourse(NURSERY);
  const engine = await chipEngine(SHEET, design);
  return engine.run(runSetup(design.vehicle, lane, seed, laps, false));
}

describe('the demo cart on the emulated chip', { timeout: 120_000 }, () => {
  it.each(['the demo cart', 'the demo cart with rules'])(
    '%s drives two laps, much as the twin does',
    async (name) => {
      const design = deriveDesign(cart(CARTS[name]));
      const onChip = await lapsOnChip(design, 2);
      expect(onChip.loss).toBeUndefined();
      expect(onChip.lapsS).toHaveLength(2);
      const { lane } = await loadCourse(NURSERY);
      const onTwin = await twinEngine(design.vehicle, design.controller).run(
        runSetup(design.vehicle, lane, 0, 2, false),
      );
      expect(Math.abs(onChip.lapsS[1]! / onTwin.lapsS[1]! - 1)).toBeLessThan(0.03);
    },
  );

  it.each(['digital sensors', 'eight sensors, dark line', 'a sweep, dark line, and rules'])(
    '%s: a lap',
    async (name) => {
      const result = await lapsOnChip(quickDesign(cart(CARTS[name])), 1);
      expect(result.loss).toBeUndefined();
      expect(result.maxLateralM).toBeLessThan(0.03);
    },
  );

  it('repeats a perturbed cart, noise and all, by its seed', async () => {
    const { lane } = await loadCourse(NURSERY);
    const design = quickDesign(cart());
    const engine = await chipEngine(SHEET, design);
    const setup = { ...runSetup(design.vehicle, lane, 5, 1, false), timeLimitS: 1 };
    const first = await engine.run(setup);
    expect(first.loss?.reason).toBe('time-limit');
    expect(first.loss?.sM).toBeGreaterThan(0.3);
    expect(await engine.run(setup)).toEqual(first);
  });
});
