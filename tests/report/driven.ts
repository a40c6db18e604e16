/** Runs to draw: the demo's vehicle steered by pursuit, slow enough to finish or too fast. */
import { compileCourse, type Lane } from '../../src/course/lane.js';
import type { RunResult } from '../../src/rehearsal/engine.js';
import { TwinEngine } from '../../src/rehearsal/twin-engine.js';
import type { DrivenRun } from '../../src/report/driven-run.js';
import { example } from '../course/courses.js';
import { plainPlant, Pursuit } from '../rehearsal/vehicles.js';

export const lane: Lane = compileCourse(example('nursery'));

export function drive(speedMps: number): { result: RunResult; run: DrivenRun } {
  const plant = plainPlant();
  const timing = { samplePeriodS: 2e-3, delayS: 0.6e-3, pwmSteps: 255 };
  const engine = new TwinEngine(() => new Pursuit(plant, speedMps), timing);
  const result = engine.runNow({ plant, lane, laps: 2, timeLimitS: 60, sampleTrace: true });
  if (result.trace === undefined) throw new Error('There is no trace.');
  const loss = result.loss === undefined ? {} : { loss: result.loss };
  return { result, run: { lane, trace: result.trace, ...loss } };
}
