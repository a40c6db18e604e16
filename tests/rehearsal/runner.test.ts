import { describe, expect, it } from 'vitest';
import { compileCourse } from '../../src/course/lane.js';
import { nominalPlant } from '../../src/rehearsal/plant-parameters.js';
import { rehearse, vehicleBound } from '../../src/rehearsal/runner.js';
import { TwinEngine } from '../../src/rehearsal/twin-engine.js';
import { example, open } from '../course/courses.js';
import { trayCart } from './tray-cart.js';
import { Pursuit } from './vehicles.js';

const cart = trayCart();
const lane = compileCourse(example('wide'));
const engine = new TwinEngine(() => new Pursuit(nominalPlant(cart), 0.6), {
  samplePeriodS: 2e-3,
  delayS: 0.6e-3,
  pwmSteps: 255,
});

describe('rehearse', () => {
  it('gives the same runs whether they are driven together or each alone', async () => {
    const together = await rehearse({ vehicle: cart, lane, engine, runs: 4, seed: 10 });
    expect(together.report.list.map((run) => run.seed)).toEqual([10, 11, 12, 13]);
    expect(together.report.finished).toBe(4);
    for (const [i, run] of together.report.list.entries()) {
      const alone = await rehearse({ vehicle: cart, lane, engine, runs: 1, seed: 10 + i });
      expect(alone.report.list[0]).toEqual(run);
    }
    expect(new Set(together.report.list.map((run) => run.lapS)).size).toBe(4);
  });

  it('keeps the trace of the first run, of all or of none, and reports each run', async () => {
    const count = async (traces: 'none' | 'first' | 'all'): Promise<number> => {
      const { results } = await rehearse({ vehicle: cart, lane, engine, runs: 2, seed: 0, laps: 1, traces });
      return results.filter((result) => result.trace !== undefined).length;
    };
    expect([await count('none'), await count('first'), await count('all')]).toEqual([0, 1, 2]);
    const seen: number[] = [];
    await rehearse({
      vehicle: cart,
      lane,
      engine,
      runs: 2,
      seed: 0,
      laps: 1,
      onRun: (done) => seen.push(done),
    });
    expect(seen).toEqual([1, 2]);
  });

  it('compares flying laps with the flying bound, a lap from standing with that from standing', async () => {
    const two = await rehearse({ vehicle: cart, lane, engine, runs: 1, seed: 0 });
    const one = await rehearse({ vehicle: cart, lane, engine, runs: 1, seed: 0, laps: 1 });
    expect(two.report.list[0]!.lapsS).toHaveLength(2);
    expect(one.report.list[0]!.lapsS).toHaveLength(1);
    expect(one.report.boundLapS).toBeGreaterThan(two.report.boundLapS);
    expect(two.report.ratio).toBeGreaterThan(1);
    expect(one.report.ratio).toBeGreaterThan(1);
  });

  it('drives an open lane once, to where the bar meets its end', async () => {
    const short = compileCourse(open({ straightMm: 1500 }));
    const { report } = await rehearse({ vehicle: cart, lane: short, engine, runs: 1, seed: 0, laps: 5 });
    expect(report).toMatchObject({ finished: 1, runs: 1 });
    expect(report.list[0]!.lapsS).toHaveLength(1);
    const bound = vehicleBound(cart, short, 1);
    expect(bound.sM.at(-1)).toBeCloseTo(1.5 - cart.bar.aheadM, 12);
    expect(report.boundLapS).toBe(bound.lapS);
  });
});
