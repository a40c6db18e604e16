// What a sketch's control step costs, cycle by cycle on an emulated ATmega328P (avr8js).
//
// Nothing is built into the sketch: a step begins for its processor with the first conversion of a scan, all sensors are sampled when
// the last conversion ends, and the step ends with the last write to a motor's register. A sketch that reads in the background
// spends on the scan what its interrupts take; one that waits for the converter spends all the time.
import {
  AVRADC,
  AVRClock,
  AVRIOPort,
  AVRTimer,
  AVRWatchdog,
  CPU,
  adcConfig,
  avrInstruction,
  portBConfig,
  portCConfig,
  portDConfig,
  timer0Config,
  timer1Config,
  timer2Config,
  watchdogConfig,
} from 'avr8js';

const CLOCK_HZ = 16e6;
const RETI = 0x9518;
/** Data sheet of the ATmega328P: 2048 bytes of RAM behind registers and input/output. */
const RAM_START = 0x100;
const RAM_BYTES = 2048;
/** A byte that stack and data seldom hold. */
const PAINT = 0xc5;
const VECTORS_END = 0x34; // words; data sheet, Interrupt Vectors in ATmega328P: 26 vectors of two words
/** OCR0A, OCR0B, OCR1A, OCR1B (low and high byte), OCR2A, OCR2B, and what connects them: TCCR0A, TCCR1A, TCCR2A. */
const MOTOR_REGISTERS = [0x47, 0x48, 0x88, 0x89, 0x8a, 0x8b, 0xb3, 0xb4, 0x44, 0x80, 0xb0];

/**
 * @param {Uint8Array} program flash memory from address 0
 * @param {(channel: number, timeS: number) => number} reading counts of a channel at a time
 * @param {{ sensorCount: number, fromS: number, toS: number }} span sensors, and the time that is measured; the button is pressed at 0.1 s
 * @param {number} staticBytes of RAM, so that the paint above it shows how deep the stack came
 * @returns {{ steps: number, stackBytes: number, stepCycles: number[], interruptCycles: number[], pwmCycles: number[], scanCycles: number[] }}
 */
export function measureSteps(program, reading, { sensorCount, fromS, toS }, staticBytes = 0) {
  const flash = new Uint16Array(0x4000);
  new Uint8Array(flash.buffer).set(program);
  const cpu = new CPU(flash, RAM_BYTES);
  cpu.data.fill(PAINT, RAM_START);
  cpu.data[0x54] = 1;
  new AVRIOPort(cpu, portBConfig);
  new AVRIOPort(cpu, portCConfig);
  const portD = new AVRIOPort(cpu, portDConfig);
  for (const timer of [timer0Config, timer1Config, timer2Config]) new AVRTimer(cpu, timer);
  new AVRWatchdog(cpu, watchdogConfig, new AVRClock(cpu, CLOCK_HZ));
  const adc = new AVRADC(cpu, adcConfig);
  let conversions = 0;
  let scanBegan = 0;
  let sampledAt = 0;
  let inInterrupt = false;
  let interrupts = 0;
  let interruptsBefore = 0;
  let written = 0;
  const result = {
    steps: 0,
    stackBytes: 0,
    stepCycles: [],
    interruptCycles: [],
    pwmCycles: [],
    scanCycles: [],
  };
  const endStep = () => {
    if (sampledAt === 0 || written <= sampledAt) return;
    if (scanBegan > fromS * CLOCK_HZ) {
      result.steps++;
      result.pwmCycles.push(written - sampledAt);
      result.interruptCycles.push(interrupts - interruptsBefore);
      result.stepCycles.push(written - scanBegan);
      result.scanCycles.push(sampledAt - scanBegan);
    }
    interruptsBefore = interrupts;
    sampledAt = 0;
  };
  adc.onADCRead = (input) => {
    if (conversions === 0) {
      endStep();
      scanBegan = cpu.cycles;
    }
    const count = reading(input.channel, cpu.cycles / CLOCK_HZ);
    cpu.addClockEvent(() => {
      adc.completeADCRead(count);
      conversions = (conversions + 1) % sensorCount;
      if (conversions === 0) sampledAt = cpu.cycles;
    }, adc.sampleCycles);
  };
  for (const register of MOTOR_REGISTERS) {
    const before = cpu.writeHooks[register];
    cpu.writeHooks[register] = (value, old, address, mask) => {
      if (sampledAt > 0) written = cpu.cycles;
      return before ? before(value, old, address, mask) : undefined;
    };
  }
  const execute = avrInstruction;
  const end = toS * CLOCK_HZ;
  let pressed = false;
  portD.setPin(2, true);
  while (cpu.cycles < end) {
    const timeS = cpu.cycles / CLOCK_HZ;
    const press = timeS >= 0.1 && timeS < 0.25;
    if (press !== pressed) {
      pressed = press;
      portD.setPin(2, !press);
    }
    if (cpu.pc < VECTORS_END && cpu.pc > 0) inInterrupt = true;
    const opcode = flash[cpu.pc];
    const began = cpu.cycles;
    execute(cpu);
    cpu.tick();
    if (inInterrupt) interrupts += cpu.cycles - began;
    if (opcode === RETI) inInterrupt = false;
  }
  const deepest = cpu.data.findIndex((byte, address) => address >= RAM_START + staticBytes && byte !== PAINT);
  result.stackBytes = RAM_START + RAM_BYTES - deepest;
  return result;
}

/** Counts of a sensor under which a line wanders: what both sketches see. */
export function wanderingLine(sensorCount) {
  const pitchMm = 10;
  return (channel, timeS) => {
    const lineMm = 22 * Math.sin(2 * Math.PI * 1.7 * timeS) + 6 * Math.sin(2 * Math.PI * 7.3 * timeS);
    const placeMm = ((sensorCount - 1) / 2 - channel) * pitchMm;
    const share = Math.max(0, Math.min(1, (9.5 + 4 - Math.abs(placeMm - lineMm)) / 8));
    // a little noise that repeats
    const noise = ((Math.floor(timeS * 1e6) * 7919 + channel * 104729) % 9) - 4;
    return Math.max(0, Math.min(1023, Math.round(123 + share * 716 + noise)));
  };
}

/**
 * Counts that no line gives: every sensor at one end or the other or between, several runs of sensors at once, held for some samples, with
 * a wandering line between. They look for the longest way through the control step; repeatable.
 */
export function harshReadings(sensorCount) {
  const line = wanderingLine(sensorCount);
  let state = 1;
  const random = () => {
    state = (Math.imul(state, 1103515245) + 12345) >>> 0;
    return state / 2 ** 32;
  };
  let held = 0;
  let pattern = [];
  return (channel, timeS) => {
    if (channel === 0) {
      if (held-- <= 0) held = Math.floor(random() * 30);
      const kind = random();
      pattern = Array.from({ length: sensorCount }, (_, i) => {
        if (kind < 0.5) return i % 2 === (kind < 0.25 ? 0 : 1) ? 123 : 839;
        return random() < 0.1 ? Math.floor(random() * 1024) : random() < 0.5 ? 123 : 839;
      });
    }
    return held % 3 === 0 ? line(channel, timeS) : pattern[channel];
  };
}

/** Mean and largest of a list. */
export function meanAndMax(values) {
  let sum = 0;
  let max = 0;
  for (const value of values) {
    sum += value;
    if (value > max) max = value;
  }
  return { mean: sum / values.length, max };
}
