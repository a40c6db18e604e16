/**
 * What is done while the line is not seen as usual: crossing, gap, corner, search, and the stop in the end.
 *
 * Distances are sums of speeds over samples (constants.ts).
 */
import { type MemoryConstants, PHASE, type Phase } from './constants.js';
import type { Sensing } from './sensing.js';

export class LineMemory {
  phase: Phase = PHASE.follow;
  /** Side on which the line was last seen: 1 left, -1 right. */
  side = 1;
  /** Distance driven in this phase; 0 while the line is followed. */
  private travelled = 0;
  /** Samples spent searching. */
  private searched = 0;
  /** Distance yet to go in which a vanished line is taken for a corner, and to which side. */
  private corner = 0;
  private cornerSide = 1;

  constructor(
    private readonly constants: MemoryConstants,
    private readonly sensing: Sensing,
  ) {}

  start(): void {
    this.phase = PHASE.follow;
    this.side = this.cornerSide = 1;
    this.travelled = this.searched = this.corner = 0;
  }

  /** One sample, after the sensors were read; `speed` is the modelled one, speed units. */
  update(speed: number): void {
    if (this.corner > 0) this.corner -= speed;
    // a bar that stays on the line everywhere ends a search, and with it the run, like one that sees none
    if (this.sensing.wide && this.phase !== PHASE.search) this.cross();
    else if (this.sensing.found) this.see();
    else this.miss();
    // only what a limit is set on is counted: a sum without end would overflow in the firmware
    if (this.phase === PHASE.follow) this.travelled = 0;
    else this.travelled += speed;
    if (this.phase === PHASE.search) this.searched++;
    else this.searched = 0;
  }

  private enter(phase: Phase): void {
    if (phase === this.phase) return;
    this.phase = phase;
    this.travelled = 0;
  }

  private cross(): void {
    this.corner = 0;
    this.enter(PHASE.crossing);
    if (this.travelled > this.constants.crossingDistance) this.enter(PHASE.search);
  }

  private see(): void {
    const { offset, reach } = this.sensing;
    this.enter(PHASE.follow);
    if (offset !== 0) this.side = offset > 0 ? 1 : -1;
    if (reach !== 0) {
      this.corner = this.constants.cornerDistance;
      this.cornerSide = reach;
    }
  }

  private miss(): void {
    const { sideOffset, gapDistance, searchSamples } = this.constants;
    if (this.phase === PHASE.follow || this.phase === PHASE.crossing) {
      const { offset } = this.sensing;
      const bySide = offset > sideOffset || offset < -sideOffset;
      if (this.corner > 0) this.side = this.cornerSide;
      this.enter(bySide || this.corner > 0 ? PHASE.search : PHASE.gap);
    } else if (this.phase === PHASE.gap) {
      if (this.travelled > gapDistance) this.enter(PHASE.search);
    } else if (this.searched >= searchSamples) {
      this.enter(PHASE.stopped);
    }
  }
}
