/** The wheel loop against wheels that are not as the model has them. */
import { describe, expect, it } from 'vitest';
import {
  COEFFICIENT_BITS,
  type ControllerConstants,
  FULL_SPEED,
  SPEED_BITS,
} from '../../src/controller/constants.js';
import { WheelLoops } from '../../src/controller/wheel-loop.js';
import { cart, quickDesign } from '../firmware/cart.js';

const ENCODERS = { channels: 'single', linesPerTurn: 120, left: { a: 3 }, right: { a: 4 } };
const { controller } = quickDesign(cart({ '/encoders': ENCODERS }));

/** A wheel of first order with a gain of its own. */
class Wheel {
  speed = 0;
  private rolled = 0;

  constructor(
    private readonly gain: number,
    private readonly constants: ControllerConstants,
  ) {}

  /** @param given wheel speed that is driven, speed units; @returns edges of the sample */
  next(given: number): number {
    const { wheelLoop, drive } = this.constants;
    this.speed += (this.gain * given - this.speed) * (drive.motorStep / 2 ** COEFFICIENT_BITS);
    const before = Math.floor(this.rolled);
    const perSpeed = 2 ** wheelLoop!.edgeBits / wheelLoop!.speedPerEdge / 2 ** wheelLoop!.windowBits;
    this.rolled += this.speed * perSpeed;
    return Math.abs(Math.floor(this.rolled) - before);
  }
}

/** Speeds of the left wheel over time, driven by a command. */
function drive(gain: number, command: (i: number) => number, samples: number, constants = controller) {
  const loops = new WheelLoops(constants.wheelLoop!, constants.drive);
  loops.start();
  const wheel = new Wheel(gain, constants);
  const speeds: number[] = [];
  let edges = 0;
  for (let i = 0; i < samples; i++) {
    loops.count(edges, edges);
    edges = wheel.next(loops.followLeft(command(i)));
    loops.followRight(command(i));
    speeds.push(wheel.speed);
  }
  return { speeds, loops };
}

const HALF = FULL_SPEED >> 1;
const last = (speeds: readonly number[]) => speeds.slice(-100).reduce((sum, each) => sum + each, 0) / 100;

describe('a wheel with encoder', () => {
  it.each([0.8, 0.93, 1, 1.07, 1.25])('of gain %d is held to its speed within 1 %%', (gain) => {
    const { speeds } = drive(gain, () => HALF, 500);
    expect(Math.abs(last(speeds) / HALF - 1)).toBeLessThan(0.01);
  });

  it('is held backward as well, by the sign of the command', () => {
    const { speeds } = drive(0.85, () => -HALF, 500);
    expect(Math.abs(last(speeds) / -HALF - 1)).toBeLessThan(0.01);
  });

  it('of nominal gain is left alone', () => {
    const { speeds } = drive(1, () => HALF, 60);
    const step = controller.drive.motorStep / 2 ** COEFFICIENT_BITS;
    const largest = Math.max(...speeds.map((each, i) => Math.abs(each - HALF * (1 - (1 - step) ** (i + 1)))));
    // an edge more or less in the window moves the speed by this much
    const oneEdge = controller.wheelLoop!.speedPerEdge / 2 ** controller.wheelLoop!.edgeBits;
    expect(largest).toBeLessThan(1.5 * oneEdge);
  });
});

describe('a wheel that cannot give what is asked', () => {
  // two seconds at full speed on a weak battery, then half speed
  const command = (i: number) => (i < 1000 ? FULL_SPEED : HALF);
  const overshoot = (constants: ControllerConstants) => {
    const { speeds } = drive(0.8, command, 1500, constants);
    return speeds.slice(1000 + 150).filter((speed) => speed > 1.03 * HALF).length;
  };

  it('does not wind up: it is back at its speed within 0.3 s', () => {
    expect(overshoot(controller)).toBe(0);
  });

  it('would without what takes the integral back', () => {
    const wheelLoop = { ...controller.wheelLoop!, tracking: 0 };
    expect(overshoot({ ...controller, wheelLoop })).toBeGreaterThan(10);
  });
});

describe('a wheel that does not turn', () => {
  it('is told after the stated time, not before, and only while it is driven', () => {
    const { blockedSamples, blockedSpeed } = controller.wheelLoop!;
    expect(drive(0, () => HALF, blockedSamples - 1).loops.blocked).toBe(false);
    expect(drive(0, () => HALF, blockedSamples).loops.blocked).toBe(true);
    expect(drive(0, () => blockedSpeed >> 3, 10).loops.blocked).toBe(false);
    expect(drive(0, () => 0, 2000).loops.blocked).toBe(false);
    expect(drive(1, () => HALF, 2000).loops.blocked).toBe(false);
  });

  it('is forgotten at the next start', () => {
    const { loops } = drive(0, () => HALF, 400);
    loops.start();
    expect(loops.blocked).toBe(false);
  });
});

it('speeds keep their scale', () => {
  expect(FULL_SPEED).toBe((1 << SPEED_BITS) - 1);
});
