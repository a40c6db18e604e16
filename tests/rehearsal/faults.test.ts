/** What the firmware does about faults, on each engine; the table is printed. One image serves all cases of the chip. */
import { afterAll, describe, expect, it } from 'vitest';
import { loadCourse } from '../../src/course/load-course.js';
import { lineLossBoundS } from '../../src/design/line-loss.js';
import { chipEngine } from '../../src/rehearsal/chip-engine.js';
import type { Engine, RunResult } from '../../src/rehearsal/engine.js';
import { parseFault } from '../../src/rehearsal/fault.js';
import { micropythonEngine } from '../../src/rehearsal/micropython-engine.js';
import { runSetup } from '../../src/rehearsal/runner.js';
import { twinEngine } from '../../src/rehearsal/twin-maker.js';
import { SHEET, cart, quickDesign } from '../firmware/cart.js';
import { MICROPYTHON_CARTS } from '../firmware/micropython-carts.js';

const { lane } = await loadCourse('examples/tray-cart/nursery-lane.json');
const rows: string[] = [];
afterAll(() => process.stdout.write(['Faults and reactions:', ...rows, ''].join('\n')));

const avr = quickDesign(cart());
const python = quickDesign(cart(Object.values(MICROPYTHON_CARTS)[0]));
const engines: [string, typeof avr, Engine][] = [
  ['twin', avr, twinEngine(avr.vehicle, avr.controller)],
  ['chip', avr, await chipEngine(SHEET, avr)],
  ['micropython', python, await micropythonEngine(SHEET, python)],
];

async function run(engine: Engine, { vehicle }: typeof avr, faults: readonly string[]): Promise<RunResult> {
  const result = await engine.run(runSetup(vehicle, lane, 0, 1, false, faults.map(parseFault)));
  const { motorsOff, reactionS, reason } = result.ending!;
  const motors = motorsOff ? `off after ${(1000 * reactionS!).toFixed(0)} ms` : 'on';
  rows.push(
    `${faults.join(' ').padEnd(26)} ${engine.name.padEnd(12)} motors ${motors}, ${reason ?? 'no reason'}`,
  );
  return result;
}

describe.each(engines)('%s', { timeout: 120_000 }, (name, design, engine) => {
  it('a line that is gone: motors off within the bound, for good, with the reason', async () => {
    const { ending } = await run(engine, design, ['line=gone@1s']);
    expect(ending).toMatchObject({ motorsOff: true, reason: 'LineLost', restarted: false });
    // beside the bound: a sample of delay, and the time between two looks of an engine
    expect(ending!.reactionS).toBeLessThan(lineLossBoundS(design.controller) + 0.015);
    expect(ending!.reactionS).toBeGreaterThan(0.1);
  });

  it('a line that is gone for a moment, a push and a weak battery: it drives on', async () => {
    const { loss, ending } = await run(engine, design, [
      'line=gone@1s+0.03s',
      'bump=6mm@2s',
      'battery=5.2V@0.5s',
    ]);
    expect(loss).toBeUndefined();
    expect(ending).toEqual({ motorsOff: false, reactionS: null, reason: null, restarted: false });
  });

  if (name === 'twin') return;

  it('a program that hangs: the watchdog within its time', async () => {
    const { ending } = await run(engine, design, ['program=hangs@1s']);
    expect(ending).toMatchObject({ motorsOff: true, reason: 'Watchdog', restarted: false });
    // data sheet, Watchdog Timer: 120 ms and about a tenth; MicroPython: the 200 ms that the firmware asks for
    expect(ending!.reactionS).toBeLessThan(name === 'chip' ? 0.135 : 0.201);
  });

  it('a supply that breaks down: the board stands, ready, until the button', async () => {
    const { ending } = await run(engine, design, ['supply=breaks@1s']);
    const reason = name === 'chip' ? 'BrownOut' : 'Ready';
    expect(ending).toMatchObject({ motorsOff: true, reason, restarted: false });
    expect(ending!.reactionS).toBeLessThan(0.01);
  });
});
