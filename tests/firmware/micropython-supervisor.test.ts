/** When the MicroPython firmware moves and when it does not: the rendered files themselves, in the real interpreter. */
import { describe, expect, it } from 'vitest';
import { RESET_CAUSE } from '../../src/rehearsal/micropython-chip.js';
import { cart, quickDesign } from './cart.js';
import { MICROPYTHON_CARTS } from './micropython-carts.js';
import { drivenFromS, flashCodes, offFromS, onStand } from './micropython-stand.js';

const esp32 = quickDesign(cart(MICROPYTHON_CARTS['esp32, analog']));
const pico = quickDesign(cart(MICROPYTHON_CARTS['pico, digital, rules']));
const shortRun = quickDesign(
  cart({ ...MICROPYTHON_CARTS['pico, digital, one class'], '/start/runLimitS': 2 }),
);

const COUNTDOWN_S = 0.5;
const DEBOUNCE_S = 0.02;
const PRESS = [1, 1.2] as const;

describe.each([
  ['esp32', esp32],
  ['pico', pico],
])('%s', (_board, design) => {
  it('does not move without the button', async () => {
    const seen = await onStand(design, { endS: 5 });
    expect(seen.end).toMatchObject({ by: 'power-cut' });
    expect(seen.duties).toEqual([]);
    expect(new Set(flashCodes(seen, 0))).toEqual(new Set([1]));
  });

  it('does not take a button that is held down since the reset for a press', async () => {
    expect((await onStand(design, { pressed: [[0, 4]], endS: 4 })).duties).toEqual([]);
    const again = [2, 2.2] as const;
    expect(drivenFromS(await onStand(design, { pressed: [[0, 1], again], endS: 3 }))).toBeGreaterThan(2);
  });

  it('does not take the bouncing of contacts for a press', async () => {
    const bounces = Array.from({ length: 20 }, (_, i) => [1 + 0.02 * i, 1.012 + 0.02 * i] as const);
    expect((await onStand(design, { pressed: bounces, endS: 4 })).duties).toEqual([]);
  });

  it('drives after the countdown', async () => {
    const driven = drivenFromS(await onStand(design, { pressed: [PRESS], endS: 3 }));
    expect(driven).toBeGreaterThan(1 + DEBOUNCE_S + COUNTDOWN_S - 0.01);
    expect(driven).toBeLessThan(1 + DEBOUNCE_S + COUNTDOWN_S + 0.03);
  });

  it('stops at the second press and says so', async () => {
    const seen = await onStand(design, { pressed: [PRESS, [3, 3.2]], endS: 9 });
    expect(offFromS(seen)).toBeGreaterThan(3);
    expect(offFromS(seen)).toBeLessThan(3 + DEBOUNCE_S + 0.01);
    expect(flashCodes(seen, 5)).toContain(2);
  });

  it('stays standing when the button is pressed again during the countdown', async () => {
    const seen = await onStand(design, { pressed: [PRESS, [1.3, 1.4]], endS: 5 });
    expect(drivenFromS(seen)).toBeUndefined();
  });

  it('can be started again after a stop', async () => {
    const seen = await onStand(design, { pressed: [PRESS, [3, 3.2], [5, 5.2]], endS: 7 });
    expect(offFromS(seen)).toBeUndefined();
    expect(seen.duties.some(({ timeS, left }) => timeS > 5.5 && left !== 0)).toBe(true);
  });

  it('stops for good when the line is lost, and says so', async () => {
    const seen = await onStand(design, {
      pressed: [PRESS],
      share: (sensor, timeS) => (timeS < 2 && (sensor === 2 || sensor === 3) ? 1 : 0),
      endS: 12,
    });
    expect(offFromS(seen)).toBeGreaterThan(2);
    expect(offFromS(seen)).toBeLessThan(4);
    expect(flashCodes(seen, 6)).toContain(3);
  });

  it('switches the motors off when the program breaks off, and shows where', async () => {
    const hooks = `
n = 0

def setup():
    pass

def sample(steering):
    global n
    n += 1
    if n == 100:
        raise ValueError("of the user's own")

def stopped(reason):
    pass
`;
    const seen = await onStand(design, { pressed: [PRESS], endS: 5, hooks });
    expect(seen.end.by).toBe('exception');
    expect(seen.end.detail).toMatch(
      /File "user_hooks.py", line 11, in sample\nValueError: of the user's own/,
    );
    expect(offFromS(seen)).toBeLessThan(2.1);
  });

  it('is reset by the watchdog when the program hangs in a run', async () => {
    const hooks = `
import time

def setup():
    time.sleep(1)

def sample(steering):
    time.sleep(1)

def stopped(reason):
    pass
`;
    const seen = await onStand(design, { pressed: [[1.5, 1.7]], endS: 5, hooks });
    expect(seen.end).toMatchObject({ by: 'reset', detail: 'The watchdog was not fed for 200 ms.' });
  });

  it('tells that the watchdog has struck, and waits for the button', async () => {
    const seen = await onStand(design, { endS: 10, resetCause: RESET_CAUSE.watchdog });
    expect(seen.duties).toEqual([]);
    expect(flashCodes(seen, 0)).toContain(6);
  });

  it('takes nothing from the heap in a run', async () => {
    const hooks = `
import gc

before = -1

def setup():
    pass

def sample(steering):
    global before
    taken = gc.mem_alloc()
    if before >= 0 and taken != before:
        raise MemoryError(taken - before)
    before = taken

def stopped(reason):
    pass
`;
    const wander = (sensor: number, timeS: number) =>
      Math.max(0, 1 - Math.abs(sensor - 2.5 - 3 * Math.sin(9 * timeS)));
    const seen = await onStand(design, { pressed: [PRESS], share: wander, endS: 6, hooks });
    expect(seen.end).toMatchObject({ by: 'power-cut', detail: '' });
    expect(seen.duties.length).toBeGreaterThan(100);
  });

  it('stops when the loop misses its period too often', async () => {
    const hooks = `
import time

def setup():
    pass

def sample(steering):
    time.sleep_ms(12)

def stopped(reason):
    print("stopped", reason)
`;
    const seen = await onStand(design, { pressed: [PRESS], endS: 4, hooks });
    expect(seen.end.output).toEqual(['stopped 5']);
    expect(offFromS(seen)).toBeLessThan(2);
  });
});

it('stops at the run limit and says so', async () => {
  const seen = await onStand(shortRun, { pressed: [PRESS], endS: 12 });
  expect(offFromS(seen)! - drivenFromS(seen)!).toBeCloseTo(2, 1);
  expect(flashCodes(seen, 6)).toContain(4);
});
