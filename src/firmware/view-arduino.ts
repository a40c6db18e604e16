/** The view model of the Arduino sketch: pins, what the driver's scheme needs, and the files to write. */
import { fileName } from './identifiers.js';
import type { FirmwareDesign, Rendering, SheetIdentity, TemplateFile } from './render.js';
import { type EncoderView, encoderView } from './view-encoders.js';
import { type PinLine, directionLines, pinLines, sensorPinCodes, sensorPlaces } from './view-pins.js';
import { type RegisterView, registerView } from './view-registers.js';
import { type CommonView, commonView } from './view.js';

interface ArduinoView extends CommonView, RegisterView, EncoderView {
  pwmDir: boolean;
  pwmInIn: boolean;
  dualPwm: boolean;
  standby: boolean;
  /** Pins of the sensors, leftmost first, as text for a list. */
  sensorPins: readonly string[];
  /** Places of the analog sensors, from 0. */
  analogPlaces: readonly number[];
  pins: readonly PinLine[];
  /** Levels of the direction pins for forward; with pwm-dir only. */
  directions: readonly { name: string; level: 'HIGH' | 'LOW'; about: string }[];
  /** Largest reading of the converter, counts. */
  adcMaxCount: number;
}

function arduinoView(sheet: SheetIdentity, design: FirmwareDesign): ArduinoView {
  const { vehicle } = design;
  const { scheme, standby } = vehicle.drive;
  return {
    ...commonView(sheet, design),
    ...registerView(vehicle),
    ...encoderView(vehicle),
    pwmDir: scheme === 'pwm-dir',
    pwmInIn: scheme === 'pwm-in-in',
    dualPwm: scheme === 'dual-pwm',
    standby: standby !== undefined,
    sensorPins: sensorPinCodes(vehicle),
    analogPlaces: sensorPlaces(vehicle, 'analog'),
    pins: pinLines(vehicle),
    directions: directionLines(vehicle).map(({ name, high, about }) => ({
      name,
      level: high ? 'HIGH' : 'LOW',
      about,
    })),
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
    file('arithmetic.h'),
    ...pair('sensing'),
    ...pair('steering'),
    file('rule_table.h', view.rules),
    ...pair('wheel_loop', view.encoders),
    ...pair('encoders', view.encoders),
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
