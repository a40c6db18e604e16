/** Random lines and sensor bars that fit together. */
import fc from 'fast-check';
import type { Sheet } from '../../src/sheet/sheet-types.js';
import type { PinRequest } from '../../src/vehicle/pin-plan.js';
import { evenPositions, seeingReach } from '../../src/vehicle/sensor-bar.js';
import { decimal } from './decimal.js';

type Row = Pick<Sheet['sensors'], 'pitchMm' | 'positionsMm'>;

export interface Geometry {
  line: Sheet['line'];
  bar: Pick<Sheet['sensors'], 'aheadOfAxleMm' | 'spotRadiusMm'> & Row;
}

interface Spot {
  widthMm: number;
  spotRadiusMm: number;
  /** How far from a sensor it still sees the line. */
  reachMm: number;
}

/** Line and bar that fit: the line cannot hide, is narrower than the bar, and stays in view in its tightest bend. */
export function geometry(request: PinRequest, kind: Sheet['control']['kind']): fc.Arbitrary<Geometry> {
  const { sensorCount, sensorKind } = request;
  // a mixed bar is judged by its digital sensors
  const share = sensorKind === 'analog' && kind === 'pid' ? 0.25 : 0.5;
  return decimal(8, 50)
    .chain((widthMm) =>
      decimal(0.5, Math.min(10, widthMm / 2)).map((spotRadiusMm): Spot => {
        return { widthMm, spotRadiusMm, reachMm: seeingReach(widthMm, spotRadiusMm, share) ?? 0 };
      }),
    )
    .chain((spot) => row(sensorCount, spot).chain((positions) => around(spot, positions)));
}

/** Sensors close enough together that the line cannot hide, the bar wide enough for the line not to cover it. */
function row(
  count: number,
  { widthMm, spotRadiusMm, reachMm }: Spot,
): fc.Arbitrary<Row & { outermostMm: number }> {
  const widest = Math.min(30, 2 * reachMm) - 0.1;
  const narrowest = Math.min(Math.max(3, (widthMm - 2 * spotRadiusMm) / (count - 1) + 0.1), widest - 0.1);
  return decimal(narrowest, widest).chain((pitchMm) => {
    const even = evenPositions(count, pitchMm);
    const evenRow = fc.constant({ pitchMm, outermostMm: even[0] ?? 0 });
    // Every sensor up to a fifth of the free room aside: closer than 3 mm or farther than `widest` none gets.
    const room = Math.min(pitchMm - 3, widest - pitchMm) / 5;
    const shifts = fc.array(fc.double({ min: -1, max: 1, noNaN: true }), {
      minLength: count,
      maxLength: count,
    });
    const unevenRow = shifts.map((list) => {
      const positionsMm = even.map((x, index) => Math.round((x + room * (list[index] ?? 0)) * 100) / 100);
      return { positionsMm, outermostMm: Math.min(positionsMm[0] ?? 0, -(positionsMm.at(-1) ?? 0)) };
    });
    return fc.oneof({ weight: 2, arbitrary: evenRow }, { weight: 1, arbitrary: unevenRow });
  });
}

/** Bends and gaps that such a row can follow, and where it sits. */
function around(
  spot: Spot,
  { outermostMm, ...place }: Row & { outermostMm: number },
): fc.Arbitrary<Geometry> {
  const { widthMm, spotRadiusMm, reachMm } = spot;
  const seenMm = outermostMm + reachMm;
  const ahead = decimal(15, Math.max(16, Math.min(400, 6 * seenMm)));
  return fc.tuple(ahead, decimal(1.02, 6, 2)).chain(([aheadOfAxleMm, slack]) => {
    const tightest =
      seenMm >= aheadOfAxleMm ? aheadOfAxleMm : (aheadOfAxleMm ** 2 + seenMm ** 2) / (2 * seenMm);
    const longestGap = Math.min(300, Math.floor(seenMm / Math.tan(Math.PI / 30)));
    return fc.record({
      line: fc.record({
        polarity: fc.constantFrom<Sheet['line']['polarity']>('light-on-dark', 'dark-on-light'),
        widthMm: fc.constant(widthMm),
        tightestRadiusMm: fc.constant(Math.min(5000, Math.ceil(Math.max(40, widthMm, tightest) * slack))),
        longestGapMm: fc.oneof(fc.constant(0), decimal(0, longestGap)),
        crossings: fc.boolean(),
      }),
      bar: fc.constant({ aheadOfAxleMm, spotRadiusMm, ...place }),
    });
  });
}
