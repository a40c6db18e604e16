import { describe, expect, it } from 'vitest';
import { classForBend } from '../../src/design/class-for-bend.js';
import { unprovenDesign } from '../../src/design/derive.js';
import { drivenSpeedMps } from '../../src/design/driven-speed.js';
import { entryPeakM, entryTraces } from '../../src/design/entry.js';
import { samplePlant } from '../../src/design/lane-plant.js';
import { limitCurves } from '../../src/design/limit-curves.js';
import { frequencyGrid, loopMarks, worstCorners } from '../../src/design/loop-marks.js';
import { controllerOf, openLoop } from '../../src/design/steering-loop.js';
import { lanePlantOf, marginsAt, toleranceCorners } from '../../src/design/tolerance-box.js';
import { demoVehicle } from './demo-vehicle.js';

const vehicle = demoVehicle();
const design = unprovenDesign(vehicle);

describe('marks of a loop', () => {
  const cases = design.classes.flatMap((each) =>
    toleranceCorners(vehicle).map((corner) => ({ ...each, corner })),
  );

  it.each(cases)('are the margins of class $name at $corner', ({ speedMps, gains, corner }) => {
    const plant = lanePlantOf(vehicle, speedMps, corner);
    const loop = openLoop(samplePlant(plant), controllerOf(gains, plant.speedMps, plant.samplePeriodS));
    const nyquist = Math.PI / plant.samplePeriodS;
    const marks = loopMarks(loop, frequencyGrid(nyquist / 1e4, nyquist, 600));
    const { gainMargin, phaseMarginDeg, ms } = marginsAt(vehicle, speedMps, gains, corner);
    expect(marks.gain!.margin / gainMargin).toBeCloseTo(1, 9);
    expect(marks.phaseDeg!.margin / phaseMarginDeg).toBeCloseTo(1, 9);
    expect(marks.ms.margin / ms).toBeCloseTo(1, 9);
    expect(Math.hypot(...loop(marks.phaseDeg!.frequencyRadS))).toBeCloseTo(1, 9);
    expect(loop(marks.gain!.frequencyRadS)[1]).toBeCloseTo(0, 9);
  });

  it('of an integrator with delay are those of the formula', () => {
    // L = k e^(-T s) / s: crossover at k, phase margin 90 deg - k T, phase crossover at pi / 2T, gain margin pi / 2kT
    const [k, delayS] = [10, 0.02];
    const loop = (w: number): [number, number] => [
      (-k / w) * Math.sin(w * delayS),
      (-k / w) * Math.cos(w * delayS),
    ];
    const { gain, phaseDeg } = loopMarks(loop, frequencyGrid(0.1, 200, 400));
    expect(phaseDeg!.frequencyRadS).toBeCloseTo(k, 9);
    expect(phaseDeg!.margin).toBeCloseTo(90 - (k * delayS * 180) / Math.PI, 9);
    expect(gain!.frequencyRadS).toBeCloseTo(Math.PI / (2 * delayS), 9);
    expect(gain!.margin).toBeCloseTo(Math.PI / (2 * k * delayS), 9);
  });
});

it('the worst corners have the worst margins', () => {
  for (const { speedMps, gains, worstMargins } of design.classes) {
    const { gain, phase, ms } = worstCorners(vehicle, speedMps, gains);
    expect(marginsAt(vehicle, speedMps, gains, gain).gainMargin).toBe(worstMargins.gainMargin);
    expect(marginsAt(vehicle, speedMps, gains, phase).phaseMarginDeg).toBe(worstMargins.phaseMarginDeg);
    expect(marginsAt(vehicle, speedMps, gains, ms).ms).toBe(worstMargins.ms);
  }
});

it('a bend has the widest class that is no wider than it', () => {
  const of = (radiusM: number) => classForBend(design.classes, radiusM).name;
  expect([99, 3.6, 3.59, 0.12, 0.119, 0.01].map(of)).toEqual([
    ...['straight', 'straight', 'sweeping', 'tight', 'reserve', 'reserve'],
  ]);
});

it('a class drives its speed at its radius, and between that of its neighbours', () => {
  const { controller, classes } = design;
  classes.forEach(({ minRadiusM, speedMps }, i) => {
    expect(drivenSpeedMps(controller, minRadiusM)).toBeCloseTo(speedMps, 2);
    const wider = classes[i - 1];
    if (wider === undefined) return;
    const between = drivenSpeedMps(controller, 2 / (1 / minRadiusM + 1 / wider.minRadiusM));
    expect(between).toBeCloseTo((speedMps + wider.speedMps) / 2, 2);
  });
  expect(drivenSpeedMps(controller, 0.01)).toBe(drivenSpeedMps(controller, 0.09));
});

it('the limits at the radius of a class are the limits of the class', () => {
  const curves = limitCurves(
    vehicle,
    design.classes.map(({ minRadiusM }) => minRadiusM),
  );
  expect(curves.map(({ limits }) => limits)).toEqual(design.classes.map(({ limits }) => limits));
});

describe('entering a bend', () => {
  const { gains } = classForBend(design.classes, 0.12);

  it('is traced as it is judged', () => {
    for (const { corner, distanceM, offsetM, peakM } of entryTraces(vehicle, gains, 0.9, 0.12)) {
      expect(peakM).toBe(entryPeakM(vehicle, gains, 0.9, 0.12, corner));
      expect(Math.max(...offsetM.map(Math.abs))).toBe(peakM);
      expect(distanceM).toHaveLength(offsetM.length);
      const speedMps = 0.9 * corner.gain;
      expect(distanceM[1]! - distanceM[0]!).toBeCloseTo(speedMps * vehicle.board.samplePeriodS, 12);
      // on the straight the line is in the middle; it moves out once the bar is in the bend
      distanceM.forEach((distance, i) => expect(offsetM[i] === 0).toBe(distance <= 0));
    }
  });

  it('ends where the line is lost', () => {
    const lost = entryTraces(vehicle, gains, 1.5, 0.12).filter(({ peakM }) => peakM === Infinity);
    expect(lost.length).toBeGreaterThan(0);
    for (const { distanceM } of lost) expect(distanceM.at(-1)).toBeLessThan(0.2);
  });
});
