/** The view model of the MicroPython program: pins, what board and driver need, and the files to write. */
import { motorPwmHz, pwmWords } from '../vehicle/pwm-modes.js';
import type { EncoderWiring } from '../vehicle/encoder.js';
import type { Constant, ConstantGroup } from './constant.js';
import { copyCommands } from './papers-loading.js';
import { fileName } from './identifiers.js';
import type { IntegerType } from './literals.js';
import type { FirmwareDesign, Rendering, SheetIdentity, TemplateFile } from './render.js';
import {
  type PinLine,
  directionLines,
  ledLine,
  pinLines,
  sensorPinCodes,
  sensorPlaces,
} from './view-pins.js';
import { type CommonView, commonView } from './view.js';

/** Type codes of MicroPython's arrays. */
const TYPECODES: Readonly<Record<IntegerType, string>> = {
  int8_t: 'b',
  uint8_t: 'B',
  int16_t: 'h',
  uint16_t: 'H',
  int32_t: 'i',
  uint32_t: 'I',
};

interface MicroPythonView extends Omit<CommonView, 'groups' | 'reasons'> {
  groups: readonly (Omit<ConstantGroup, 'constants'> & {
    constants: readonly (Constant & { typecode: string })[];
  })[];
  reasons: readonly { constantName: string; flashes: number; about: string }[];
  pwmDir: boolean;
  pwmInIn: boolean;
  dualPwm: boolean;
  standby: boolean;
  /** The converter has an attenuator that has to be set. */
  attenuated: boolean;
  sensorPins: readonly string[];
  /** Places of the analog and the digital sensors, from 0. */
  analogPlaces: readonly number[];
  digitalPlaces: readonly number[];
  pins: readonly PinLine[];
  directions: readonly { name: string; level: number; about: string }[];
  pwmHz: number;
  /** The same in words, and why. */
  pwmAbout: string;
  /** Encoders: whether their pins have pull-ups, and whether they count backward. */
  /** The port lets a handler run at once, not when the interpreter comes to it. */
  hardInterrupts: boolean;
  leftPullUp: boolean;
  rightPullUp: boolean;
  leftInverted: boolean;
  rightInverted: boolean;
}

/** LineLost -> REASON_LINE_LOST */
function reasonName(name: string): string {
  return `REASON${name.replace(/[A-Z]/g, (letter) => `_${letter}`).toUpperCase()}`;
}

/** How the program gets onto the board, and what else a person has to know who has it in hand. */
function handlingParagraphs(files: readonly string[]): string[] {
  return [
    '',
    'To the board, in this folder (pip install mpremote):',
    ...copyCommands(files),
    'mpremote reset',
    'boot.py stays as it is. The first run starts the watchdog, which nothing stops: from then on the board restarts by itself when the program is interrupted; switch it off and on before changing files.',
  ];
}

/** Whether all pins of an encoder have a pull-up; many encoders only pull down. */
function hasPullUps(encoder: EncoderWiring | undefined): boolean {
  return [encoder?.a, encoder?.b].every((pin) => pin === undefined || pin.pullUp);
}

function micropythonView(
  sheet: SheetIdentity,
  design: FirmwareDesign,
  files: readonly string[],
): MicroPythonView {
  const { vehicle } = design;
  const { scheme, standby } = vehicle.drive;
  const common = commonView(sheet, design);
  return {
    ...common,
    header: [...common.header, ...handlingParagraphs(files)],
    groups: common.groups.map(({ title, constants }) => ({
      title,
      constants: constants.map((each) => ({ ...each, typecode: TYPECODES[each.type] })),
    })),
    reasons: common.reasons.map(({ name, flashes, about }) => ({
      constantName: reasonName(name),
      flashes,
      about,
    })),
    pwmDir: scheme === 'pwm-dir',
    pwmInIn: scheme === 'pwm-in-in',
    dualPwm: scheme === 'dual-pwm',
    standby: standby !== undefined,
    attenuated: vehicle.board.adcAttenuated === true,
    sensorPins: sensorPinCodes(vehicle),
    analogPlaces: sensorPlaces(vehicle, 'analog'),
    digitalPlaces: sensorPlaces(vehicle, 'digital'),
    pins: pinLines(vehicle),
    directions: directionLines(vehicle).map(({ name, high, about }) => ({
      name,
      level: high ? 1 : 0,
      about,
    })),
    pwmHz: Math.floor(motorPwmHz(vehicle)),
    pwmAbout: `${pwmWords(vehicle)}. From drive.driver.maxPwmKhz.`,
    // MicroPython documentation, Pin.irq: hard is for ports that have it, rp2 among them; esp32 has not
    hardInterrupts: vehicle.board.id === 'pico',
    leftPullUp: hasPullUps(vehicle.encoders?.left),
    rightPullUp: hasPullUps(vehicle.encoders?.right),
    leftInverted: vehicle.encoders?.left.inverted ?? false,
    rightInverted: vehicle.encoders?.right.inverted ?? false,
  };
}

interface Wanted {
  rules: boolean;
  encoders: boolean;
  sweep: boolean;
  led: boolean;
}

function filesOf(name: string, { rules, encoders, sweep, led }: Wanted): TemplateFile[] {
  const folder = fileName(name);
  const file = (module: string, wanted = true): TemplateFile => ({
    template: `${module}.py`,
    path: `${folder}/${module}.py`,
    owner: 'tool',
    wanted,
  });
  return [
    file('main'),
    file('constants'),
    file('pins'),
    file('sensing'),
    file('steering'),
    file('rule_table', rules),
    file('wheel_loop', encoders),
    file('encoders', encoders),
    file('calibration', sweep),
    file('sweep', sweep),
    file('motors'),
    file('board'),
    file('states'),
    file('blink', led),
    file('supervisor'),
    { ...file('user_hooks'), owner: 'user' },
  ];
}

/** Templates, paths and view model of one vehicle's program. */
export function micropythonRendering(sheet: SheetIdentity, design: FirmwareDesign): Rendering {
  const { vehicle, controller } = design;
  const wanted = {
    rules: controller.kind === 'rules',
    encoders: controller.wheelLoop !== undefined,
    sweep: controller.sweep !== undefined,
    led: ledLine(vehicle) !== undefined,
  };
  const files = filesOf(vehicle.name, wanted);
  // main.py comes last: if the copying is interrupted, the board has no program that lacks half its modules.
  const [main, ...modules] = files.filter((file) => file.wanted).map(({ template }) => template);
  const names = [...modules, main!];
  return { folder: 'micropython', language: 'python', files, view: micropythonView(sheet, design, names) };
}
