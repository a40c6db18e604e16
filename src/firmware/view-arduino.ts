/** The view model of the Arduino sketch: pins, what the driver's scheme needs, and the files to write. */
import type { PinFacts } from '../vehicle/board-facts.js';
import type { MotorWiring, Vehicle } from '../vehicle/vehicle.js';
import { fileName } from './identifiers.js';
import type { FirmwareDesign, Rendering, SheetIdentity, TemplateFile } from './render.js';
import { type CommonView, commonView } from './view.js';

/** LED_BUILTIN of Uno and Nano: variants/standard/pins_arduino.h. */
const LED_LABEL = '13';

interface PinLine {
  name: string;
  /** As the Arduino core names it: 5 or A0. */
  code: string;
  /** Whether it is an output to the motor driver. */
  motor: boolean;
  about: string;
}

interface DirectionLine {
  name: string;
  level: 'HIGH' | 'LOW';
  about: string;
}

interface ArduinoView extends CommonView {
  pwmDir: boolean;
  pwmInIn: boolean;
  dualPwm: boolean;
  standby: boolean;
  /** Pins of the sensors, leftmost first, as text for a list. */
  sensorPins: readonly string[];
  pins: readonly PinLine[];
  /** Levels of the direction pins for forward; with pwm-dir only. */
  directions: readonly DirectionLine[];
  /** Largest reading of the converter, counts. */
  adcMaxCount: number;
}

function motorPins(side: 'left' | 'right', vehicle: Vehicle): PinLine[] {
  const wiring: MotorWiring = vehicle.drive[side];
  const prefix = side.toUpperCase();
  const lines: PinLine[] = [];
  const add = (suffix: string, pin: PinFacts | undefined, key: string, about: string) => {
    if (pin === undefined) return;
    const source = `drive.driver.${side}.${key}`;
    lines.push({
      name: `${prefix}_${suffix}_PIN`,
      code: pin.code,
      motor: true,
      about: `${about}. From ${source}.`,
    });
  };
  add('PWM', wiring.pwm, 'pwm', `Speed of the ${side} motor`);
  add('DIR', wiring.dir, 'dir', `Direction of the ${side} motor`);
  const swapped = wiring.inverted ? ', swapped as inverted says' : '';
  const [forward, backward] = wiring.inverted ? (['in2', 'in1'] as const) : (['in1', 'in2'] as const);
  add('FORWARD', wiring[forward], forward, `Input that drives the ${side} wheel forward${swapped}`);
  add('BACKWARD', wiring[backward], backward, `Input that drives the ${side} wheel backward${swapped}`);
  return lines;
}

function directionLine(side: 'left' | 'right', wiring: MotorWiring): DirectionLine {
  return {
    name: `${side.toUpperCase()}_FORWARD_LEVEL`,
    level: wiring.inverted ? 'LOW' : 'HIGH',
    about: `Level of the direction pin with which the ${side} wheel drives forward. From drive.driver.${side}.inverted.`,
  };
}

function usedPins(vehicle: Vehicle): PinFacts[] {
  const { drive, bar, start } = vehicle;
  const motors = [drive.left, drive.right].flatMap(({ pwm, dir, in1, in2 }) => [pwm, dir, in1, in2]);
  return [...motors, ...bar.pins, start.button, drive.standby].filter((pin) => pin !== undefined);
}

function pinLines(vehicle: Vehicle): PinLine[] {
  const lines = [...motorPins('left', vehicle), ...motorPins('right', vehicle)];
  const { standby } = vehicle.drive;
  if (standby !== undefined)
    lines.push({
      name: 'STANDBY_PIN',
      code: standby.code,
      motor: true,
      about: 'High lets the driver work, low cuts both motors off. From drive.driver.standbyPin.',
    });
  lines.push({
    name: 'BUTTON_PIN',
    code: vehicle.start.button.code,
    motor: false,
    about: 'Start button, to ground, with the internal pull-up. From start.buttonPin.',
  });
  return lines;
}

function arduinoView(sheet: SheetIdentity, design: FirmwareDesign): ArduinoView {
  const { vehicle } = design;
  const { scheme, left, right, standby } = vehicle.drive;
  const led = usedPins(vehicle).every((pin) => pin.label !== LED_LABEL);
  return {
    ...commonView(sheet, design, led),
    pwmDir: scheme === 'pwm-dir',
    pwmInIn: scheme === 'pwm-in-in',
    dualPwm: scheme === 'dual-pwm',
    standby: standby !== undefined,
    sensorPins: vehicle.bar.pins.map((pin) => pin.code),
    pins: pinLines(vehicle),
    directions: scheme === 'pwm-dir' ? [directionLine('left', left), directionLine('right', right)] : [],
    adcMaxCount: vehicle.board.adcMaxCount,
  };
}

function filesOf(view: ArduinoView): TemplateFile[] {
  const folder = fileName(view.name);
  const file = (name: string, wanted = true): TemplateFile => ({
    template: name,
    path: `${folder}/${name}`,
    owner: 'tool',
    wanted,
  });
  const pair = (name: string, wanted = true) => [file(`${name}.h`, wanted), file(`${name}.cpp`, wanted)];
  const users = pair('user_hooks').map((each): TemplateFile => ({ ...each, owner: 'user' }));
  return [
    { ...file('sketch.ino'), path: `${folder}/${folder}.ino` },
    file('constants.h'),
    file('pins.h'),
    ...pair('sensing'),
    ...pair('steering'),
    file('rule_table.h', view.rules),
    ...pair('calibration', view.sweep),
    ...pair('sweep', view.sweep),
    ...pair('motors'),
    ...pair('board'),
    ...pair('blink', view.led),
    ...pair('supervisor'),
    ...users,
  ];
}

/** Templates, paths and view model of one vehicle's sketch. */
export function arduinoRendering(sheet: SheetIdentity, design: FirmwareDesign): Rendering {
  const view = arduinoView(sheet, design);
  return { folder: 'arduino', language: 'cpp', files: filesOf(view), view };
}
