/**
 * Random sound build sheets over the whole plausible range: boards, sensors, schemes, geometry, calibration, motors, controllers.
 *
 * Values are drawn so that they fit together, by the same geometry as the rules; what still does not pass the check is filtered
 * out, which is seldom the case (valid-sheets.test.ts).
 */
import fc from 'fast-check';
import { checkSheet } from '../../src/sheet/check.js';
import { usualKinds } from '../../src/sheet/sensor-kinds.js';
import type { Sheet } from '../../src/sheet/sheet-types.js';
import { BOARDS, BOARD_IDS } from '../../src/vehicle/boards.js';
import type { DriverSchemeId } from '../../src/vehicle/drivers.js';
import { proposePins, type PinRequest } from '../../src/vehicle/pin-plan.js';
import { decimal } from './decimal.js';
import { control, encoders, led, type Wiring } from './valid-extras.js';
import { drive } from './valid-drive.js';
import { geometry } from './valid-geometry.js';

/** Channels of each wheel's encoder; none as often as some. */
const ENCODER_CHANNELS = [0, 1, 2];

const SCHEMES: readonly DriverSchemeId[] = ['pwm-dir', 'pwm-in-in', 'dual-pwm'];

type Kinds = Pick<PinRequest, 'sensorKind' | 'sensorKinds'>;

/** Kinds of the sensors of a bar, by their number: all alike, or mixed in several ways. */
const BAR_KINDS: readonly ((count: number) => Kinds)[] = [
  () => ({ sensorKind: 'analog' }),
  () => ({ sensorKind: 'digital' }),
  (count) => ({ sensorKind: 'mixed', sensorKinds: usualKinds(count) }),
  (count) => mixedBar(count, (place) => place % 2 === 1),
  (count) => mixedBar(count, (place) => place >= Math.floor(count / 2)),
];

function mixedBar(count: number, isDigital: (place: number) => boolean): Kinds {
  const sensorKinds = Array.from({ length: count }, (_, place) => (isDigital(place) ? 'digital' : 'analog'));
  return { sensorKind: 'mixed', sensorKinds };
}

/** Every wiring that the boards allow; every encoder where there is room for one. */
const WIRINGS: readonly Wiring[] = BOARD_IDS.flatMap((board) =>
  SCHEMES.flatMap((scheme) =>
    BAR_KINDS.flatMap((kindsOf) =>
      [false, ...(scheme === 'pwm-in-in' ? [true] : [])].flatMap((standby) =>
        Array.from({ length: 15 * ENCODER_CHANNELS.length }, (_, index): PinRequest => ({
          ...kindsOf((index % 15) + 2),
          sensorCount: (index % 15) + 2,
          scheme,
          standby,
          encoderChannels: ENCODER_CHANNELS[Math.floor(index / 15)]!,
          stopInput: index % 2 === 1,
        })).flatMap((request) => {
          const plan = proposePins(board, request);
          return 'sensorPins' in plan ? [{ board, request, plan }] : [];
        }),
      ),
    ),
  ),
);

/** Bars of every length are drawn equally often, though few boards take long analog ones. */
const wiring: fc.Arbitrary<Wiring> = fc
  .constantFrom(...BOARD_IDS)
  .chain((board) => fc.constantFrom(...WIRINGS.filter((each) => each.board === board)));

/** Readings with contrast, all to the same side; or none, for a sweep. */
function calibration({ board, request }: Wiring): fc.Arbitrary<Pick<Sheet['sensors'], 'calibration'>> {
  if (request.sensorKind === 'digital') return fc.constant({});
  const count = request.sensorKinds?.filter((kind) => kind === 'analog').length ?? request.sensorCount;
  const full = BOARDS[board].adcMaxCount;
  const list = (min: number, max: number): fc.Arbitrary<number[]> =>
    fc.array(fc.integer({ min, max }), { minLength: count, maxLength: count });
  const readings = fc
    .integer({ min: Math.ceil(0.15 * full), max: Math.floor(0.85 * full) })
    .chain((middle) => {
      const margin = Math.ceil(0.05 * full) + 1;
      return fc.tuple(list(0, middle - margin), list(middle + margin, full), fc.boolean());
    })
    .map(([low, high, swap]) => (swap ? { ground: high, line: low } : { ground: low, line: high }));
  const mode = fc.constantFrom('stored' as const, 'sweep' as const);
  // of a mixed bar only readings are sure to fit: a sweep asks for analog sensors beside the line
  const weight = request.sensorKind === 'mixed' ? 6 : 1;
  return fc.oneof(
    {
      weight,
      arbitrary: fc
        .tuple(weight > 1 ? fc.constant('stored' as const) : mode, readings)
        .map(([how, lists]) => ({ calibration: { mode: how, ...lists } })),
    },
    fc.constantFrom({ calibration: { mode: 'sweep' as const } }, {}),
  );
}

