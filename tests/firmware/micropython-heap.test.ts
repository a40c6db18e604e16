/**
 * No iteration of the MicroPython loop takes memory, once the vehicle drives: the heap is locked around the whole of it - clock, sensors,
 * button, controller, motors, LED - and the interpreter raises MemoryError at the first object. Countdown and standing are locked too;
 * only the press itself, and the end of the countdown, may take some: gc.collect() and the watchdog come then.
 */
import { describe, expect, it } from 'vitest';
import type { PythonFile } from '../../src/rehearsal/micropython-interpreter.js';
import { cart, quickDesign } from './cart.js';
import { MICROPYTHON_CARTS } from './micropython-carts.js';
import { boardFiles, drivenFromS, filesOnStand } from './micropython-stand.js';

/** As supervisor.run() does, but with the heap locked where the vehicle drives or has come to rest. */
const LOCKED_MAIN = `
import motors
import states
import user_hooks
from micropython import heap_lock, heap_unlock
from supervisor import Supervisor

supervisor = Supervisor()
user_hooks.setup()
while True:
    lock = states.is_moving(supervisor.state) or supervisor.state == states.READY
    if lock:
        heap_lock()
    try:
        supervisor.sample()
    finally:
        if lock:
            heap_unlock()
`;

const SCRIPT = { pressed: [[0.2, 0.3]] as const, endS: 6 };

async function onLockedHeap(name: string, change = (file: PythonFile) => file) {
  const design = quickDesign(cart(MICROPYTHON_CARTS[name]));
  const files = (await boardFiles(design))
    .map((file) => (file.path === 'main.py' ? { ...file, text: LOCKED_MAIN } : file))
    .map(change);
  // the line goes away in the end: search and stop are driven through too
  const share = (sensor: number, timeS: number) => {
    if (timeS > 4) return 0;
    const middle = (design.vehicle.bar.pins.length - 1) * (0.5 + 0.4 * Math.sin(2 * timeS));
    return Math.abs(sensor - middle) < 0.9 ? 1 : 0;
  };
  return filesOnStand(design.vehicle, files, { ...SCRIPT, share });
}

describe('the whole loop takes no memory', () => {
  it.each(Object.keys(MICROPYTHON_CARTS))('%s', async (name) => {
    const seen = await onLockedHeap(name);
    expect(seen.end).toMatchObject({ by: 'power-cut', detail: '' });
    expect(drivenFromS(seen)).toBeGreaterThan(0.2);
  });

  it.each([
    ['a list', 'made = [drive]'],
    ['a number too large for a word', 'made = drive.speed_q29 + (1 << 30)'],
    ['a text', 'made = "%d" % drive.phase'],
  ])('%s made in a sample is told', async (_, line) => {
    const { end } = await onLockedHeap(Object.keys(MICROPYTHON_CARTS)[0]!, (file) => ({
      ...file,
      text: file.text.replace('user_hooks.sample(drive)', `user_hooks.sample(drive)\n            ${line}`),
    }));
    expect(end).toMatchObject({ by: 'exception' });
    expect(end.detail).toContain('MemoryError');
  });
});
