/** The rendered MicroPython firmware drives the demo carts round the demo lane, in the real interpreter. */
import { describe, expect, it } from 'vitest';
import { compileCourse } from '../../src/course/lane.js';
import { loadCourse } from '../../src/course/load-course.js';
import { designFor } from '../../src/pipeline.js';
import { MicroPythonEngine, micropythonEngine } from '../../src/rehearsal/micropython-engine.js';
import { runSetup } from '../../src/rehearsal/runner.js';
import { twinEngine } from '../../src/rehearsal/twin-maker.js';
import { loadSheet } from '../../src/sheet/load.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';
import { cart, quickDesign, SHEET } from '../firmware/cart.js';
import { MICROPYTHON_CARTS } from '../firmware/micropython-carts.js';
import { boardFiles } from '../firmware/micropython-stand.js';

const { lane } = await loadCourse('examples/tray-cart/nursery-lane.json');
const straight = compileCourse({
  courseVersion: 1,
  closed: false,
  lineWidthMm: 19,
  pieces: [{ straightMm: 2000 }],
});
const setup = (vehicle: Vehicle, seed: number) => runSetup(vehicle, lane, seed, 2, false);

describe.each(['pico', 'esp32'])('tray-cart-%s', (board) => {
  it.each(['pid', 'rules'] as const)('drives two laps with %s, as the twin does', async (kind) => {
    const { sheet, digest } = await loadSheet(`examples/tray-cart/tray-cart-${board}.json`);
    const design = designFor({ ...sheet, control: { ...sheet.control, kind } });
    const { vehicle, controller } = design;
    const engine = await micropythonEngine({ digest }, design);
    const result = await engine.run(setup(vehicle, 0));
    const twin = twinEngine(vehicle, controller).runNow(setup(vehicle, 0));
    expect(result.loss).toBeUndefined();
    expect(result.lapsS).toHaveLength(2);
    // Same law, nearly the same timing: the flying lap agrees within the effect of a few samples.
    expect(Math.abs(result.lapsS[1]! / twin.lapsS[1]! - 1)).toBeLessThan(0.02);
  });
});

describe('a run', () => {
  const design = quickDesign(cart(MICROPYTHON_CARTS['esp32, analog']));
  const { vehicle } = design;

  it('is the same every time', async () => {
    const engine = await micropythonEngine(SHEET, design);
    expect(await engine.run(setup(vehicle, 5))).toEqual(await engine.run(setup(vehicle, 5)));
  });

  it('whose program breaks off is lost with the traceback', async () => {
    const hooks = `
def setup():
    pass

def sample(steering):
    if steering.speed_q29 > 0x0C000000:
        steering.no_such_thing

def stopped(reason):
    pass
`;
    const engine = new MicroPythonEngine(await boardFiles(design, hooks), vehicle);
    const { loss } = await engine.run(runSetup(vehicle, straight, 0, 1, false));
    expect(loss?.reason).toBe('stopped');
    expect(loss?.detail).toContain("AttributeError: 'Steering' object has no attribute 'no_such_thing'");
    expect(loss?.sM).toBeGreaterThan(0);
  });

  it('whose program never sets off is lost and says so', async () => {
    const files = [{ path: 'main.py', text: 'import time\nwhile True:\n    time.sleep_ms(5)\n' }];
    const { loss } = await new MicroPythonEngine(files, vehicle).run(setup(vehicle, 0));
    expect(loss).toMatchObject({ reason: 'stopped', detail: 'The firmware did not set off.' });
  });

  it('whose program leaves the motors on is watched on, as the vehicle would roll on', async () => {
    const text = `
from machine import Pin, PWM

Pin(22, Pin.OUT, value=1)
for pwm, forward in ((25, 26), (14, 13)):
    Pin(forward, Pin.OUT, value=1)
    PWM(Pin(pwm, Pin.OUT), freq=20000, duty_u16=20000)
raise RuntimeError("left alone")
`;
    const engine = new MicroPythonEngine([{ path: 'main.py', text }], vehicle);
    const { loss } = await engine.run(setup(vehicle, 0));
    expect(loss).toMatchObject({ reason: 'off-lane' });
    expect(loss?.detail).toContain('RuntimeError: left alone');
  });
});
