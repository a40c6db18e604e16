/** Calibration by sweep as the MicroPython firmware does it: the rendered files themselves, in the real interpreter. */
import { describe, expect, it } from 'vitest';
import { cart, quickDesign } from './cart.js';
import { MICROPYTHON_CARTS } from './micropython-carts.js';
import { flashCodes, lastingDuties, offFromS, onStand } from './micropython-stand.js';

const sweep = quickDesign(cart(MICROPYTHON_CARTS['esp32, sweep']));
const PRESS = [1, 1.2] as const;

describe('calibration by sweep', () => {
  /** The bar turns with the duties: the line passes under it from side to side, as in a turn to the left and then to the right. */
  const turning = (sensor: number, timeS: number) => {
    const turn = Math.sin(Math.min(2 * Math.PI, Math.max(0, timeS - 1.52) * 4.3));
    return Math.max(0, Math.min(1, 1.4 - Math.abs(sensor - 2.5 - 4.5 * turn)));
  };

  it('turns left, then right, and drives when the line is found again', async () => {
    const seen = await onStand(sweep, { pressed: [PRESS], share: turning, endS: 4 });
    const lasting = lastingDuties(seen);
    const turns = lasting.slice(0, 3).map(({ left, right }) => [left.toFixed(2), right.toFixed(2)]);
    expect(turns).toEqual([
      ['-0.19', '0.19'],
      ['0.19', '-0.19'],
      ['-0.19', '0.19'],
    ]);
    expect(lasting.some(({ left, right }) => left > 0 && right > 0)).toBe(true);
    expect(offFromS(seen)).toBeUndefined();
  });

  it('refuses a sensor without contrast and flashes its number', async () => {
    const dead = (sensor: number, timeS: number) => (sensor === 3 ? 0 : turning(sensor, timeS));
    const seen = await onStand(sweep, { pressed: [PRESS], share: dead, endS: 14 });
    expect(lastingDuties(seen).some(({ left, right }) => left > 0 && right > 0)).toBe(false);
    expect(offFromS(seen)).toBeLessThan(4);
    expect(flashCodes(seen, 6).slice(0, 4)).toEqual(expect.arrayContaining([8, 4]));
  });

  it('stops when the line is not found again', async () => {
    const gone = (sensor: number, timeS: number) => (timeS < 2.5 ? turning(sensor, timeS) : 0);
    const seen = await onStand(sweep, { pressed: [PRESS], share: gone, endS: 14 });
    expect(offFromS(seen)).toBeLessThan(5);
    expect(flashCodes(seen, 6)).toContain(9);
  });
});
