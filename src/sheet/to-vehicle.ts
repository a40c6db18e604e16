/** From a checked sheet to the vehicle in SI units. The last place where millimetres, percent and rpm occur. */
import type { BoardFacts, PinFacts } from '../vehicle/board-facts.js';
import { BOARDS, findPin } from '../vehicle/boards.js';
import type { EncoderWiring, Encoders } from '../vehicle/encoder.js';
import { DRIVERS } from '../vehicle/drivers.js';
import type { MotorWiring, Vehicle } from '../vehicle/vehicle.js';
import type { ResolvedSheet } from './defaults.js';
import { positionsOf } from './positions.js';
import { analogPlaces, kindsOf } from './sensor-kinds.js';
import { topSpeedMps } from './top-speed.js';
import { typicalReadings } from './typical-readings.js';
import { khzToHz, mmToM, msToS, percentToFraction } from './units.js';

/**
 * The vehicle that a sheet describes.
 *
 * `sheet` has passed `checkSheet`; on any other an Error is thrown, which is then a defect of ours. Speed classes come out
 * tightest first. A digital sensor reads 0 over ground and 1 over the line, beside analog ones full scale, whatever its level.
 */
export function toVehicle(sheet: ResolvedSheet): Vehicle {
  const board = BOARDS[sheet.target.board];
  const { line, drive, speeds, start, tolerances } = sheet;
  return {
    name: sheet.name,
    board,
    language: board.language,
    line: {
      polarity: line.polarity,
      widthM: mmToM(line.widthMm),
      tightestRadiusM: mmToM(line.tightestRadiusMm),
      longestGapM: mmToM(line.longestGapMm),
      crossings: line.crossings,
    },
    bar: barOf(sheet, board),
    drive: {
      trackM: mmToM(drive.trackWidthMm),
      wheelDiameterM: mmToM(drive.wheelDiameterMm),
      massKg: drive.massKg,
      grip: drive.gripCoefficient,
      topSpeedMps: topSpeedMps(sheet),
      lagS: msToS(drive.motor.timeConstantMs),
      startDuty: percentToFraction(drive.motor.startDutyPercent),
      stallCurrentA: drive.motor.stallCurrentA,
      windingOhm: drive.motor.ratedVoltageV / drive.motor.stallCurrentA,
      ...wiringOf(sheet, board),
      maxPwmHz: khzToHz(drive.driver.maxPwmKhz),
      trimLeft: percentToFraction(drive.trim.leftPercent),
      trimRight: percentToFraction(drive.trim.rightPercent),
    },
    ...(sheet.encoders && { encoders: encodersOf(sheet.encoders, board) }),
    ...(sheet.led && { led: { pin: pinOf(board, sheet.led.pin), activeLow: sheet.led.activeLow } }),
    ...(sheet.stopPin !== undefined && { stopInput: pinOf(board, sheet.stopPin) }),
    power: { ...sheet.power },
    control: controlOf(sheet.control),
    speeds: {
      classes: classesOf(speeds.classes),
      finishTarget: percentToFraction(speeds.finishTargetPercent),
    },
    start: {
      button: pinOf(board, start.buttonPin),
      countdownS: start.countdownS,
      runLimitS: start.runLimitS,
    },
    tolerance: {
      motorGain: percentToFraction(tolerances.motorGainPercent),
      lag: percentToFraction(tolerances.timeConstantPercent),
      grip: percentToFraction(tolerances.gripPercent),
    },
  };
}

function pinOf(board: BoardFacts, label: number | string): PinFacts {
  const pin = findPin(board, label);
  if (pin === undefined) throw new Error(`${board.title} has no pin ${label}; the sheet was not checked`);
  return pin;
}

