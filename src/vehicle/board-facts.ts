/** The shape of board facts: what a board's pins can do. The facts themselves are data, one file a board. */
import type { Sheet } from '../sheet/sheet-types.js';

export type BoardId = Sheet['target']['board'];

/** What one pin of a board can do. */
export interface PinFacts {
  /** Label printed on the board, in canonical spelling: "5", "A0", "GP26". */
  label: string;
  /** Other accepted spellings, e.g. "D5", or "14" for A0. */
  aliases: readonly string[];
  /** Number or expression by which the firmware's language names it (Arduino: 5 or A0; MicroPython: 26). */
  code: string;
  /** Can be a digital input. */
  input: boolean;
  /** Can be a digital output. */
  output: boolean;
  /** Has an internal pull-up. */
  pullUp: boolean;
  /**
   * PWM timer or slice, and its channel, where the pin can do PWM. Pins with the same timer and channel carry the
   * same signal, except for channel "routed": the chip then connects any free channel to the pin.
   */
  pwm?: { timer: number; channel: string };
  /** Converter (where the chip has several), its channel and what to watch, where the pin can read a voltage. */
  adc?: {
    unit?: number;
    channel: number;
    /** How the firmware's language names the analog input, where that differs from the pin's own code. */
    code?: string;
    caution?: string;
  };
  /** Port and bit by which the chip's registers name it, where the chip has such ports. */
  port?: { name: string; bit: number };
  /** Each change of its level can interrupt the program, as counting edges takes. */
  changeInterrupt?: boolean;
  /** Can raise an external interrupt. */
  interrupt: boolean;
  /** Why the pin must not be used at all (serial console, flash memory), else absent. */
  reserved?: string;
  /** Why the pin is better left free, or what to watch when using it. */
  caution?: string;
}

/** A clock of an AVR chip's converter. */
export interface AdcClock {
  clockHz: number;
  /** Divides the chip's clock. */
  prescaler: number;
  /** Bits of ADCSRA that select it. */
  select: string;
  /** Largest error of a reading, counts. */
  errorCounts: number;
  /** Time of one reading, s. */
  readS: number;
}

/** How an AVR timer makes PWM. */
export interface PwmMode {
  pwmHz: number;
  /** Steps of duty from off to full: the timer's top. */
  dutySteps: number;
  /** Fast PWM puts out one step more than its compare value says; phase-correct PWM just that. */
  fastPwm: boolean;
  /** Set-up before the first duty, as statements of C++; none where the core's set-up stands. */
  setUp: readonly string[];
}

/** Frequencies to which a timer can be set up: any of a 16-bit timer, or the one fast mode of an 8-bit timer. */
export interface FreePwm {
  fixed?: PwmMode;
}

/** A timer of an AVR chip, as the firmware uses it. */
export interface TimerFacts {
  timer: number;
  /** Mode beside other timers that serve motors: their frequencies agree. */
  pwm: PwmMode;
  /** Modes at other frequencies, for timers that the firmware may set up anew. */
  free?: FreePwm;
  /** Control registers of channels whose output is not connected in TCCRnA. */
  controls?: Readonly<Record<string, string>>;
  /** How it ticks once a sample while none of its outputs is PWM; absent where it must not be retimed. */
  tick?: TickFacts;
  /** How it ticks beside PWM of the mode `pwm`, whose period is then just one sample. */
  pwmTick?: TickFacts;
}

/** A source of sample ticks: the interrupt's vector, and its set-up as statements of C++. */
export interface TickFacts {
  vector: string;
  setUp: readonly string[];
}

/** One board, from its data sheet. */
export interface BoardFacts {
  id: BoardId;
  title: string;
  language: 'arduino' | 'micropython';
  chip: string;
  /** Where the facts come from. */
  sources: readonly string[];
  clockHz: number;
  /** Logic level, V; an analog input must not exceed it. */
  logicV: number;
  /** Largest reading of the converter as the firmware reads it, counts. */
  adcMaxCount: number;
  /** Time of one analog reading as the firmware does it, s; with several clocks that of the fastest. */
  adcReadS: number;
  /** Clocks of the converter that the firmware chooses from, fastest first; none in other languages. */
  adcClocks?: readonly AdcClock[];
  /** Time of one digital reading, s. */
  digitalReadS: number;
  /** Time of counting one encoder edge, interrupt and all, s. */
  edgeS: number;
  /** Time for the control arithmetic, worst case, s. */
  computeS: number;
  /** Time that the loops of both wheels add to it, with encoders, worst case, s. */
  wheelLoopS: number;
  /** Sample period of the control loop, s. */
  samplePeriodS: number;
  /** PWM frequency as the firmware sets it up, Hz (the lowest over the board's timers). */
  pwmHz: number;
  /** PWM frequency of each timer as the firmware leaves it, Hz, where the board's timers are fixed to pins. */
  timerPwmHz?: Readonly<Record<number, number>>;
  /** Timers of which the firmware writes the registers, those best for the sample tick first; none in other languages. */
  timers?: readonly TimerFacts[];
  /** Steps of PWM duty from off to full, as the firmware's language counts them. */
  pwmSteps: number;
  /** Program memory that the firmware may fill, bytes. */
  flashBytes?: number;
  /** Data memory of the chip, bytes. */
  ramBytes?: number;
  /** The timer that the millisecond clock uses; PWM on it is allowed but it must not be retimed. */
  clockTimer?: number;
  /** Pin change interrupts of an AVR chip, by port. */
  pinChange?: Readonly<Record<string, PinChangeFacts>>;
  pins: readonly PinFacts[];
  /** The converter has an attenuator that has to be set for the whole range. */
  adcAttenuated?: boolean;
  /** The LED on the board: the pin that it takes, how the firmware's language names it, a word about it. */
  led: { label: string; code: string; about: string };
  /** What the Arduino core calls the board; Arduino only. */
  core?: ArduinoCoreFacts;
  /** What to know when the firmware is loaded: how the board enters its boot loader, what a reset does. */
  flashing: readonly string[];
  /** What to know when the board is wired, beyond the cautions of its pins. */
  wiring?: readonly string[];
}

/** How the Arduino core and its tools name a board: boards.txt of the core. */
export interface ArduinoCoreFacts {
  /** Fully qualified board name. */
  fqbn: string;
  /** build.mcu */
  mcu: string;
  /** build.variant */
  variant: string;
  /** build.board */
  macro: string;
  /** Macros of build.extra_flags, as NAME=value. */
  defines?: readonly string[];
}

/** The pin change interrupt of one port: its vector, mask register and enabling bit. */
export interface PinChangeFacts {
  vector: string;
  mask: string;
  enable: string;
}
