/**
 * From raw readings to the line's offset at the bar: the integer arithmetic that the firmware repeats.
 *
 * Each reading becomes a coverage 0..255. Neighbouring sensors on the line form a run. The edge of the
 * line at an end of the run lies between a covered and an uncovered sensor; the sum of their two
 * coverages says where (edge table). Two edges give the centre; where one lies outside the bar, the
 * other and the line width do.
 */
import {
  CALIBRATION_BITS,
  EDGE_BITS,
  EDGE_STEP_BITS,
  FULL_COVERAGE,
  GAP_HALF_BITS,
  type SensingConstants,
} from './constants.js';

/**
 * Position of an edge beside the middle of its gap, offset units.
 *
 * @param halfGap half the gap, offset units with GAP_HALF_BITS more bits
 * @param sum of the coverages on both sides, 0..510
 */
export function edgeShift(constants: SensingConstants, halfGap: number, sum: number): number {
  const table = constants.edgeTable;
  // one more, so that an entry stands for just one full coverage: an edge in the middle
  const place = sum + 1;
  const index = place >> EDGE_STEP_BITS;
  const low = table[index] as number;
  const part = place & ((1 << EDGE_STEP_BITS) - 1);
  const value = low + ((((table[index + 1] as number) - low) * part) >> EDGE_STEP_BITS);
  return (halfGap * value) >> (EDGE_BITS + GAP_HALF_BITS);
}

export class Sensing {
  /** Coverage of each sensor, 0..255; with rules 0 or 255. */
  readonly coverage: Int32Array;
  /** Whether the line is under the bar. */
  found = false;
  /** Whether the bar lies on a crossing. */
  wide = false;
  /** Offset of the line's centre at the bar, offset units; valid while `found`. */
  offset = 0;
  /** End of the bar that a too wide line reaches, as at a corner: 1 left, -1 right, 0 none. */
  reach = 0;
  /** The run of sensors taken for the line. */
  first = 0;
  last = 0;

  constructor(
    private readonly constants: SensingConstants,
    private readonly binary: boolean,
  ) {
    this.coverage = new Int32Array(constants.sensorCount);
  }

  /** Turns one set of readings (counts, or 0 and 1 from digital sensors) into coverages; returns their sum. */
  private cover(counts: Int32Array): number {
    const { sensorCount, digital, lineLevelHigh, ground, gain, highCoverage } = this.constants;
    let total = 0;
    for (let i = 0; i < sensorCount; i++) {
      let value: number;
      if (digital) {
        value = ((counts[i] as number) !== 0) === lineLevelHigh ? FULL_COVERAGE : 0;
      } else {
        value = (((counts[i] as number) - (ground[i] as number)) * (gain[i] as number)) >> CALIBRATION_BITS;
        if (value < 0) value = 0;
        if (value > FULL_COVERAGE) value = FULL_COVERAGE;
        if (this.binary) value = value >= highCoverage ? FULL_COVERAGE : 0;
      }
      this.coverage[i] = value;
      total += value;
    }
    return total;
  }

  /** Takes the run of sensors first..last for the line: offset and reach. */
  private measure(): void {
    const { sensorCount, gapMiddle, gapHalf, halfLine, cornerWidth } = this.constants;
    const { coverage, first, last } = this;
    let leftEdge = 0;
    let rightEdge = 0;
    if (first > 0) {
      const sum = (coverage[first - 1] as number) + (coverage[first] as number);
      leftEdge = (gapMiddle[first] as number) + edgeShift(this.constants, gapHalf[first] as number, sum);
    }
    if (last < sensorCount - 1) {
      const sum = (coverage[last] as number) + (coverage[last + 1] as number);
      rightEdge =
        (gapMiddle[last + 1] as number) - edgeShift(this.constants, gapHalf[last + 1] as number, sum);
    }
    if (first > 0 && last < sensorCount - 1) {
      this.offset = (leftEdge + rightEdge) >> 1;
    } else if (first > 0) {
      if (leftEdge - (gapMiddle[sensorCount] as number) > cornerWidth) this.reach = -1;
      this.offset = leftEdge - halfLine;
    } else if (last < sensorCount - 1) {
      if ((gapMiddle[0] as number) - rightEdge > cornerWidth) this.reach = 1;
      this.offset = rightEdge + halfLine;
    } else {
      this.offset = 0;
    }
  }

  /** How far the run of sensors first..last lies from the last offset, by the middles of its gaps; offset units. */
  private distance(first: number, last: number): number {
    const { sensorCount, gapMiddle, halfLine } = this.constants;
    const leftEdge = gapMiddle[first] as number;
    const rightEdge = gapMiddle[last + 1] as number;
    let middle = (leftEdge + rightEdge) >> 1;
    if (first === 0) middle = rightEdge + halfLine;
    else if (last === sensorCount - 1) middle = leftEdge - halfLine;
    return middle > this.offset ? middle - this.offset : this.offset - middle;
  }

  /** With no sensor on the line: a line just beyond an end of the bar still half covers the end sensor. */
  private findBeyondEnds(): void {
    const { sensorCount, gapMiddle, gapHalf, halfLine, lowCoverage } = this.constants;
    const left = this.coverage[0] as number;
    const right = this.coverage[sensorCount - 1] as number;
    if (left >= lowCoverage && left >= right) {
      const shift = edgeShift(this.constants, gapHalf[0] as number, FULL_COVERAGE + left);
      this.found = true;
      this.offset = (gapMiddle[0] as number) - shift + halfLine;
      this.first = this.last = 0;
    } else if (right >= lowCoverage) {
      const shift = edgeShift(this.constants, gapHalf[sensorCount] as number, FULL_COVERAGE + right);
      this.found = true;
      this.offset = (gapMiddle[sensorCount] as number) + shift - halfLine;
      this.first = this.last = sensorCount - 1;
    }
  }

  /** Feedback: of several runs, the one nearest to the last offset is the line. */
  private takeNearestRun(): void {
    const { sensorCount, highCoverage } = this.constants;
    let nearest = 0;
    let i = 0;
    while (i < sensorCount) {
      if ((this.coverage[i] as number) < highCoverage) {
        i++;
        continue;
      }
      const first = i;
      while (i < sensorCount && (this.coverage[i] as number) >= highCoverage) i++;
      const distance = this.distance(first, i - 1);
      if (!this.found || distance < nearest) {
        this.found = true;
        nearest = distance;
        this.first = first;
        this.last = i - 1;
      }
    }
    if (this.found) this.measure();
    else this.findBeyondEnds();
  }

  /** Rules: of several runs the widest is the line; between equally wide ones, the span of all of them. */
  private takeWidestRun(): void {
    const { sensorCount } = this.constants;
    let widest = 0;
    let i = 0;
    while (i < sensorCount) {
      if (this.coverage[i] === 0) {
        i++;
        continue;
      }
      const first = i;
      while (i < sensorCount && this.coverage[i] !== 0) i++;
      const width = i - first;
      if (width > widest) {
        widest = width;
        this.first = first;
        this.last = i - 1;
        this.found = true;
      } else if (width === widest) {
        this.last = i - 1;
      }
    }
    if (this.found) this.measure();
  }

  /** Reads one set of counts. */
  read(counts: Int32Array): void {
    const total = this.cover(counts);
    this.found = false;
    this.reach = 0;
    this.wide = total >= this.constants.wideCoverage;
    if (this.wide) return;
    if (this.binary) this.takeWidestRun();
    else this.takeNearestRun();
  }

  /** Forgets the last offset. */
  reset(): void {
    this.offset = 0;
    this.found = this.wide = false;
    this.first = this.last = this.reach = 0;
  }
}