function barOf(sheet: ResolvedSheet, board: BoardFacts): Vehicle['bar'] {
  const { sensors } = sheet;
  const positions = positionsOf(sheet);
  if (positions === undefined)
    throw new Error('the sensor positions are contradictory; the sheet was not checked');
  return {
    kind: sensors.kind,
    kinds: kindsOf(sensors),
    positionsM: positions.map(mmToM),
    aheadM: mmToM(sensors.aheadOfAxleMm),
    spotRadiusM: mmToM(sensors.spotRadiusMm),
    pins: sensors.pins.map((label) => pinOf(board, label)),
    lineLevel: sensors.lineLevel,
    calibration: calibrationOf(sheet, board),
  };
}

function calibrationOf(sheet: ResolvedSheet, board: BoardFacts): Vehicle['bar']['calibration'] {
  const { kind, count, calibration } = sheet.sensors;
  const places = analogPlaces(sheet.sensors);
  const all = (reading: number): number[] => Array.from({ length: count }, () => reading);
  if (kind === 'digital') return { mode: 'stored', ground: all(0), line: all(1) };
  // a list of the sheet holds the analog sensors' readings only
  const placed = (readings: readonly number[], level: number): number[] => {
    const whole = all(level);
    places.forEach((place, i) => (whole[place] = readings[i] ?? level));
    return whole;
  };
  const typical = typicalReadings(board, sheet.line.polarity);
  return {
    mode: calibration.mode,
    ground: placed(calibration.ground ?? all(typical.ground), 0),
    line: placed(calibration.line ?? all(typical.line), board.adcMaxCount),
  };
}

function wiringOf(
  sheet: ResolvedSheet,
  board: BoardFacts,
): Pick<Vehicle['drive'], 'scheme' | 'left' | 'right' | 'standby'> {
  const { driver } = sheet.drive;
  const side = (pins: ResolvedSheet['drive']['driver']['left']): MotorWiring => {
    const wiring: MotorWiring = { inverted: pins.inverted };
    for (const { key } of DRIVERS[driver.scheme].motorPins) {
      const label = pins[key];
      if (label !== undefined) wiring[key] = pinOf(board, label);
    }
    return wiring;
  };
  return {
    scheme: driver.scheme,
    left: side(driver.left),
    right: side(driver.right),
    ...(driver.standbyPin === undefined ? {} : { standby: pinOf(board, driver.standbyPin) }),
  };
}

function encodersOf(encoders: NonNullable<ResolvedSheet['encoders']>, board: BoardFacts): Encoders {
  const single = encoders.channels === 'single';
  const side = ({ a, b, inverted }: (typeof encoders)['left']): EncoderWiring => ({
    a: pinOf(board, a),
    ...(b !== undefined && !single && { b: pinOf(board, b) }),
    inverted: inverted ?? false,
  });
  return {
    linesPerTurn: encoders.linesPerTurn,
    left: side(encoders.left),
    right: side(encoders.right),
    single,
  };
}

function classesOf(classes: ResolvedSheet['speeds']['classes']): Vehicle['speeds']['classes'] {
  if (classes === 'auto') return classes;
  return classes
    .map(({ name, minRadiusMm, speedMps }) => ({ name, minRadiusM: mmToM(minRadiusMm), speedMps }))
    .sort((a, b) => a.minRadiusM - b.minRadiusM);
}

function controlOf({
  kind,
  stateMemory,
  swingMm,
  gains,
  integral,
  overrides,
}: ResolvedSheet['control']): Vehicle['control'] {
  return {
    kind,
    stateMemory,
    swingM: mmToM(swingMm),
    ...(gains && {
      gains: {
        proportionalPerM2: gains.proportionalPerM2,
        derivativeTimeS: msToS(gains.derivativeTimeMs),
        filterTimeS: msToS(gains.filterTimeMs),
        ...(gains.integralDistanceMm !== undefined && { integralDistanceM: mmToM(gains.integralDistanceMm) }),
      },
    }),
    ...(integral !== undefined && integral !== 'auto' && { integral }),
    ...(overrides && {
      overrides: overrides.map(({ state, left, right }) => ({
        first: state.indexOf('1'),
        last: state.lastIndexOf('1'),
        left,
        right,
      })),
    }),
  };
}
