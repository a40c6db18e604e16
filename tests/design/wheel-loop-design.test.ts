/** The design of the wheel loop: its rule, its margins, its window. */
import { describe, expect, it } from 'vitest';
import { intermediateBounds, overflows } from '../../src/design/intervals.js';
import { WHEEL_MARGINS, wheelLoopDesign } from '../../src/design/wheel-loop-design.js';
import { cart, quickDesign } from '../firmware/cart.js';
import type { Changes } from '../sheet/example-sheet.js';

const encoders = (linesPerTurn: number, more: Changes = {}) =>
  cart({
    '/encoders': { channels: 'single', linesPerTurn, left: { a: 3 }, right: { a: 4 } },
    ...more,
  });

it('is there with encoders only', () => {
  expect(wheelLoopDesign(cart())).toBeUndefined();
  expect(quickDesign(cart()).controller.wheelLoop).toBeUndefined();
});

describe.each([8, 12, 48, 120, 700])('%d lines in a turn', (lines) => {
  const vehicle = encoders(lines);
  const design = wheelLoopDesign(vehicle)!;

  it('keeps its margins over the whole tolerance box', () => {
    expect(design.worstMargins.gainMargin).toBeGreaterThanOrEqual(WHEEL_MARGINS.gainMargin);
    expect(design.worstMargins.phaseMarginDeg).toBeGreaterThanOrEqual(WHEEL_MARGINS.phaseMarginDeg);
    expect(design.worstMargins.ms).toBeLessThanOrEqual(WHEEL_MARGINS.ms);
  });

  it('follows the SIMC rule with its own delay', () => {
    const { lagS } = vehicle.drive;
    const { gain, integralTimeS, closedLoopTimeS, delayS } = design;
    expect(gain).toBeCloseTo(lagS / (closedLoopTimeS + delayS), 9);
    expect(integralTimeS).toBeCloseTo(Math.min(lagS, 4 * (closedLoopTimeS + delayS)), 9);
  });

  it('fits the integers of both languages', () => {
    const { controller } = quickDesign(vehicle);
    expect(overflows(controller, 1023, 'micropython')).toEqual([]);
    const names = intermediateBounds(controller, 1023).map(({ name }) => name);
    expect(names).toContain('held correction');
  });
});

it('gives a slow wheel time for two edges before it counts as blocked', () => {
  const coarse = encoders(8, { '/drive/motor/noLoadRpm': 240 });
  const { blockedSamples, blockedSpeed } = wheelLoopDesign(coarse)!.constants;
  const turnsPerS = (240 / 60) * (blockedSpeed / 8192);
  expect(blockedSamples * 0.002).toBeGreaterThanOrEqual(0.999 * (2 / (16 * turnsPerS)));
  expect(wheelLoopDesign(encoders(700))!.constants.blockedSamples).toBe(150);
});

it('counts over a longer window where lines are few, but not longer than the motor bears', () => {
  const samples = [8, 48, 120, 700].map((lines) => wheelLoopDesign(encoders(lines))!.windowSamples);
  expect(samples).toEqual(samples.toSorted((a, b) => b - a));
  expect(samples.at(-1)).toBe(1);
  const quick = wheelLoopDesign(encoders(12, { '/drive/motor/timeConstantMs': 20 }))!;
  expect(quick.windowSamples * 0.002).toBeLessThanOrEqual(0.01);
});
