/** The steering law in integers: from what is steered on to a curvature. */
import {
  COEFFICIENT_BITS,
  type ControllerConstants,
  FILTER_BITS,
  INTEGRAL_BITS,
  INTEGRAL_SPEED_BITS,
  LARGEST_CURVATURE,
} from './constants.js';
import { clamp } from './clamp.js';

const INT16_MAX = 32767;

export class SteeringLaw {
  /** Low-passed input, FILTER_BITS more bits. */
  private filtered = 0;
  /** Integral part of the curvature, INTEGRAL_BITS more bits; 0 without one. */
  private integral = 0;

  constructor(private readonly constants: Pick<ControllerConstants, 'steering' | 'classes' | 'integral'>) {}

  start(): void {
    this.filtered = this.integral = 0;
  }

  /**
   * One sample: proportional plus filtered derivative, and what the integral part has found.
   *
   * @param input offset, or with rules the curvature that the table asks for
   * @param speed modelled speed, speed units
   * @param regained whether the line was not followed in the sample before
   * @returns curvature units
   */
  curvature(input: number, classIndex: number, speed: number, regained: boolean): number {
    const { steering, classes } = this.constants;
    const gains = classes[classIndex]!;
    if (regained) this.filtered = input << FILTER_BITS;
    const change = clamp((input << FILTER_BITS) - this.filtered, INT16_MAX);
    this.filtered += (change * gains.derivativeFilter) >> COEFFICIENT_BITS;
    const sum = (input * gains.proportional + change * gains.derivative) >> steering.gainBits;
    const asked = sum + (this.integral >> INTEGRAL_BITS);
    const curvature = clamp(asked, steering.curvatureLimit);
    this.integrate(sum, input, (speed * (gains.integral ?? 0)) >> INTEGRAL_SPEED_BITS, curvature - asked);
    return curvature;
  }

  /**
   * Takes up what unequal motors do, by the way driven: stands still where the law asks for a bend, and gives back what
   * the curvature's limit cuts off (back-calculation: Astrom and Hagglund, Advanced PID Control, section 3.5).
   *
   * @param sum of the proportional and derivative parts, curvature units
   * @param gain of the integral part at this speed
   * @param beyond what the limit adds, curvature units
   */
  private integrate(sum: number, input: number, gain: number, beyond: number): void {
    const { integral } = this.constants;
    if (integral === undefined) return;
    if (sum <= integral.limit && sum >= -integral.limit) this.integral += (input * gain) >> integral.gainBits;
    this.integral += clamp(beyond, LARGEST_CURVATURE) * integral.tracking;
    this.integral = clamp(this.integral, integral.limit << INTEGRAL_BITS);
  }
}
