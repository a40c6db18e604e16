/** What the compiled firmware does about button, line, time, hanging programs and calibration, on the emulated chip. */
import { beforeAll, describe, expect, it } from 'vitest';
import type { ChipImage } from '../../src/rehearsal/chip-build.js';
import { CARTS, cart, quickDesign } from '../firmware/cart.js';
import { ChipBench, imageOf, lineAt } from './chip-bench.js';

const STANDBY = {
  '/drive/driver/standbyPin': 4,
  '/drive/driver/left': { pwm: 5, in1: 7, in2: 8 },
  '/start/runLimitS': 3,
};
const vehicle = cart(STANDBY);
const centred = lineAt(vehicle, 0);
const nothing = vehicle.bar.calibration.ground;
const STANDBY_PIN = 4;

let image: ChipImage;
beforeAll(async () => {
  image = await imageOf(quickDesign(vehicle));
});

const onBench = () => new ChipBench(image, vehicle, centred);

describe('the button', { timeout: 120_000 }, () => {
  it('is needed: nothing moves by itself, motors off from the start', () => {
    const rig = onBench();
    rig.run(2);
    expect(rig.motors.lastDriven).toBe(-1);
    expect(rig.chip.isOutput(STANDBY_PIN)).toBe(true);
    expect(rig.chip.isHigh(STANDBY_PIN)).toBe(false);
    expect(rig.flashes()).toEqual([1]);
  });

  it('starts after the countdown, bouncing or not', () => {
    const rig = onBench();
    rig.run(0.1);
    rig.press();
    rig.run(vehicle.start.countdownS - 0.15);
    expect(rig.motors.lastDriven).toBe(-1);
    expect(rig.run(0.2, () => rig.isDriven)).toBe(true);
    expect(rig.chip.isHigh(STANDBY_PIN)).toBe(true);
  });

  it('does not count while it is held since power-on', () => {
    const rig = onBench();
    rig.hold();
    rig.run(2);
    expect(rig.motors.lastDriven).toBe(-1);
    rig.release();
    rig.run(0.1);
    rig.press();
    expect(rig.run(1, () => rig.isDriven)).toBe(true);
  });

  it('stops a run, and starts the next one only when pressed again', () => {
    const rig = onBench();
    rig.start();
    rig.run(0.5);
    expect(rig.isDriven).toBe(true);
    rig.press();
    expect(rig.isDriven).toBe(false);
    expect(rig.chip.isHigh(STANDBY_PIN)).toBe(false);
    rig.run(2);
    expect(rig.isDriven).toBe(false);
    expect(rig.flashes()).toEqual([2]);
    rig.press();
    expect(rig.run(1, () => rig.isDriven)).toBe(true);
  });

  it('stops the countdown too', () => {
    const rig = onBench();
    rig.run(0.1);
    rig.press();
    rig.press();
    rig.run(2);
    expect(rig.motors.lastDriven).toBe(-1);
  });
});

describe('a run', { timeout: 120_000 }, () => {
  it('drives both wheels forward alike on a straight, and turns towards the line', () => {
    const rig = onBench();
    rig.start();
    rig.run(0.3);
    expect(rig.motors.dutyLeft).toBeGreaterThan(0.5);
    expect(rig.motors.dutyRight).toBeCloseTo(rig.motors.dutyLeft, 2);
    rig.counts = lineAt(vehicle, 0.015);
    rig.run(0.1);
    expect(rig.motors.dutyRight).toBeGreaterThan(rig.motors.dutyLeft + 0.2);
  });

  it('samples with a fixed period', () => {
    const rig = onBench();
    rig.start();
    rig.run(1);
    const gapsUs = rig.sampledS.slice(1).map((timeS, i) => (timeS - rig.sampledS[i]!) * 1e6);
    expect(gapsUs.length).toBeGreaterThan(450);
    // The clock counts in steps of 4 us (timer 0, prescaler 64); polling it and its interrupts add a few more.
    expect(Math.min(...gapsUs)).toBeGreaterThan(1985);
    expect(Math.max(...gapsUs)).toBeLessThan(2015);
  });

  it('ends when the line is lost for good, and does not begin again when it is back', () => {
    const rig = onBench();
    rig.start();
    rig.run(0.5);
    rig.counts = nothing;
    const { memory, samplePeriodUs } = quickDesign(vehicle).controller;
    const searchS = (memory.searchSamples * samplePeriodUs) / 1e6;
    expect(rig.run(searchS + 0.5, () => !rig.isDriven)).toBe(true);
    rig.counts = centred;
    rig.run(2);
    expect(rig.isDriven).toBe(false);
    expect(rig.flashes()).toEqual([3]);
  });

  it('ends at the run limit', () => {
    const rig = onBench();
    rig.start();
    const beganS = rig.timeS;
    expect(rig.run(4, () => !rig.isDriven)).toBe(true);
    expect(rig.timeS - beganS).toBeCloseTo(3.05, 1);
    expect(rig.flashes()).toEqual([4]);
  });
});

describe('a program that fails', { timeout: 120_000 }, () => {
  it('is reset by the watchdog: motors off, and nothing moves again without the button', async () => {
    const hanging = await imageOf(quickDesign(vehicle), 'static int n; if (++n > 100) for (;;) {}');
    const rig = new ChipBench(hanging, vehicle, centred);
    rig.start();
    expect(rig.run(1, () => rig.chip.resets > 0)).toBe(true);
    const resetS = rig.timeS;
    rig.run(2);
    expect(rig.motors.lastDriven / 16e6).toBeLessThanOrEqual(resetS + 0.001);
    expect(rig.chip.resets).toBe(1);
    expect(rig.flashes()).toEqual([6]);
    rig.press();
    expect(rig.run(1, () => rig.isDriven)).toBe(true);
  });

  it('is stopped when it misses its period too often', async () => {
    const slow = await imageOf(quickDesign(vehicle), 'delayMicroseconds(4500);');
    const rig = new ChipBench(slow, vehicle, centred);
    rig.start();
    expect(rig.run(1, () => !rig.isDriven)).toBe(true);
    expect(rig.flashes()).toEqual([5]);
  });
});

describe('calibration by sweep', { timeout: 120_000 }, () => {
  const { '/sensors/calibration': calibration } = CARTS['a sweep']!;
  const sweeping = cart({ '/sensors/calibration': calibration });
  const { ground, line } = sweeping.bar.calibration;
  let sweepImage: ChipImage;
  beforeAll(async () => {
    sweepImage = await imageOf(quickDesign(sweeping));
  });

  /** Sweeps while the bar sees ground and, but for one sensor, line in turn. */
  function sweepWithout(flatSensor: number): ChipBench {
    const onLine = line.map((count, i) => (i === flatSensor ? ground[i]! : count));
    const rig = new ChipBench(sweepImage, sweeping, ground);
    rig.start();
    for (let i = 0; rig.isDriven && i < 800; i++) {
      rig.counts = i % 2 === 0 ? ground : onLine;
      rig.run(0.01);
    }
    return rig;
  }

  it('is refused with a sensor that sees no contrast, and says which', () => {
    const rig = sweepWithout(2);
    expect(rig.isDriven).toBe(false);
    expect(rig.flashes()).toEqual([8, 3]);
  });

  it('is refused when the line is not found again', () => {
    const rig = sweepWithout(-1);
    expect(rig.isDriven).toBe(false);
    expect(rig.flashes()).toEqual([9]);
  });
});
