/** Runs the harness on an emulated ATmega328P: numbers in and out through its general-purpose registers. */
import { CPU, avrInstruction } from 'avr8js';

const GPIOR0 = 0x3e;
const GPIOR1 = 0x4a;
const GPIOR2 = 0x4b;
const MOST_CYCLES_PER_NUMBER = 100_000;

export interface ChipOutput {
  numbers: Int32Array;
  /** Clock cycles of each control step, call and return included. */
  stepCycles: Uint32Array;
}

/**
 * @param program flash memory from address 0
 * @throws Error when the program does not come to its end
 */
export function runOnChip(program: Uint8Array, input: Int32Array): ChipOutput {
  const flash = new Uint16Array(0x4000);
  new Uint8Array(flash.buffer).set(program);
  const cpu = new CPU(flash, 2048);
  const bytes = new Uint8Array(input.buffer);
  const output: number[] = [];
  const stepCycles: number[] = [];
  let taken = 0;
  let stepBegan = 0;
  const state = { ended: false };
  cpu.readHooks[GPIOR0] = () => bytes[taken++] ?? 0;
  cpu.writeHooks[GPIOR0] = (value) => {
    output.push(value);
    return true;
  };
  cpu.writeHooks[GPIOR1] = (value) => {
    if (value === 1) stepBegan = cpu.cycles;
    else stepCycles.push(cpu.cycles - stepBegan);
    return true;
  };
  cpu.writeHooks[GPIOR2] = () => {
    state.ended = true;
    return true;
  };
  const execute = avrInstruction;
  const limit = MOST_CYCLES_PER_NUMBER * input.length;
  while (!state.ended && cpu.cycles < limit) execute(cpu);
  if (!state.ended) throw new Error(`The harness has not ended after ${limit} cycles.`);
  return {
    numbers: new Int32Array(Uint8Array.from(output).buffer),
    stepCycles: Uint32Array.from(stepCycles),
  };
}
