/**
 * Readings that a bar may give, and some that it should never give: a line that wanders under the bar, leaves it to a side, ends in
 * gaps, meets crossings and corners, with noise; and now and then nothing but rubbish. Drawn by seed.
 */
import { coveredShare } from '../../src/vehicle/sensor-bar.js';
import { Random } from '../../src/rehearsal/random.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';

/** What the bar sees for a while. */
type Scene = 'line' | 'gap' | 'lost' | 'crossing' | 'corner' | 'rubbish';

const SCENES: readonly { scene: Scene; share: number; longest: number }[] = [
  { scene: 'line', share: 0.62, longest: 600 },
  { scene: 'gap', share: 0.1, longest: 60 },
  { scene: 'lost', share: 0.03, longest: 2000 },
  { scene: 'crossing', share: 0.1, longest: 40 },
  { scene: 'corner', share: 0.1, longest: 40 },
  { scene: 'rubbish', share: 0.05, longest: 10 },
];

export class BarTrace {
  private readonly random: Random;
  private offsetM = 0;
  private driftM = 0;
  private scene: Scene = 'line';
  private left = 0;
  private restlessness = 0;

  constructor(
    private readonly vehicle: Vehicle,
    seed: number,
  ) {
    this.random = new Random(seed, 7);
  }

  private nextScene(): void {
    let draw = this.random.uniform(0, 1);
    const next = SCENES.find(({ share }) => (draw -= share) < 0) ?? SCENES[0]!;
    this.scene = next.scene;
    this.left = 1 + Math.floor(this.random.uniform(0, next.longest));
    this.restlessness = this.random.uniform(0, 1) ** 3;
    const widestM = this.vehicle.bar.positionsM[0]! * 1.6;
    if (this.random.uniform(0, 1) < 0.5) this.offsetM *= this.random.uniform(-0.2, 0.2);
    else if (this.restlessness > 0.5) this.offsetM = this.random.uniform(-widestM, widestM);
  }

  /** Share of a sensor's spot that is on the line. */
  private share(positionM: number): number {
    const { line, bar } = this.vehicle;
    if (this.scene === 'gap' || this.scene === 'lost') return 0;
    if (this.scene === 'crossing') return 1;
    if (this.scene === 'corner' && positionM * this.driftM > 0) return 1;
    return coveredShare(positionM - this.offsetM, line.widthM, bar.spotRadiusM);
  }

  private count(i: number): number {
    const { bar, board } = this.vehicle;
    const most = bar.kind === 'digital' ? 1 : board.adcMaxCount;
    if (this.scene === 'rubbish') return Math.floor(this.random.uniform(0, most + 1));
    const share = this.share(bar.positionsM[i]!);
    if (bar.kind === 'mixed' && bar.kinds[i] === 'digital') return share > 0.5 ? most : 0;
    if (bar.kind === 'digital') return share > 0.5 === (bar.lineLevel === 'high') ? 1 : 0;
    const ground = bar.calibration.ground[i]!;
    const noise = 4 * this.random.normal();
    const reading = ground + share * (bar.calibration.line[i]! - ground) + noise;
    return Math.max(0, Math.min(most, Math.round(reading)));
  }

  /** Writes the next readings. */
  next(counts: Int32Array): void {
    if (this.left-- <= 0) this.nextScene();
    const widestM = this.vehicle.bar.positionsM[0]! * 1.7;
    this.driftM = 0.98 * this.driftM + 1e-4 * this.restlessness * this.random.normal();
    this.offsetM = Math.max(-widestM, Math.min(widestM, 0.995 * this.offsetM + this.driftM));
    for (let i = 0; i < counts.length; i++) counts[i] = this.count(i);
  }

  /** Readings of a bar that turns once to each side across the line: what a sweep sees. */
  sweep(samples: number): Int32Array[] {
    const widestM = this.vehicle.bar.positionsM[0]! + this.vehicle.line.widthM;
    this.scene = 'line';
    return Array.from({ length: samples }, (_, k) => {
      this.offsetM = widestM * Math.sin((2 * Math.PI * k) / samples);
      return Int32Array.from(this.vehicle.bar.positionsM, (_position, i) => this.count(i));
    });
  }
}
