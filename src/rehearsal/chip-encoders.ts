/** The encoders' signals on the pins of the emulated chip. */
import type { EncoderWiring, Encoders } from '../vehicle/encoder.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { type AvrChip, pinNumber } from './chip-avr.js';
import type { VehicleMotion } from './vehicle-motion.js';
import { WheelEdges } from './wheel-edges.js';

/** One encoder: its edges are spread evenly over the step in which they fall. */
class EncoderSignal {
  private level = false;
  private readonly a: number;
  private readonly b: number | undefined;

  constructor(private readonly wiring: EncoderWiring) {
    this.a = pinNumber(wiring.a);
    this.b = wiring.b && pinNumber(wiring.b);
  }

  /** The next edge; the second channel has changed before, by direction. */
  edge(chip: AvrChip, forward: boolean): void {
    this.level = !this.level;
    if (this.b !== undefined) chip.setPin(this.b, (forward === this.wiring.inverted) === this.level);
    chip.setPin(this.a, this.level);
  }
}

interface Due {
  share: number;
  signal: EncoderSignal;
  forward: boolean;
}

export class ChipEncoders {
  private readonly edges: WheelEdges;
  private readonly left: EncoderSignal;
  private readonly right: EncoderSignal;

  constructor(encoders: Encoders, wheelDiameterM: number) {
    // the pins themselves tell the direction or do not
    this.edges = new WheelEdges({ ...encoders, single: false }, wheelDiameterM);
    this.left = new EncoderSignal(encoders.left);
    this.right = new EncoderSignal(encoders.right);
  }

  /** Runs the chip through a step in which the edges of the plant's last step come. */
  runThrough(chip: AvrChip, motion: VehicleMotion, fromCycle: number, cycles: number): void {
    this.edges.look(motion);
    const due = [...dueOf(this.left, this.edges.left), ...dueOf(this.right, this.edges.right)];
    due.sort((x, y) => x.share - y.share);
    for (const { share, signal, forward } of due) {
      chip.runTo(fromCycle + Math.floor(share * cycles));
      signal.edge(chip, forward);
    }
    chip.runTo(fromCycle + cycles);
  }
}

function dueOf(signal: EncoderSignal, edges: number): Due[] {
  const count = Math.abs(edges);
  return Array.from({ length: count }, (_, i) => ({ share: (i + 0.5) / count, signal, forward: edges > 0 }));
}

/** The encoders of a vehicle that has them. */
export function chipEncoders({ encoders, drive }: Vehicle): ChipEncoders | undefined {
  return encoders && new ChipEncoders(encoders, drive.wheelDiameterM);
}
