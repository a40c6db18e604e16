/** The converter's clock follows the resolution that the design needs, and the emulated chip converts at that pace. */
import { expect, it } from 'vitest';
import { adcClockOf } from '../../src/design/adc-clock.js';
import { AvrChip } from '../../src/rehearsal/chip-avr.js';
import { cart, quickDesign } from '../firmware/cart.js';
import { imageOf } from '../rehearsal/chip-bench.js';
import type { Changes } from '../sheet/example-sheet.js';

const SIX = [0, 0, 0, 0, 0, 0];
/** Line and ground so many counts apart, spots of a radius, mm. */
const weak = (spanCounts: number, spotRadiusMm: number): Changes => ({
  '/sensors/calibration': {
    mode: 'stored',
    ground: SIX.map(() => 400),
    line: SIX.map(() => 400 + spanCounts),
  },
  '/sensors/spotRadiusMm': spotRadiusMm,
});

// errors by the data sheet: 2 counts at 125 kHz, 2 + 2.5 * 50 / 800 = 2.16 at 250 kHz, 2 + 2.5 * 300 / 800 = 2.94 at 500 kHz;
// allowed: half of 3 % of 10 mm pitch, 0.15 mm, times span / spot diameter
it.each([
  ['the demo cart', {}, 32, (0.15 * 716) / 8],
  ['weak contrast', weak(150, 4), 64, (0.15 * 150) / 8],
  ['weak contrast and wide spots', weak(125, 4.5), 128, (0.15 * 125) / 9],
  ['weaker still: the best there is', weak(110, 5), 128, (0.15 * 110) / 10],
  ['weak contrast, read as on and off', { ...weak(110, 5), '/control/kind': 'rules' }, 32, (2.5 * 110) / 10],
] as [string, Changes, number, number][])('%s', (_, changes, prescaler, allowedCounts) => {
  expect(adcClockOf(cart(changes))).toMatchObject({
    prescaler,
    allowedCounts: expect.closeTo(allowedCounts, 6) as number,
  });
});

it('no choice with digital sensors, nor in MicroPython', () => {
  expect(adcClockOf(cart({ '/sensors/kind': 'digital', '/sensors/calibration': undefined }))).toBe(undefined);
});

it.each([
  ['the demo cart', {}],
  ['weak contrast and wide spots', weak(125, 4.5)],
] as [string, Changes][])('%s: on the chip', { timeout: 60_000 }, async (_, changes) => {
  const made = quickDesign(cart(changes));
  const { program } = await imageOf(made);
  const startedAt: number[] = [];
  const chip: AvrChip = new AvrChip(program, made.vehicle.board, {
    sample: () => startedAt.push(chip.cycles) && 400,
    pinsChanged: () => undefined,
  });
  chip.runTo(1.6e6);
  // within a scan of six; the interrupts take less than 5 us beside the 13 clocks of a conversion, and it waits for the next clock
  const { prescaler = 0 } = adcClockOf(made.vehicle) ?? {};
  const gaps = startedAt.slice(-7).map((cycles, i, all) => cycles - (all[i - 1] ?? cycles));
  const scan = gaps.filter((cycles) => cycles > 0 && cycles < 20_000).sort((a, b) => a - b);
  expect(scan[2]).toBeGreaterThanOrEqual(13 * prescaler);
  expect(scan[2]).toBeLessThan(13 * prescaler + 80 + prescaler);
});
