/** The AVR registers behind a vehicle's pins: sample tick, converter channels, motor outputs, digital inputs. */
import { adcClockOf, adcClockWords } from '../design/adc-clock.js';
import type { PinFacts, TickFacts } from '../vehicle/board-facts.js';
import { modeOf, pwmDemand, pwmWords } from '../vehicle/pwm-modes.js';
import type { MotorWiring, Vehicle } from '../vehicle/vehicle.js';
import { sensorPlaces } from './view-pins.js';

/** A PWM output of a motor. */
interface PwmOutput {
  /** As in setLeftPwm(). */
  name: string;
  compare: string;
  compareType: 'uint8_t' | 'uint16_t';
  control: string;
  connect: string;
  port: string;
  bit: number;
  /** Value at full duty. */
  top: number;
  fast: boolean;
}

/** A plain output of a motor. */
interface LevelOutput {
  name: string;
  port: string;
  bit: number;
}

export interface RegisterView {
  /** What ticks once a sample. */
  tick: TickFacts;
  /** The PWM frequency of the motors, and why. */
  pwmAbout: string;
  /** Set-up of the timers whose PWM serves a motor. */
  pwmSetUp: readonly string[];
  pwmOutputs: readonly PwmOutput[];
  levelOutputs: readonly LevelOutput[];
  /** Clock of the converter: its bits in ADCSRA, and why; empty without analog sensors. */
  adcSelect: string;
  adcAbout: string;
  /** Converter channels of the analog sensors, leftmost first, and whether each is one of the upper eight. */
  channels: readonly number[];
  upperChannels: readonly boolean[];
  someUpperChannels: boolean;
  /** Register and bit of each digital sensor, leftmost first, and its place among all, from 0. */
  inputs: readonly { register: string; bit: number; place: number }[];
  button: { register: string; bit: number };
  /** The stop input; absent without one. */
  stopContact?: { register: string; bit: number };
}

/** Channels that ADMUX tells apart; bit MUX5 of ADCSRB has the rest (data sheets of the larger chips). */
const CHANNELS_SELECTED = 8;

/** Port and bit of a pin; on AVR boards every pin that a program drives or reads has them. */
export function portOf(pin: PinFacts): { name: string; bit: number } {
  if (pin.port === undefined) throw new Error(`Pin ${pin.label} has no port.`);
  return pin.port;
}

const inputOf = (pin: PinFacts) => ({ register: `PIN${portOf(pin).name}`, bit: portOf(pin).bit });

const levelOf = (name: string, pin: PinFacts): LevelOutput => ({
  name,
  port: `PORT${portOf(pin).name}`,
  bit: portOf(pin).bit,
});

/** Outputs of one motor, by what they do; in1 and in2 are swapped as inverted says. */
function outputsOf(side: 'Left' | 'Right', wiring: MotorWiring): [name: string, pin: PinFacts][] {
  const [forward, backward] = wiring.inverted ? [wiring.in2, wiring.in1] : [wiring.in1, wiring.in2];
  const all: [string, PinFacts | undefined][] = [
    [`${side}Pwm`, wiring.pwm],
    [`${side}Dir`, wiring.dir],
    [`${side}Forward`, forward],
    [`${side}Backward`, backward],
  ];
  return all.filter((each): each is [string, PinFacts] => each[1] !== undefined);
}

/** Registers of a vehicle on an AVR board. */
export function registerView(vehicle: Vehicle): RegisterView {
  const { board, drive, bar, start, stopInput } = vehicle;
  const timers = board.timers ?? [];
  const outputs = [...outputsOf('Left', drive.left), ...outputsOf('Right', drive.right)];
  const isPwm = (name: string) => name.endsWith('Pwm') || drive.scheme === 'dual-pwm';
  const pwm = outputs.filter(([name]) => isPwm(name));
  const demand = pwmDemand(vehicle);
  const used = demand.serving;
  const pwmOutputs = pwm.map(([name, pin]): PwmOutput => {
    const facts = timers.find(({ timer }) => timer === pin.pwm?.timer);
    if (facts === undefined || pin.pwm === undefined) throw new Error(`Pin ${pin.label} has no timer.`);
    const { timer, channel } = pin.pwm;
    const mode = modeOf(demand, timer);
    return {
      ...levelOf(name, pin),
      compare: `OCR${timer}${channel}`,
      compareType: mode.dutySteps > 256 ? 'uint16_t' : 'uint8_t',
      control: facts.controls?.[channel] ?? `TCCR${timer}A`,
      connect: `COM${timer}${channel}1`,
      top: mode.dutySteps,
      fast: mode.fastPwm,
    };
  });
  const free = timers.find(({ timer, tick }) => tick && !used.has(timer));
  const shared = timers.find(({ timer, pwmTick }) => pwmTick && used.has(timer));
  const tick = free?.tick ?? shared?.pwmTick;
  if (tick === undefined) throw new Error(`${board.title} has no timer for the sample tick.`);
  const levels = outputs.filter(([name]) => !isPwm(name)).map(([name, pin]) => levelOf(name, pin));
  if (drive.standby !== undefined) levels.push(levelOf('Standby', drive.standby));
  const channels = sensorPlaces(vehicle, 'analog').map((place) => bar.pins[place]?.adc?.channel ?? 0);
  const clock = adcClockOf(vehicle);
  return {
    tick,
    adcSelect: clock?.select ?? '',
    adcAbout: clock
      ? `Converter clock ${board.clockHz / 1e6} MHz / ${clock.prescaler} = ${adcClockWords(clock)}. From sensors.`
      : '',
    pwmAbout: `PWM of ${pwmWords(vehicle)}. From drive.driver.`,
    pwmSetUp: timers
      .filter(({ timer }) => used.has(timer))
      .flatMap(({ timer }) => modeOf(demand, timer).setUp),
    pwmOutputs,
    levelOutputs: levels,
    channels: channels.map((channel) => channel % CHANNELS_SELECTED),
    upperChannels: channels.map((channel) => channel >= CHANNELS_SELECTED),
    someUpperChannels: channels.some((channel) => channel >= CHANNELS_SELECTED),
    inputs: sensorPlaces(vehicle, 'digital').map((place) => ({ ...inputOf(bar.pins[place]!), place })),
    button: inputOf(start.button),
    ...(stopInput && { stopContact: inputOf(stopInput) }),
  };
}
