/** The words at the head of the main file: what it is, what to be careful about, how to start, what the LED says. */
import type { Vehicle } from '../vehicle/vehicle.js';
import { VERSION } from '../version.js';
import type { Features } from './features.js';
import type { SheetIdentity } from './render.js';

/** Why a vehicle stands still, by number of flashes; the firmware's Reason holds the same numbers. */
const REASONS = [
  { name: 'Ready', flashes: 1, about: 'ready' },
  { name: 'Button', flashes: 2, about: 'stopped by the button' },
  { name: 'LineLost', flashes: 3, about: 'the line was lost and the search did not find it' },
  { name: 'RunLimit', flashes: 4, about: 'the run limit was reached' },
  { name: 'Overrun', flashes: 5, about: 'the control loop missed its period too often' },
  { name: 'Watchdog', flashes: 6, about: 'restarted by the watchdog after the program hung' },
  { name: 'BrownOut', flashes: 7, about: 'restarted after the supply voltage broke down' },
  {
    name: 'FlatSensor',
    flashes: 8,
    about: 'calibration refused: a sensor saw too little contrast; then its number, from the left',
  },
  { name: 'LineNotFound', flashes: 9, about: 'calibration refused: the line was not found again' },
  { name: 'WheelBlocked', flashes: 10, about: 'a wheel was driven and did not turn, or its encoder is dead' },
  {
    name: 'StopInput',
    flashes: 11,
    about: 'the stop input was open: the contact, or a wire to it',
  },
] as const;

export const CAUTIONS = [
  'This firmware is no safety function. Where the vehicle could hurt someone, guarding, emergency stop and personnel detection are separate, rated equipment under local codes, planned by competent, licensed people (driverless industrial trucks: ISO 3691-4; stop categories: IEC 60204-1).',
  'First run: wheels off the floor. Check that both turn forward, and that the button stops them.',
  'Battery: fuse it at its terminal, never short it, stop at its lowest voltage, charge it under supervision with a charger made for its cells.',
] as const;

/** Paragraphs of the header; an empty one is a blank line. */
export function headerParagraphs(sheet: SheetIdentity, vehicle: Vehicle, features: Features): string[] {
  const start = features.sweep
    ? 'Start: set the vehicle on a straight, the line under the middle of the bar, and press the button. After the countdown it turns left and right to measure ground and line, then drives. Pressing again stops it.'
    : 'Start: set the vehicle on the line and press the button. After the countdown it drives. Pressing again stops it.';
  return [
    `${vehicle.name}: firmware of a line-tracking vehicle on ${vehicle.board.title} (${vehicle.board.chip}).`,
    `Written by fairlead ${VERSION} from the build sheet with SHA-256`,
    sheet.digest,
    'Change the sheet and render again; edits here are refused then, not lost. user_hooks is yours.',
    '',
    ...CAUTIONS,
    '',
    start,
    'Nothing moves without the button, after a reset neither. To go on after a stop, press it again.',
    ...(features.led ? ledParagraphs(features) : []),
  ];
}

/** Why a vehicle may stand still. */
export interface Reason {
  name: string;
  flashes: number;
  about: string;
}

/** The reasons that this vehicle can have. */
export function reasonsOf(features: Features): readonly Reason[] {
  return REASONS.filter(({ name }) => {
    if (name === 'WheelBlocked') return features.encoders;
    if (name === 'StopInput') return features.stopInput;
    if (name === 'FlatSensor' || name === 'LineNotFound') return features.sweep;
    return name !== 'BrownOut' || features.brownOut;
  });
}

/** The reason that so many flashes stand for. */
export function reasonOfFlashes(flashes: number): Reason['name'] | undefined {
  return REASONS.find((reason) => reason.flashes === flashes)?.name;
}

/** What a reason means; the name itself where it is none. */
export function reasonWords(name: string): string {
  return REASONS.find((reason) => reason.name === name)?.about ?? name;
}

/** Paragraphs on what the LED shows. */
function ledParagraphs(features: Features): string[] {
  return [
    '',
    'LED: on while driving, flashing without a pause during the countdown, else a number of flashes:',
    ...reasonsOf(features).map(
      ({ flashes, about }) => `${flashes} ${flashes === 1 ? 'flash' : 'flashes'}: ${about}`,
    ),
  ];
}
