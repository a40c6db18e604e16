/** The AVR registers behind a vehicle's encoders. */
import type { EncoderWiring } from '../vehicle/encoder.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { portOf } from './view-registers.js';

interface EncoderChannel {
  /** Variable that counts the edges. */
  edges: 'leftEdges' | 'rightEdges';
  bit: number;
  /** Where the second channel is read; "" without one. */
  secondInput: string;
  secondBit: number;
  inverted: boolean;
}

/** One port with first channels on it: what its interrupt does. */
interface EncoderPort {
  vector: string;
  mask: string;
  enable: string;
  /** Register of the pins' levels, and the variable that keeps them. */
  input: string;
  levels: string;
  channels: readonly EncoderChannel[];
}

export interface EncoderView {
  encoderPorts: readonly EncoderPort[];
  /** Names of the encoders' pins. */
  encoderPins: readonly { name: string }[];
}

function channelOf(edges: EncoderChannel['edges'], { a, b, inverted }: EncoderWiring): EncoderChannel {
  const second = b === undefined ? undefined : portOf(b);
  return {
    edges,
    bit: portOf(a).bit,
    secondInput: second === undefined ? '' : `PIN${second.name}`,
    secondBit: second?.bit ?? 0,
    inverted,
  };
}

/** Registers and names of the encoders; empty lists without any. */
export function encoderView({ board, encoders }: Vehicle): EncoderView {
  if (encoders === undefined) return { encoderPorts: [], encoderPins: [] };
  const sides = [
    { edges: 'leftEdges', side: 'LEFT', wiring: encoders.left },
    { edges: 'rightEdges', side: 'RIGHT', wiring: encoders.right },
  ] as const;
  const names = [...new Set(sides.map(({ wiring }) => portOf(wiring.a).name))].sort();
  const encoderPorts = names.map((name): EncoderPort => {
    const facts = board.pinChange?.[name];
    if (facts === undefined) throw new Error(`Port ${name} of ${board.title} has no pin change interrupt.`);
    const here = sides.filter(({ wiring }) => portOf(wiring.a).name === name);
    return {
      ...facts,
      input: `PIN${name}`,
      levels: `levels${name}`,
      channels: here.map(({ edges, wiring }) => channelOf(edges, wiring)),
    };
  });
  const encoderPins = sides.flatMap(({ side, wiring }) => [
    { name: `${side}_ENCODER_A_PIN` },
    ...(wiring.b === undefined ? [] : [{ name: `${side}_ENCODER_B_PIN` }]),
  ]);
  return { encoderPorts, encoderPins };
}
