/** What only some random sheets have: a controller's own settings, encoders. */
import fc from 'fast-check';
import type { Sheet } from '../../src/sheet/sheet-types.js';
import type { BoardId } from '../../src/vehicle/board-facts.js';
import { BOARDS, sheetLabel } from '../../src/vehicle/boards.js';
import type { PinPlan, PinRequest } from '../../src/vehicle/pin-plan.js';
import { decimal } from './decimal.js';
import type { Drive } from './valid-drive.js';

export interface Wiring {
  board: BoardId;
  request: PinRequest;
  plan: PinPlan;
}

/** What belongs to one kind of controller: actions by hand of a rule table, the integral part of a law. */
export function control(kind: Sheet['control']['kind'], sensorCount: number): fc.Arbitrary<Sheet['control']> {
  if (kind === 'pid') {
    const integral = fc.constantFrom('auto' as const, 'always' as const, 'never' as const);
    return fc.option(integral, { nil: undefined }).map((how) => ({ kind, ...(how && { integral: how }) }));
  }
  const action = fc
    .record({
      ends: fc.tuple(fc.nat(sensorCount - 1), fc.nat(sensorCount - 1)),
      left: decimal(-1.9, 1.9, 2),
      right: decimal(-1.9, 1.9, 2),
    })
    .map(({ ends, ...wheels }) => {
      const [first, last] = [Math.min(...ends), Math.max(...ends)];
      const state = Array.from({ length: sensorCount }, (_, i) => (i >= first && i <= last ? '1' : '0'));
      return { state: state.join(''), ...wheels };
    });
  const overrides = fc.uniqueArray(action, { minLength: 1, maxLength: 6, selector: ({ state }) => state });
  return fc
    .option(overrides, { nil: undefined })
    .map((byHand) => ({ kind, ...(byHand && { overrides: byHand }) }));
}

/** Encoders on the planned pins, of as many lines as the board can count and the loop needs. */
export function encoders(
  { board, request, plan }: Wiring,
  drive: Drive,
): fc.Arbitrary<Pick<Sheet, 'encoders'>> {
  const pins = plan.encoders;
  if (pins === undefined) return fc.constant({});
  const turnsPerS = (drive.topSpeedMps * 1000) / (Math.PI * drive.drive.wheelDiameterMm);
  const { edgeS, samplePeriodS } = BOARDS[board];
  const most = Math.min(20_000, Math.floor(0.04 / edgeS / turnsPerS));
  // an edge a sample at full speed, or what one window holds
  const windowS = Math.max(samplePeriodS, drive.drive.motor.timeConstantMs / 4000);
  const fewest = Math.max(4, Math.ceil(1.2 / windowS / turnsPerS));
  const lines = fc.integer({ min: Math.min(fewest, most), max: Math.max(fewest, most) });
  const quadrature = request.encoderChannels === 2;
  const inverted = quadrature ? fc.boolean() : fc.constant(false);
  return fc.tuple(lines, inverted, inverted).map(([linesPerTurn, left, right]) => ({
    encoders: {
      channels: quadrature ? 'quadrature' : 'single',
      linesPerTurn,
      left: { ...pins.left, ...(quadrature && { inverted: left }) },
      right: { ...pins.right, ...(quadrature && { inverted: right }) },
    },
  }));
}

/** An LED of its own on a free pin, or none. */
export function led({ board, plan }: Wiring): fc.Arbitrary<Pick<Sheet, 'led'>> {
  const used = new Set(JSON.stringify(plan).match(/[\w]+/g));
  const free = BOARDS[board].pins.filter(
    ({ label, output, reserved }) => output && reserved === undefined && !used.has(label),
  );
  if (free.length === 0) return fc.constant({});
  const own = fc.record({ pin: fc.constantFrom(...free.map(sheetLabel)), activeLow: fc.boolean() });
  return fc.option(own, { nil: undefined }).map((each) => (each ? { led: each } : {}));
}
