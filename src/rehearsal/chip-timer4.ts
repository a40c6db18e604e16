/**
 * Timer 4 of the ATmega32U4, as far as PWM goes: outputs A (PC7) and D (PD7) in phase- and frequency-correct mode.
 *
 * Atmel 7766J, 10-bit high-speed timer: it counts up to OCR4C and down again; an output is cleared on the match on the way up and set on the
 * way down, so that it is high while the counter is below its compare value; new compare values act from the bottom on. Interrupts, the
 * complementary outputs and the fast clock are left out: neither the Arduino core nor the firmware uses them.
 */
import type { AVRIOPort, CPU } from 'avr8js';

/** How a timer takes hold of a pin, in avr8js's numbers: it does not export their names. */
type Override = Parameters<AVRIOPort['timerOverridePin']>[1];
const [RELEASE, TAKE, SET, CLEAR] = [0, 1, 2, 3].map((number: unknown) => number as Override) as [
  Override,
  Override,
  Override,
  Override,
];

const TCCR4A = 0xc0;
const TCCR4B = 0xc1;
const TCCR4C = 0xc2;
const OCR4A = 0xcf;
const OCR4C = 0xd1;
const OCR4D = 0xd2;
/** Clock select bits: 0 stops the timer, n divides by 2^(n - 1). */
const CLOCK_SELECT = 0x0f;

interface Channel {
  control: number;
  /** The bit of the control register that connects the output. */
  connect: number;
  compare: number;
  port: AVRIOPort;
  bit: number;
  connected: boolean;
}

export class HighSpeedTimer {
  private readonly channels: readonly Channel[];
  private running = false;

  /** @param c port C, @param d port D */
  constructor(
    private readonly cpu: CPU,
    c: AVRIOPort,
    d: AVRIOPort,
  ) {
    this.channels = [
      { control: TCCR4A, connect: 0x80, compare: OCR4A, port: c, bit: 7, connected: false },
      { control: TCCR4C, connect: 0x08, compare: OCR4D, port: d, bit: 7, connected: false },
    ];
    cpu.data[OCR4C] = 0xff;
    for (const channel of this.channels)
      cpu.writeHooks[channel.control] = (value) => this.connect(channel, (value & channel.connect) !== 0);
    cpu.writeHooks[TCCR4B] = (value) => {
      cpu.data[TCCR4B] = value;
      if (!this.running) this.beginPeriod();
      return true;
    };
  }

  private connect(channel: Channel, connected: boolean): void {
    if (connected === channel.connected) return;
    channel.connected = connected;
    channel.port.timerOverridePin(channel.bit, connected ? TAKE : RELEASE);
  }

  private put(channel: Channel, high: boolean): void {
    if (channel.connected) channel.port.timerOverridePin(channel.bit, high ? SET : CLEAR);
  }

  /** One way up from the bottom and down again; the counter stands at the bottom. */
  private readonly beginPeriod = (): void => {
    const { cpu } = this;
    const select = cpu.data[TCCR4B]! & CLOCK_SELECT;
    this.running = select > 0;
    if (!this.running) return;
    const tickCycles = 1 << (select - 1);
    const top = cpu.data[OCR4C]!;
    for (const channel of this.channels) {
      const compare = cpu.data[channel.compare]!;
      this.put(channel, compare > 0);
      if (compare === 0 || compare >= top) continue;
      cpu.addClockEvent(() => this.put(channel, false), compare * tickCycles);
      cpu.addClockEvent(() => this.put(channel, true), (2 * top - compare) * tickCycles);
    }
    cpu.addClockEvent(this.beginPeriod, Math.max(1, 2 * top) * tickCycles);
  };
}
