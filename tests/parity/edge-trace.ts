/** Edges that wheels may give: those of motors that are weaker or stronger than nominal, of blocked ones, and now and then rubbish. */
import { type ControllerConstants, FULL_DUTY } from '../../src/controller/constants.js';
import type { Twin } from '../../src/controller/twin.js';
import { Random } from '../../src/rehearsal/random.js';

type Mood = 'drives' | 'blocked' | 'rubbish';

class Wheel {
  private speed = 0;
  private rolled = 0;
  private gain = 1;
  private mood: Mood = 'drives';
  private left = 0;

  constructor(
    private readonly controller: ControllerConstants,
    private readonly random: Random,
  ) {}

  private nextMood(): void {
    const draw = this.random.uniform(0, 1);
    this.mood = draw < 0.8 ? 'drives' : draw < 0.93 ? 'blocked' : 'rubbish';
    this.left = 1 + Math.floor(this.random.uniform(0, this.mood === 'rubbish' ? 20 : 500));
    this.gain = this.random.uniform(0.5, 1.4);
  }

  next(duty: number): number {
    if (this.left-- <= 0) this.nextMood();
    const loop = this.controller.wheelLoop!;
    if (this.mood === 'rubbish') return Math.floor(this.random.uniform(-60, 60)) * (loop.single ? 0 : 1);
    if (this.mood === 'blocked') return 0;
    this.speed += ((this.gain * duty) / FULL_DUTY - this.speed) * (this.controller.drive.motorStep / 32768);
    const inWindow = (2 ** (13 + loop.edgeBits) / loop.speedPerEdge) * this.speed;
    const before = Math.floor(this.rolled);
    this.rolled += inWindow / 2 ** loop.windowBits;
    const edges = Math.floor(this.rolled) - before;
    return loop.single ? Math.abs(edges) : edges;
  }
}

export class EdgeTrace {
  private readonly left: Wheel;
  private readonly right: Wheel;

  constructor(controller: ControllerConstants, seed: number) {
    this.left = new Wheel(controller, new Random(seed, 8));
    this.right = new Wheel(controller, new Random(seed, 9));
  }

  /** Edges of the last sample, at the duties of the twin. */
  next({ dutyLeft, dutyRight }: Twin): [left: number, right: number] {
    return [this.left.next(dutyLeft), this.right.next(dutyRight)];
  }
}
