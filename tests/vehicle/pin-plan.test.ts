import { describe, expect, test } from 'vitest';
import { checkSheet } from '../../src/sheet/check.js';
import type { BoardId, PinFacts } from '../../src/vehicle/board-facts.js';
import { BOARDS, BOARD_IDS, findPin } from '../../src/vehicle/boards.js';
import { DRIVERS, type DriverSchemeId } from '../../src/vehicle/drivers.js';
import { proposePins, type PinPlan, type PinRequest } from '../../src/vehicle/pin-plan.js';
import { changedSheet } from '../sheet/example-sheet.js';

const SCHEMES: readonly DriverSchemeId[] = ['pwm-dir', 'pwm-in-in', 'dual-pwm'];

interface Combination {
  board: BoardId;
  request: Required<Omit<PinRequest, 'sensorKinds'>>;
}

/** Every board, kind, count and scheme, with a standby pin where there is one. */
const ALL: readonly Combination[] = BOARD_IDS.flatMap((board) =>
  SCHEMES.flatMap((scheme) =>
    (['analog', 'digital'] as const).flatMap((sensorKind) =>
      [false, ...(DRIVERS[scheme].standby ? [true] : [])].flatMap((standby) =>
        Array.from({ length: 15 }, (_, index) => ({
          board,
          request: {
            sensorKind,
            sensorCount: index + 2,
            scheme,
            standby,
            encoderChannels: 0,
            stopInput: false,
          },
        })),
      ),
    ),
  ),
);

/** The demo cart on another board, wired by a plan. */
function checked({ board, request }: Combination, plan: PinPlan): ReturnType<typeof checkSheet> {
  const { language } = BOARDS[board];
  return checkSheet(
    changedSheet({
      '/target': { board, language },
      '/sensors/kind': request.sensorKind,
      '/sensors/count': request.sensorCount,
      '/sensors/pitchMm': 18,
      '/sensors/aheadOfAxleMm': 50,
      '/sensors/pins': plan.sensorPins,
      '/sensors/calibration': undefined,
      '/drive/driver': { scheme: request.scheme, ...plan.driver },
      '/start/buttonPin': plan.buttonPin,
    }),
  );
}

/**
 * Whether the needs can be met at all, by counting instead of matching (Hall's condition for needs whose pin sets are nested or
 * apart): every group of needs has as many pins as it is large.
 */
function enoughPins({ board, request }: Combination): boolean {
  const pins = BOARDS[board].pins.filter(({ reserved }) => reserved === undefined);
  const count = (able: (pin: PinFacts) => unknown): number => pins.filter(able).length;
  const { motorPins } = DRIVERS[request.scheme];
  const outputs = 2 * motorPins.length + (request.standby ? 1 : 0);
  const pwmOutputs = 2 * motorPins.filter(({ pwm }) => pwm).length;
  const sees = (pin: PinFacts): boolean =>
    request.sensorKind === 'analog' ? pin.adc !== undefined : pin.input;
  return (
    count(sees) >= request.sensorCount &&
    count(({ pwm }) => pwm) >= pwmOutputs &&
    count(({ output }) => output) >= outputs + 1 &&
    count((pin) => sees(pin) || pin.output) >= request.sensorCount + outputs + 1
  );
}

const isPlan = (found: ReturnType<typeof proposePins>): found is PinPlan => 'sensorPins' in found;

describe('every board, kind, count and scheme', () => {
  test.each(BOARD_IDS)('%s: there is a plan exactly where there are enough pins', (board) => {
    for (const combination of ALL.filter((each) => each.board === board)) {
      const found = proposePins(board, combination.request);
      expect(isPlan(found), JSON.stringify(combination.request)).toBe(enoughPins(combination));
    }
  });

  test.each(BOARD_IDS)('%s: the rules accept every plan', (board) => {
    let plans = 0;
    for (const combination of ALL.filter((each) => each.board === board)) {
      const found = proposePins(board, combination.request);
      if (!isPlan(found)) continue;
      plans += 1;
      expect(found.sensorPins).toHaveLength(combination.request.sensorCount);
      expect('standbyPin' in found.driver).toBe(combination.request.standby);
      expect(checked(combination, found).problems, JSON.stringify(combination.request)).toEqual([]);
    }
    expect(plans).toBeGreaterThan(20);
  });
});

