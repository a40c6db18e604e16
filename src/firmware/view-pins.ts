/** The vehicle's pins under the names that the firmware gives them; the same in both languages. */
import type { PinFacts } from '../vehicle/board-facts.js';
import type { MotorWiring, Vehicle } from '../vehicle/vehicle.js';

type Side = 'left' | 'right';

export interface PinLine {
  name: string;
  /** As the firmware's language names it. */
  code: string;
  /** Whether it is an output to the motor driver. */
  motor: boolean;
  about: string;
}

/** Level of a direction pin with which a wheel drives forward. */
export interface DirectionLine {
  name: string;
  high: boolean;
  about: string;
}

function motorPins(side: Side, vehicle: Vehicle): PinLine[] {
  const wiring: MotorWiring = vehicle.drive[side];
  const prefix = side.toUpperCase();
  const lines: PinLine[] = [];
  const add = (suffix: string, pin: PinFacts | undefined, key: string, about: string) => {
    if (pin === undefined) return;
    const source = `drive.driver.${side}.${key}`;
    const name = `${prefix}_${suffix}_PIN`;
    lines.push({ name, code: pin.code, motor: true, about: `${about}. From ${source}.` });
  };
  add('PWM', wiring.pwm, 'pwm', `Speed of the ${side} motor`);
  add('DIR', wiring.dir, 'dir', `Direction of the ${side} motor`);
  const swapped = wiring.inverted ? ', swapped as inverted says' : '';
  const [forward, backward] = wiring.inverted ? (['in2', 'in1'] as const) : (['in1', 'in2'] as const);
  add('FORWARD', wiring[forward], forward, `Input that drives the ${side} wheel forward${swapped}`);
  add('BACKWARD', wiring[backward], backward, `Input that drives the ${side} wheel backward${swapped}`);
  return lines;
}

function directionLine(side: Side, wiring: MotorWiring): DirectionLine {
  return {
    name: `${side.toUpperCase()}_FORWARD_LEVEL`,
    high: !wiring.inverted,
    about: `Level of the direction pin with which the ${side} wheel drives forward. From drive.driver.${side}.inverted.`,
  };
}

/** Levels of the direction pins for forward; none but with pwm-dir. */
export function directionLines({ drive }: Vehicle): DirectionLine[] {
  if (drive.scheme !== 'pwm-dir') return [];
  return [directionLine('left', drive.left), directionLine('right', drive.right)];
}

function encoderPins(side: Side, { encoders }: Vehicle): PinLine[] {
  const lines: PinLine[] = [];
  for (const key of ['a', 'b'] as const) {
    const pin = encoders?.[side][key];
    if (pin === undefined) continue;
    const name = `${side.toUpperCase()}_ENCODER_${key.toUpperCase()}_PIN`;
    const about = `Channel ${key} of the ${side} encoder. From encoders.${side}.${key}.`;
    lines.push({ name, code: pin.code, motor: false, about });
  }
  return lines;
}

/** All pins that the vehicle uses. */
function usedPins({ drive, bar, start, encoders, stopInput }: Vehicle): PinFacts[] {
  const counted = [encoders?.left, encoders?.right].flatMap((each) => [each?.a, each?.b]);
  const motors = [drive.left, drive.right].flatMap(({ pwm, dir, in1, in2 }) => [pwm, dir, in1, in2]);
  return [...motors, ...counted, ...bar.pins, start.button, stopInput, drive.standby].filter(
    (pin) => pin !== undefined,
  );
}

/** The LED that shows state and faults. */
export interface LedLine {
  /** Label of its pin on the board. */
  label: string;
  /** As the firmware's language names the pin. */
  code: string;
  activeLow: boolean;
  about: string;
}

/** The vehicle's own LED, else the board's where its pin is free; undefined where there is none. */
export function ledLine(vehicle: Vehicle): LedLine | undefined {
  const { led, board } = vehicle;
  if (led !== undefined) {
    const lit = led.activeLow ? 'low' : 'high';
    const about = `LED that shows state and faults, lit while ${lit}. From led.`;
    return { label: led.pin.label, code: led.pin.code, activeLow: led.activeLow, about };
  }
  if (usedPins(vehicle).some((pin) => pin.label === board.led.label)) return undefined;
  return { ...board.led, activeLow: false };
}

/** The sensors' pins as the firmware's language names them, leftmost first. */
export function sensorPinCodes({ bar }: Vehicle): string[] {
  return bar.pins.map((pin, i) => (bar.kinds[i] === 'analog' ? pin.adc?.code : undefined) ?? pin.code);
}

/** Places, from 0, of the sensors of a kind. */
export function sensorPlaces({ bar }: Vehicle, kind: 'analog' | 'digital'): number[] {
  return bar.kinds.flatMap((each, i) => (each === kind ? [i] : []));
}

/** All pins but the sensors'. */
export function pinLines(vehicle: Vehicle): PinLine[] {
  const lines = [...motorPins('left', vehicle), ...motorPins('right', vehicle)];
  const { standby } = vehicle.drive;
  if (standby !== undefined)
    lines.push({
      name: 'STANDBY_PIN',
      code: standby.code,
      motor: true,
      about: 'High lets the driver work, low cuts both motors off. From drive.driver.standbyPin.',
    });
  lines.push(...encoderPins('left', vehicle), ...encoderPins('right', vehicle));
  lines.push({
    name: 'BUTTON_PIN',
    code: vehicle.start.button.code,
    motor: false,
    about: 'Start button, to ground, with the internal pull-up. From start.buttonPin.',
  });
  if (vehicle.stopInput !== undefined)
    lines.push({
      name: 'STOP_PIN',
      code: vehicle.stopInput.code,
      motor: false,
      about: 'Stop input, low while the vehicle may move, with the internal pull-up. From stopPin.',
    });
  return lines;
}