function speeds(radiusMm: number, topSpeedMps: number): fc.Arbitrary<Sheet['speeds']> {
  const finishTargetPercent = decimal(80, 99.9);
  const inTurn = (minRadiusMm: number, turnDeg: number) => ({
    sharpness: { turnDeg, withinMm: Math.floor((minRadiusMm * turnDeg * Math.PI) / 180) },
  });
  const byHand = fc.array(decimal(0.1, 0.9, 2), { minLength: 1, maxLength: 5 }).map((shares) =>
    shares
      .sort((a, b) => a - b)
      .map((share, index) => ({
        share,
        index,
        minRadiusMm: Math.max(40, Math.floor(radiusMm)) * (index + 1),
      }))
      .map(({ share, index, minRadiusMm }) => ({
        name: `class ${index + 1}`,
        // every other class tells its bends by sharpness
        ...(index % 2 === 0 ? { minRadiusMm } : inTurn(minRadiusMm, 90)),
        speedMps: Math.max(0.02, Math.round(share * topSpeedMps * 1000) / 1000),
      })),
  );
  return fc.record({ classes: fc.oneof(fc.constant('auto' as const), byHand), finishTargetPercent });
}

/** Sheets as drawn, nearly all of them sound; use `validSheets`. */
export const sheetCandidates: fc.Arbitrary<Sheet> = fc
  .tuple(wiring, fc.constantFrom<Sheet['control']['kind']>('pid', 'rules'))
  .chain(([wired, kind]) =>
    fc.tuple(
      fc.constant(wired),
      control(kind, wired.request.sensorCount),
      geometry(wired.request, kind),
      calibration(wired),
      drive,
    ),
  )
  .chain(([wired, controlled, { line, bar }, calibrated, driven]) => {
    const { board, request, plan } = wired;
    const { drive: vehicle, power, topSpeedMps } = driven;
    const inverted = fc.boolean();
    return fc
      .record({
        name: fc.stringMatching(/^[A-Za-z][A-Za-z0-9_-]{0,39}$/),
        speeds: speeds(line.tightestRadiusMm, topSpeedMps),
        lineLevel: fc.constantFrom<'high' | 'low'>('high', 'low'),
        inverted: fc.tuple(inverted, inverted),
        encoded: encoders(wired, driven),
        lit: led(wired),
        countdownS: decimal(0, 5),
        runLimitS: fc.integer({ min: 1, max: 3600 }),
        tolerances: fc.record({
          motorGainPercent: fc.integer({ min: 0, max: 20 }),
          timeConstantPercent: fc.integer({ min: 0, max: 50 }),
          gripPercent: fc.integer({ min: 0, max: 40 }),
        }),
      })
      .map((rest): Sheet => ({
        sheetVersion: 1,
        name: rest.name,
        target: { board, language: BOARDS[board].language },
        line,
        sensors: {
          kind: request.sensorKind,
          ...(request.sensorKinds && { kinds: [...request.sensorKinds] }),
          count: request.sensorCount,
          ...bar,
          pins: plan.sensorPins,
          ...(request.sensorKind !== 'analog' ? { lineLevel: rest.lineLevel } : {}),
          ...calibrated,
        },
        drive: {
          ...vehicle,
          driver: {
            scheme: request.scheme,
            ...plan.driver,
            left: { ...plan.driver.left, inverted: rest.inverted[0] },
            right: { ...plan.driver.right, inverted: rest.inverted[1] },
          },
        },
        power,
        ...rest.encoded,
        ...rest.lit,
        control: controlled,
        speeds: rest.speeds,
        start: { buttonPin: plan.buttonPin, countdownS: rest.countdownS, runLimitS: rest.runLimitS },
        ...(plan.stopPin !== undefined && { stopPin: plan.stopPin }),
        telemetry: { mode: 'off' },
        tolerances: rest.tolerances,
      }));
  });

/** Random sound sheets. */
export const validSheets: fc.Arbitrary<Sheet> = sheetCandidates.filter(
  (sheet) => checkSheet(sheet).sheet !== undefined,
);