test('no plan has a note where one without is possible', () => {
  const noted = ALL.filter((combination) => {
    const found = proposePins(combination.board, combination.request);
    return isPlan(found) && checked(combination, found).notes.length > 0;
  });
  // Free of notes are: on Uno and Nano 4 + 2 or 4 analog pins without I2C and digital pins 2 to 12, on the Pico all, on the
  // ESP32 six pins of the first converter, and 13 outputs and 4 inputs without a second life.
  const fewest = (board: BoardId, sensorKind: string, scheme: string, standby: boolean): number => {
    const counts = noted
      .filter(
        ({ board: b, request: r }) =>
          b === board && r.sensorKind === sensorKind && r.scheme === scheme && r.standby === standby,
      )
      .map(({ request }) => request.sensorCount);
    return Math.min(...counts);
  };
  expect(fewest('uno', 'analog', 'pwm-in-in', true)).toBe(5);
  expect(fewest('nano', 'analog', 'dual-pwm', false)).toBe(7);
  // Eleven digital and four analog pins, less six or seven or five.
  expect(fewest('uno', 'digital', 'pwm-in-in', false)).toBe(15 - 7 + 1);
  expect(fewest('uno', 'digital', 'pwm-in-in', true)).toBe(15 - 8 + 1);
  expect(fewest('uno', 'digital', 'pwm-dir', false)).toBe(15 - 5 + 1);
  expect(fewest('uno', 'digital', 'dual-pwm', false)).toBe(15 - 5 + 1);
  expect(noted.filter(({ board }) => board === 'pico')).toEqual([]);
  expect(fewest('esp32', 'analog', 'pwm-in-in', true)).toBe(7);
  expect(fewest('esp32', 'digital', 'pwm-dir', false)).toBe(17 - 5 + 1);
});

test('an Uno with six analog sensors: the motors on timer 1, away from the clock', () => {
  expect(proposePins('uno', { sensorKind: 'analog', sensorCount: 6, scheme: 'pwm-in-in' })).toEqual({
    sensorPins: ['A0', 'A1', 'A2', 'A3', 'A4', 'A5'],
    driver: { left: { pwm: 9, in1: 4, in2: 7 }, right: { pwm: 10, in1: 8, in2: 12 } },
    buttonPin: 2,
  });
});

test.each<[board: BoardId, request: PinRequest, message: string, allowed: string, fix: string]>([
  [
    'pico',
    { sensorKind: 'analog', sensorCount: 6, scheme: 'pwm-dir' },
    'Pico has 3 analog pins (GP26 to GP28), too few for 6 analog sensors.',
    'at most 3 sensors',
    'Take digital sensors, take 3 sensors at most or take another board: uno, nano, mega2560, leonardo or esp32.',
  ],
  [
    'uno',
    { sensorKind: 'analog', sensorCount: 8, scheme: 'pwm-in-in' },
    'Uno has 6 analog pins (A0 to A5), too few for 8 analog sensors.',
    'at most 6 sensors',
    'Take digital sensors, take 6 sensors at most or take another board: nano, mega2560, leonardo or esp32.',
  ],
  [
    'uno',
    { sensorKind: 'digital', sensorCount: 12, scheme: 'pwm-in-in' },
    'Uno has 18 usable pins; 12 digital sensors, the pwm-in-in driver and the button need 19 pins of the right kinds.',
    'at most 11 sensors',
    'Take 11 sensors at most or take another board: mega2560, leonardo, pico or esp32.',
  ],
])('%s: why not', (board, request, message, allowed, fix) => {
  expect(proposePins(board, request)).toEqual({
    pointer: '/sensors/count',
    message,
    got: `${request.sensorCount} sensors`,
    allowed,
    fix,
  });
});

test('two PWM pins of a Pico never share an output', () => {
  for (const { board, request } of ALL.filter((each) => each.board === 'pico')) {
    const found = proposePins(board, request);
    if (!isPlan(found)) continue;
    const { left, right } = found.driver;
    const keys = DRIVERS[request.scheme].motorPins.filter(({ pwm }) => pwm).map(({ key }) => key);
    const outputs = [left, right].flatMap((side) =>
      keys.map((key) => findPin(BOARDS.pico, side[key] ?? '')?.pwm),
    );
    expect(new Set(outputs.map((pwm) => JSON.stringify(pwm))).size).toBe(outputs.length);
  }
});
