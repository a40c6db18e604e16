/**
 * What the control step costs on the ATmega328P, against a sketch as tutorials write it; the large version is bench/cost.js. The tick
 * beside PWM on every timer is tried here too.
 */
import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { expect, test } from 'vitest';
import { harshReadings, meanAndMax, measureSteps, wanderingLine } from '../../bench/cost/measure.js';
import { renderFirmware } from '../../src/firmware/render.js';
import { type ChipImage, buildSketch } from '../../src/rehearsal/chip-build.js';
import type { Changes } from '../sheet/example-sheet.js';
import { SHEET, cart, quickDesign } from './cart.js';

const SPAN = { sensorCount: 8, fromS: 0.9, toS: 1.4 };
const CYCLES_PER_S = 16e6;
const MOST_SAMPLED_TO_PWM_S = 100e-6;
/** On readings that no line gives: several runs of sensors at once take longer. */
const MOST_HARSH_S = 120e-6;
const PERIOD_S = 2e-3;
const LEAST_RATE_HZ = 500;

const EIGHT = {
  '/target/board': 'nano',
  '/sensors/count': 8,
  '/sensors/pins': ['A0', 'A1', 'A2', 'A3', 'A4', 'A5', 'A6', 'A7'],
  '/sensors/calibration': { mode: 'stored', ground: Array(8).fill(123), line: Array(8).fill(839) },
};
const ALL_TIMERS = {
  '/drive/driver': { scheme: 'dual-pwm', left: { in1: 3, in2: 11 }, right: { in1: 9, in2: 10 } },
};

async function built(changes: Changes): Promise<ChipImage> {
  const vehicle = cart(changes);
  return buildSketch(await renderFirmware(SHEET, quickDesign(vehicle)), vehicle.board.id);
}

async function tutorialStep(): Promise<number> {
  const text = readFileSync(fileURLToPath(new URL('../../bench/cost/tutorial.ino', import.meta.url)), 'utf8');
  const { program } = await buildSketch([{ path: 'tutorial/tutorial.ino', text, owner: 'tool' }], 'nano');
  const costs = measureSteps(program, wanderingLine(8), SPAN);
  expect(costs.steps).toBeGreaterThan(200);
  return meanAndMax(costs.stepCycles).mean;
}

test('eight analog sensors: under 100 us from sampled to PWM, a sixth of the tutorial, 500 Hz', async () => {
  const tutorial = await tutorialStep();
  for (const kind of ['pid', 'rules']) {
    const { program } = await built({ ...EIGHT, '/control/kind': kind });
    const costs = measureSteps(program, wanderingLine(8), SPAN);
    expect(costs.steps * PERIOD_S).toBeCloseTo(SPAN.toS - SPAN.fromS, 2);
    const pwm = meanAndMax(costs.pwmCycles);
    expect(pwm.max / CYCLES_PER_S, kind).toBeLessThan(MOST_SAMPLED_TO_PWM_S);
    const harsh = measureSteps(program, harshReadings(SPAN.sensorCount), { ...SPAN, toS: 3 });
    expect(meanAndMax(harsh.pwmCycles).max / CYCLES_PER_S, kind).toBeLessThan(MOST_HARSH_S);
    // what the scan costs the processor are its interrupts
    const step = meanAndMax(costs.pwmCycles.map((cycles, i) => cycles + costs.interruptCycles[i]!));
    expect(step.mean, kind).toBeLessThan(tutorial / 6);
    const longest = (meanAndMax(costs.scanCycles).max + pwm.max) / CYCLES_PER_S;
    expect(1 / longest, kind).toBeGreaterThan(LEAST_RATE_HZ);
  }
});

test('the demo sketch without telemetry: under 8 KiB of flash and 600 bytes of RAM', async () => {
  const { flashBytes, ramBytes } = await built({});
  expect(flashBytes).toBeLessThan(8192);
  expect(ramBytes).toBeLessThan(600);
});

test('with PWM on timers 1 and 2 a PWM period of timer 1 is the sample period', async () => {
  const { program } = await built({ ...EIGHT, ...ALL_TIMERS });
  const costs = measureSteps(program, wanderingLine(8), SPAN);
  expect(costs.steps * PERIOD_S).toBeCloseTo(SPAN.toS - SPAN.fromS, 2);
});
