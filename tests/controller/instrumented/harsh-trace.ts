/**
 * Readings that drive the arithmetic to its ends: every sensor at one end of the converter or at a place between, whole bars that jump from
 * one side to the other, held for one sample or for hundreds, so that filters and sums run full. Edges are as many as their type holds.
 */
import { Random } from '../../../src/rehearsal/random.js';

type Pattern = 'any' | 'one' | 'none' | 'all' | 'left' | 'right' | 'swap';

const PATTERNS: readonly Pattern[] = ['any', 'one', 'none', 'all', 'left', 'right', 'swap'];
const INT16_MAX = 32_767;

export class HarshTrace {
  private readonly random: Random;
  private pattern: Pattern = 'one';
  private left = 0;
  private place = 0;

  /** @param full largest reading, counts */
  constructor(
    private readonly full: number,
    seed: number,
  ) {
    this.random = new Random(seed, 3);
  }

  private below(limit: number): number {
    return Math.floor(this.random.uniform(0, limit));
  }

  private next(): void {
    this.pattern = PATTERNS[this.below(PATTERNS.length)]!;
    this.left = 1 + Math.floor(600 * this.random.uniform(0, 1) ** 4);
    this.place = this.below(1000);
  }

  private high(i: number, count: number): boolean {
    const place = this.place % count;
    if (this.pattern === 'any') return this.random.uniform(0, 1) < 0.5;
    if (this.pattern === 'one') return i === place;
    if (this.pattern === 'left') return i <= place;
    if (this.pattern === 'right') return i >= place;
    if (this.pattern === 'swap') return i === (this.left % 2 === 0 ? 0 : count - 1);
    return this.pattern === 'all';
  }

  readings(counts: Int32Array): void {
    if (this.left-- <= 0) this.next();
    const between = this.random.uniform(0, 1) < 0.1;
    // half of the patterns the other way round: which end the line reads at is the sheet's
    const turned = this.place % 2;
    for (let i = 0; i < counts.length; i++) {
      const high = this.high(i, counts.length) ? 1 - turned : turned;
      counts[i] = between && this.full > 1 ? this.below(this.full + 1) : high * this.full;
    }
  }

  edges(): [left: number, right: number] {
    const one = (): number => [0, 1, -1, this.below(60), INT16_MAX, -INT16_MAX][this.below(6)]!;
    return [one(), one()];
  }
}
