/** Vehicles and controllers that the tests of several modules share. */
import type { PlantParameters } from '../../src/rehearsal/plant-parameters.js';
import type { ControlStep } from '../../src/rehearsal/twin-engine.js';

/** A vehicle of the demo's size without dead zone or noise. */
export function plainPlant(changes: Partial<PlantParameters> = {}): PlantParameters {
  return {
    seed: 0,
    trackM: 0.12,
    topLeftMps: 1.5,
    topRightMps: 1.5,
    trimLeft: 1,
    trimRight: 1,
    driftLeft: 0,
    driftRight: 0,
    lagS: 0.08,
    startDuty: 0,
    frictionLeft: 1,
    frictionRight: 1,
    stiction: 1,
    castorDrag: 0,
    nominalV: 6,
    batteryFactor: 1,
    batteryResistanceRatio: 0,
    grip: 0.7,
    aheadM: 0.075,
    positionsM: [0.025, 0.015, 0.005, -0.005, -0.015, -0.025],
    spotRadiusM: 0.004,
    kinds: ['analog', 'analog', 'analog', 'analog', 'analog', 'analog'],
    lineLevel: 'high',
    ground: [100, 100, 100, 100, 100, 100],
    line: [900, 900, 900, 900, 900, 900],
    contrast: 1,
    lightShare: 0,
    lightPhaseRad: 0,
    wearShare: 0,
    wearPhaseRad: 0,
    adcMaxCount: 1023,
    noiseShare: 0,
    startLateralM: 0,
    startHeadingRad: 0,
    loopJitterS: 0,
    bumpEveryM: 0,
    bumpLateralM: 0,
    bumpHeadingRad: 0,
    ...changes,
  };
}

/**
 * Pure pursuit of the middle of what the sensors see: the arc through a point L ahead and y aside has the curvature 2 y/L^2
 * (Coulter 1992, Implementation of the pure pursuit path tracking algorithm).
 */
export class Pursuit implements ControlStep {
  dutyLeft = 0;
  dutyRight = 0;
  readonly classIndex = 0;
  readonly phase = 0;
  stopped = false;
  private offsetM = 0;

  constructor(
    private readonly plant: PlantParameters,
    private readonly speedMps: number,
  ) {}

  step(counts: Int32Array): void {
    let [sum, moment] = [0, 0];
    counts.forEach((count, i) => {
      const share = (count - this.plant.ground[i]!) / (this.plant.line[i]! - this.plant.ground[i]!);
      sum += share;
      moment += share * this.plant.positionsM[i]!;
    });
    if (sum > 0.5) this.offsetM = moment / sum;
    const curvature = (2 * this.offsetM) / this.plant.aheadM ** 2;
    const half = (this.speedMps * curvature * this.plant.trackM) / 2;
    this.dutyLeft = this.duty(this.speedMps - half);
    this.dutyRight = this.duty(this.speedMps + half);
  }

  private duty(speedMps: number): number {
    const share =
      this.plant.startDuty +
      (1 - this.plant.startDuty) * Math.min(1, Math.abs(speedMps) / this.plant.topLeftMps);
    return Math.round(4096 * Math.sign(speedMps) * share);
  }
}
