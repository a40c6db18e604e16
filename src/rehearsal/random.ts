/**
 * Random numbers that a seed repeats, the same on every machine.
 *
 * Generator: xoshiro128++ (Blackman and Vigna, Scrambled linear pseudorandom number generators, ACM Trans. Math. Softw. 47:36,
 * 2021). Seeding: the state is filled from seed and stream by a Weyl sequence through the finaliser of MurmurHash3 (Appleby,
 * public domain), the manner of SplitMix (Steele, Lea and Flood, OOPSLA 2014), so that neighbouring seeds have nothing in common.
 * Normal numbers: the polar method (Marsaglia and Bray, SIAM Review 6:260, 1964); for noise in bulk the sum of four uniform ones
 * (Irwin 1927, Hall 1927), whose tails end at 3.45 standard deviations.
 */
export class Random {
  private s0: number;
  private s1: number;
  private s2: number;
  private s3: number;
  private spare = 0;
  private hasSpare = false;

  /**
   * @param seed integer, 0 to 2^32 - 1
   * @param stream integer; streams of one seed are independent of each other
   */
  constructor(seed: number, stream: number) {
    const start = mixed((seed ^ mixed(stream + WEYL)) | 0);
    this.s0 = mixed((start + WEYL) | 0);
    this.s1 = mixed((start + 2 * WEYL) | 0);
    this.s2 = mixed((start + 3 * WEYL) | 0);
    this.s3 = mixed((start + 4 * WEYL) | 0);
  }

  /** A generator with a given state, not all zero. */
  static fromState(s0: number, s1: number, s2: number, s3: number): Random {
    const random = new Random(0, 0);
    [random.s0, random.s1, random.s2, random.s3] = [s0 | 0, s1 | 0, s2 | 0, s3 | 0];
    return random;
  }

  /** 32 random bits, as a number from 0 to 2^32 - 1. */
  bits(): number {
    const sum = (this.s0 + this.s3) | 0;
    const result = (((sum << 7) | (sum >>> 25)) + this.s0) | 0;
    const shifted = this.s1 << 9;
    this.s2 ^= this.s0;
    this.s3 ^= this.s1;
    this.s1 ^= this.s2;
    this.s0 ^= this.s3;
    this.s2 ^= shifted;
    this.s3 = (this.s3 << 11) | (this.s3 >>> 21);
    return result >>> 0;
  }

  /** Uniform between two numbers. */
  uniform(low: number, high: number): number {
    return low + ((high - low) * (this.bits() + 0.5)) / 2 ** 32;
  }

  /** Normal with mean 0 and standard deviation 1. */
  normal(): number {
    if (this.hasSpare) {
      this.hasSpare = false;
      return this.spare;
    }
    for (;;) {
      const u = this.bits() / 2 ** 31 - 1;
      const v = this.bits() / 2 ** 31 - 1;
      const square = u * u + v * v;
      if (square >= 1 || square === 0) continue;
      const scale = Math.sqrt((-2 * Math.log(square)) / square);
      this.spare = v * scale;
      this.hasSpare = true;
      return u * scale;
    }
  }

  /** Nearly normal with mean 0 and standard deviation 1, from one draw: the sum of its four bytes. */
  noise(): number {
    const bits = this.bits();
    const sum = (bits & 255) + ((bits >>> 8) & 255) + ((bits >>> 16) & 255) + (bits >>> 24);
    return (sum - 2 * 255) * BYTES_SCALE;
  }
}

/** Four uniform whole numbers 0 to 255 have together the variance 4 (256^2 - 1)/12. */
const BYTES_SCALE = Math.sqrt(12 / (4 * (256 ** 2 - 1)));

/** 2^32 divided by the golden ratio, odd. */
const WEYL = 0x9e3779b9 | 0;

function mixed(value: number): number {
  let h = value;
  h = Math.imul(h ^ (h >>> 16), 0x85ebca6b);
  h = Math.imul(h ^ (h >>> 13), 0xc2b2ae35);
  return h ^ (h >>> 16);
}
