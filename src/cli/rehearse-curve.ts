/** `fairlead rehearse SHEET --course FILE --curve`: class speeds from below to above those of the design, against finish rate. */
import { scaledSpeeds } from '../design/scaled-speeds.js';
import { CURVE_FACTORS, CURVE_RUNS, curvePoint, type CurvePoint } from '../rehearsal/speed-curve.js';
import { studyFacts } from '../rehearsal/study.js';
import { curveText } from '../report/curve-text.js';
import { curveFigure } from '../report/figures/curve-figure.js';
import { fractionToPercent } from '../sheet/units.js';
import { visible } from '../sheet/words.js';
import { driveAll } from './driving.js';
import type { Io } from './io.js';
import { type RehearseOptions, seedsOf } from './rehearse-options.js';
import { loadStudy } from './rehearse-runs.js';

export async function curveCommand(
  path: string,
  coursePath: string,
  options: RehearseOptions,
  io: Io,
): Promise<void> {
  const { study, loaded, course, names } = await loadStudy(path, coursePath, options, io);
  const { vehicle, controller } = loaded.design;
  const seeds = seedsOf(options, CURVE_RUNS);
  const points: CurvePoint[] = [];
  for (const factor of CURVE_FACTORS) {
    const scaled = { name: 'twin' as const, vehicle, controller: scaledSpeeds(controller, vehicle, factor) };
    const what = `speeds times ${factor.toFixed(2)}`;
    points.push(
      curvePoint(factor, await driveAll({ ...study, parts: scaled }, seeds, options.jobs, io, what)),
    );
  }
  const { boundLapS, notes } = studyFacts(study);
  const targetPercent = fractionToPercent(vehicle.speeds.finishTarget);
  if (options.svg !== undefined) {
    const { default: writeFileAtomic } = await import('write-file-atomic');
    const title = `${names.vehicle} on ${names.course}: speed against finish rate`;
    await writeFileAtomic(options.svg, curveFigure(points, { title, targetPercent, boundLapS }));
  }
  if (options.json === true) {
    io.json({ runs: seeds.runs, seed: seeds.first, boundLapS, targetPercent, curve: points, notes });
    return;
  }
  io.stdout(
    `${names.vehicle} on ${names.course}, ${course.lane.lengthM.toFixed(2)} m: speed against finish rate\n\n`,
  );
  io.stdout(curveText(points, boundLapS, targetPercent));
  for (const note of notes) io.stdout(`Note: ${note}\n`);
  if (options.svg !== undefined) io.stdout(`\nPicture: ${visible(options.svg)}\n`);
}
