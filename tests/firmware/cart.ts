/** A hand-made vehicle, for tests that need a design without a sheet. */
import { deriveDesign } from '../../src/design/derive.js';
import type { Design } from '../../src/design/design.js';
import { BOARDS, findPin } from '../../src/vehicle/boards.js';
import type { BoardFacts, PinFacts } from '../../src/vehicle/board-facts.js';
import type { Vehicle } from '../../src/vehicle/vehicle.js';

export const SHEET = { digest: '0'.repeat(64) };

export function pin(board: BoardFacts, label: string | number): PinFacts {
  const found = findPin(board, label);
  if (found === undefined) throw new Error(`${board.id} has no pin ${label}.`);
  return found;
}

/** The demo cart on an Uno: analog bar of six, pwm-in-in, stored calibration. */
export function trayCart(): Vehicle {
  const board = BOARDS.uno;
  const at = (label: string | number) => pin(board, label);
  return {
    name: 'tray-cart',
    board,
    language: 'arduino',
    line: {
      polarity: 'light-on-dark',
      widthM: 0.019,
      tightestRadiusM: 0.12,
      longestGapM: 0.04,
      crossings: true,
    },
    bar: {
      kind: 'analog',
      positionsM: [0.025, 0.015, 0.005, -0.005, -0.015, -0.025],
      aheadM: 0.075,
      spotRadiusM: 0.004,
      pins: ['A0', 'A1', 'A2', 'A3', 'A4', 'A5'].map(at),
      lineLevel: 'high',
      calibration: { mode: 'stored', ground: Array(6).fill(123), line: Array(6).fill(839) },
    },
    drive: {
      trackM: 0.12,
      wheelDiameterM: 0.042,
      massKg: 0.6,
      grip: 0.7,
      topSpeedMps: 1.4998,
      lagS: 0.08,
      startDuty: 0.1,
      stallCurrentA: 1.2,
      scheme: 'pwm-in-in',
      left: { pwm: at(5), in1: at(7), in2: at(8), inverted: false },
      right: { pwm: at(6), in1: at(9), in2: at(10), inverted: false },
      trimLeft: 1,
      trimRight: 1,
    },
    power: { nominalV: 6, fullV: 6.6, emptyV: 5.2 },
    control: { kind: 'pid' },
    speeds: { classes: 'auto', finishTarget: 0.995 },
    start: { button: at(2), countdownS: 0.5, runLimitS: 120 },
    tolerance: { motorGain: 0.07, lag: 0.35, grip: 0.2 },
  };
}

export function designOf(change: (vehicle: Vehicle) => void = () => undefined): Design {
  const vehicle = trayCart();
  change(vehicle);
  return deriveDesign(vehicle);
}
