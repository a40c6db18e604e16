/**
 * The demo's image does the same on a second, independent emulator: simavr (Debian) writes the same values to the motors' registers in
 * the same order as avr8js, over more than 10^6 cycles of a run and all that goes before.
 *
 * The cycles of the writes differ by little, and no more at the end than at the beginning: the two emulators start a conversion at
 * different phases of the converter's prescaler (32 cycles), and an interrupt waits for a different instruction in the idle loop.
 */
import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
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
import { afterAll, beforeAll, expect, test } from 'vitest';
import { renderFirmware } from '../../src/firmware/render.js';
import { buildSketch } from '../../src/rehearsal/chip-build.js';
import { SHEET, cart, quickDesign } from '../firmware/cart.js';

const CLOCK_HZ = 16e6;
/** The button; the countdown ends half a second after it is pressed. */
const PRESS_CYCLE = 0.1 * CLOCK_HZ;
const RELEASE_CYCLE = 0.25 * CLOCK_HZ;
const END_CYCLE = 0.75 * CLOCK_HZ;
/** PORTB, TCCR0A, PORTD, OCR0A, OCR0B: data addresses (data sheet, Register Summary). */
const WATCHED = [0x25, 0x44, 0x2b, 0x47, 0x48];
/** Two prescaler phases, and the longest stretch without interrupts. */
const MOST_APART_CYCLES = 128;
const SENSOR_COUNT = 6;

interface Change {
  cycle: number;
  register: number;
  value: number;
}

/** One reading a conversion: two sensors see a line that goes to and fro. */
function readings(): Uint16Array {
  return Uint16Array.from({ length: SENSOR_COUNT * 500 }, (_, k) => {
    const place = Math.abs((Math.floor(k / SENSOR_COUNT / 8) % 8) - 4);
    const sensor = k % SENSOR_COUNT;
    return sensor === place || sensor === place + 1 ? 839 : 123;
  });
}

function onAvr8js(program: Uint8Array, counts: Uint16Array): Change[] {
  const flash = new Uint16Array(0x4000);
  new Uint8Array(flash.buffer).set(program);
  const cpu = new CPU(flash, 2048);
  new AVRIOPort(cpu, portBConfig);
  new AVRIOPort(cpu, portCConfig);
  const portD = new AVRIOPort(cpu, portDConfig);
  for (const config of [timer0Config, timer1Config, timer2Config]) new AVRTimer(cpu, config);
  new AVRWatchdog(cpu, watchdogConfig, new AVRClock(cpu, CLOCK_HZ));
  const adc = new AVRADC(cpu, adcConfig);
  let taken = 0;
  adc.onADCRead = () => {
    const count = counts[taken++] ?? 0;
    cpu.addClockEvent(() => adc.completeADCRead(count), adc.sampleCycles);
  };
  const execute = avrInstruction;
  const changes: Change[] = [];
  const values = WATCHED.map(() => 0);
  let level: boolean | undefined;
  while (cpu.cycles < END_CYCLE) {
    const high = !(cpu.cycles >= PRESS_CYCLE && cpu.cycles < RELEASE_CYCLE);
    if (high !== level) portD.setPin(2, (level = high));
    execute(cpu);
    cpu.tick();
    for (const [i, register] of WATCHED.entries()) {
      const value = cpu.data[register]!;
      if (value === values[i]) continue;
      values[i] = value;
      changes.push({ cycle: cpu.cycles, register, value });
    }
  }
  return changes;
}

let folder: string;
beforeAll(() => {
  folder = mkdtempSync(join(tmpdir(), 'fairlead-simavr-'));
});
afterAll(() => rmSync(folder, { recursive: true }));

function onSimavr(program: Uint8Array, counts: Uint16Array): Change[] {
  const [trace, image, readingsFile] = ['trace', 'image.bin', 'readings.bin'].map((name) =>
    join(folder, name),
  ) as [string, string, string];
  const source = fileURLToPath(new URL('simavr/trace.c', import.meta.url));
  execFileSync('gcc', ['-O2', '-Wall', '-Wextra', '-Werror', source, '-o', trace, '-lsimavr']);
  writeFileSync(image, program);
  writeFileSync(readingsFile, new Uint8Array(counts.buffer));
  const times = [END_CYCLE, PRESS_CYCLE, RELEASE_CYCLE].map(String);
  const registers = WATCHED.map((address) => address.toString(16));
  const output = execFileSync(trace, [image, readingsFile, ...times, ...registers], { encoding: 'utf8' });
  return output
    .trim()
    .split('\n')
    .map((line) => {
      const [cycle, register, value] = line.split(' ') as [string, string, string];
      return { cycle: Number(cycle), register: Number.parseInt(register, 16), value: Number(value) };
    });
}

test('the demo writes the same to its motors on simavr as on avr8js', async () => {
  const design = quickDesign(cart());
  const { program } = await buildSketch(await renderFirmware(SHEET, design), 'uno');
  const counts = readings();
  const [one, other] = [onAvr8js(program, counts), onSimavr(program, counts)];
  const what = ({ register, value }: Change) => `${register.toString(16)}=${value}`;
  expect(other.map(what)).toEqual(one.map(what));
  const running = one.filter(({ cycle }) => cycle > END_CYCLE - 1e6);
  expect(running.length).toBeGreaterThan(20);
  for (const [i, { cycle }] of one.entries())
    expect(Math.abs(other[i]!.cycle - cycle), `change ${i}`).toBeLessThan(MOST_APART_CYCLES);
});
