/** The encoders of the simulated vehicle: edges from how far each wheel has rolled. */
import { type Encoders, edgesPerM } from '../vehicle/encoder.js';
import type { VehicleMotion } from './vehicle-motion.js';

export class WheelEdges {
  private readonly perM: number;
  private readonly single: boolean;
  private leftTaken = 0;
  private rightTaken = 0;
  /** Edges since the last look, negative backward; with a single channel without a sign. */
  left = 0;
  right = 0;

  constructor({ linesPerTurn, single }: Encoders, wheelDiameterM: number) {
    this.perM = edgesPerM(linesPerTurn, wheelDiameterM);
    this.single = single;
  }

  /** Counts what has passed since the last look. */
  look({ leftRolledM, rightRolledM }: Pick<VehicleMotion, 'leftRolledM' | 'rightRolledM'>): void {
    const left = Math.floor(leftRolledM * this.perM);
    const right = Math.floor(rightRolledM * this.perM);
    this.left = left - this.leftTaken;
    this.right = right - this.rightTaken;
    this.leftTaken = left;
    this.rightTaken = right;
    if (!this.single) return;
    this.left = Math.abs(this.left);
    this.right = Math.abs(this.right);
  }
}
