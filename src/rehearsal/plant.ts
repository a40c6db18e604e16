/**
 * The simulated vehicle: its motion (vehicle-motion.ts), its place on the lane, and the bar's sensors over the lane.
 *
 * A sensor reads ground + (c share + a) (line - ground) + noise, share being how much of its spot is painted, c the contrast at that
 * place of the lane and a the ambient light at that place of the floor; a digital one changes its level at c share + a + noise =
 * 1/2. Steps allocate nothing.
 */
import type { Lane } from '../course/lane.js';
import { makeProjection, type Projection } from '../course/projection.js';
import { FloorLight } from './floor-light.js';
import type { Fault } from './fault.js';
import { PlantFaults } from './plant-faults.js';
import { STREAM, type PlantParameters } from './plant-parameters.js';
import { Random } from './random.js';
import { VehicleMotion } from './vehicle-motion.js';

export class Plant extends VehicleMotion {
  private readonly projection = makeProjection();
  /** Places of the sensors' spots on the floor, x and y each, and how much of each is painted; the same of one sensor. */
  private readonly spots: Float64Array;
  private readonly shares: Float64Array;
  private readonly oneSpot = new Float64Array(2);
  private readonly oneShare = new Float64Array(1);
  private readonly light: FloorLight;
  private readonly positionsM: Float64Array;
  private readonly isDigital: Uint8Array;
  private readonly ground: Float64Array;
  private readonly line: Float64Array;
  private readonly noise: Random;
  private readonly faults: PlantFaults | undefined;
  private readonly nominalV: number;

  constructor(
    parameters: Readonly<PlantParameters>,
    readonly lane: Lane,
    faults: readonly Fault[] = [],
  ) {
    super(parameters, lane.poseAt(0));
    this.light = new FloorLight(parameters);
    this.positionsM = Float64Array.from(parameters.positionsM);
    this.spots = new Float64Array(2 * this.positionsM.length);
    this.shares = new Float64Array(this.positionsM.length);
    this.isDigital = Uint8Array.from(parameters.kinds, (kind) => Number(kind === 'digital'));
    this.ground = Float64Array.from(parameters.ground);
    this.line = Float64Array.from(parameters.line);
    this.noise = new Random(parameters.seed, STREAM.noise);
    this.nominalV = parameters.nominalV;
    if (faults.length > 0) this.faults = new PlantFaults(faults, this.positionsM.length, parameters.seed);
    this.faults?.update(0);
  }

  get sensorCount(): number {
    return this.positionsM.length;
  }

  /**
   * Where the axle's middle is along the lane (arc length, m, counted on lap after lap) and beside it (m, positive left).
   *
   * It is searched for near the place of the last look: look at least once every few centimetres.
   */
  get place(): Readonly<Projection> {
    if (this.placeIsOld) this.lane.project(this.xM, this.yM, this.projection.sM, this.projection);
    this.placeIsOld = false;
    return this.projection;
  }

  /** What sensor i reads now: counts, or the level 0 or 1 of a digital one. Each call draws new noise. */
  count(i: number): number {
    this.placeSpots();
    this.oneSpot[0] = this.spots[2 * i]!;
    this.oneSpot[1] = this.spots[2 * i + 1]!;
    this.lane.cover(this.oneSpot, this.parameters.spotRadiusM, this.oneShare);
    return this.reading(i, this.oneShare[0]!);
  }

  /**
   * Writes all readings, leftmost first.
   *
   * What `healthyReading` does for one, in one loop: this is where most of a rehearsal's time goes.
   */
  readCounts(out: Int32Array): void {
    this.placeSpots();
    const { shares, ground, line, noise, isDigital } = this;
    const { spotRadiusM, lineLevel, adcMaxCount, noiseShare } = this.parameters;
    this.lane.cover(this.spots, spotRadiusM, shares);
    if (this.faults !== undefined) {
      for (let i = 0; i < shares.length; i++) out[i] = this.reading(i, shares[i]!);
      return;
    }
    const { contrast, ambient } = this.light;
    const onLine = lineLevel === 'high' ? 1 : 0;
    for (let i = 0; i < shares.length; i++) {
      const share = contrast * shares[i]! + ambient;
      const deviation = noiseShare === 0 ? 0 : noiseShare * noise.noise();
      if (isDigital[i] === 1) {
        out[i] = share + deviation > 0.5 ? onLine : 1 - onLine;
        continue;
      }
      const low = ground[i]!;
      const counts = Math.floor(low + share * (line[i]! - low) + deviation * adcMaxCount + 0.5);
      out[i] = counts < 0 ? 0 : counts > adcMaxCount ? adcMaxCount : counts;
    }
  }

  /** Drives on, with the faults of this moment. */
  override step(dutyLeft: number, dutyRight: number, dtS: number): void {
    const { faults } = this;
    if (faults !== undefined) {
      faults.update(this.timeS);
      this.wheels.blockedLeft = faults.blockedLeft;
      this.wheels.blockedRight = faults.blockedRight;
      this.wheels.openFactor =
        faults.batteryV === undefined ? this.parameters.batteryFactor : faults.batteryV / this.nominalV;
      if (faults.shiftM !== 0 || faults.turnRad !== 0) this.push(faults.shiftM, faults.turnRad);
    }
    super.step(dutyLeft, dutyRight, dtS);
  }

  private reading(i: number, covered: number): number {
    const healthy = this.healthyReading(i, this.faults?.lineGone === true ? 0 : covered);
    if (this.faults === undefined) return healthy;
    return this.faults.faultyCount(i, healthy, this.isDigital[i] === 1 ? 1 : this.parameters.adcMaxCount);
  }

  private healthyReading(i: number, covered: number): number {
    const { lineLevel, adcMaxCount, noiseShare } = this.parameters;
    const share = this.light.contrast * covered + this.light.ambient + (this.faults?.lightShare ?? 0);
    const noise = noiseShare === 0 ? 0 : noiseShare * this.noise.noise();
    if (this.isDigital[i] === 1) return share + noise > 0.5 === (lineLevel === 'high') ? 1 : 0;
    const ground = this.ground[i]!;
    const counts = Math.round(ground + share * (this.line[i]! - ground) + noise * adcMaxCount);
    return counts < 0 ? 0 : counts > adcMaxCount ? adcMaxCount : counts;
  }

  /** Where the sensors' spots are on the floor, and the light there. */
  private placeSpots(): void {
    if (!this.spotsAreOld) return;
    this.spotsAreOld = false;
    const { aheadM } = this.parameters;
    const { cosHeading: cos, sinHeading: sin } = this;
    const barX = this.xM + aheadM * cos;
    const barY = this.yM + aheadM * sin;
    const { positionsM, spots } = this;
    for (let i = 0; i < positionsM.length; i++) {
      spots[2 * i] = barX - positionsM[i]! * sin;
      spots[2 * i + 1] = barY + positionsM[i]! * cos;
    }
    if (this.light.varies) this.light.update(this.place.sM + aheadM);
  }
}
