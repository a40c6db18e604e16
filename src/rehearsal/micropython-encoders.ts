/** The encoders' signals on the pins of the virtual chip: edges wait until the program lets the handlers run. */
import type { EncoderWiring } from '../vehicle/encoder.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import type { VehicleMotion } from './vehicle-motion.js';
import { WheelEdges } from './wheel-edges.js';

class EncoderSignal {
  /** Edges that have not been handled, negative backward. */
  waiting = 0;
  private level = false;
  private second = false;
  readonly a: number;
  private readonly b: number | undefined;

  constructor(private readonly wiring: EncoderWiring) {
    this.a = Number(wiring.a.code);
    this.b = wiring.b && Number(wiring.b.code);
  }

  /** Makes the next edge that waits; returns whether there was one. */
  edge(): boolean {
    if (this.waiting === 0) return false;
    const forward = this.waiting > 0;
    this.waiting -= forward ? 1 : -1;
    this.level = !this.level;
    this.second = (forward === this.wiring.inverted) === this.level;
    return true;
  }

  levelOf(gpio: number): boolean | undefined {
    if (gpio === this.a) return this.level;
    return gpio === this.b ? this.second : undefined;
  }
}

export class MicroPythonEncoders {
  private readonly edges: WheelEdges | undefined;
  private readonly signals: readonly EncoderSignal[];

  /** @param vehicle one with or without encoders */
  constructor({ encoders, drive }: Vehicle) {
    this.edges = encoders && new WheelEdges({ ...encoders, single: false }, drive.wheelDiameterM);
    this.signals = encoders ? [encoders.left, encoders.right].map((each) => new EncoderSignal(each)) : [];
  }

  /** To be called after each step of the plant. */
  look(motion: VehicleMotion): void {
    const [left, right] = this.signals;
    if (!this.edges || !left || !right) return;
    this.edges.look(motion);
    left.waiting += this.edges.left;
    right.waiting += this.edges.right;
  }

  /** Makes the next edge on a pin; returns whether one was waiting. */
  edge(gpio: number): boolean {
    return this.signals.find(({ a }) => a === gpio)?.edge() ?? false;
  }

  /** Level of an encoder's pin; undefined for other pins. */
  level(gpio: number): boolean | undefined {
    for (const signal of this.signals) {
      const level = signal.levelOf(gpio);
      if (level !== undefined) return level;
    }
    return undefined;
  }
}
