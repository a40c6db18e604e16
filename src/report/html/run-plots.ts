/** The plots of one run over time: lateral error, speed, wheel duties, class in force. */
import type { Lane } from '../../course/lane.js';
import { mToMm } from '../../sheet/units.js';
import { niceStep } from '../axis-steps.js';
import { least, most } from '../driven-run.js';
import { MARK } from '../svg-document.js';
import { type Curve, plotSvg, type Shade } from './plot.js';
import type { KeptTrace } from './kept-trace.js';

const HEIGHT = 150;

export interface NamedPlot {
  name: string;
  draw: (width: number) => string;
}

/** @param classNames fastest first, as classIndex counts */
export function runPlots(trace: KeptTrace, lane: Lane, classNames: readonly string[]): NamedPlot[] {
  const end = Math.max(trace.timeS.at(-1) ?? 0, 1e-3);
  const shades = bendShades(trace, lane);
  const curve = (values: ArrayLike<number>, more: Omit<Curve, 'points'> = {}): Curve => ({
    points: Array.from(trace.timeS, (t, i): [number, number] => [t, values[i]!]),
    ...more,
  });
  const make = (
    name: string,
    title: string,
    range: readonly [number, number],
    curves: readonly Curve[],
    more: { ticks?: { at: number; label: string }[]; height?: number } = {},
  ): NamedPlot => ({
    name,
    draw: (width) =>
      plotSvg({
        label: `${name} over time`,
        title,
        width,
        height: HEIGHT,
        end,
        unit: 's',
        from: range[0],
        to: range[1],
        curves,
        shades,
        ...more,
      }),
  });

  const errorMm = trace.lateralM.map(mToMm);
  const limitMm = roundUp(Math.max(most(errorMm), -least(errorMm), 1));
  const speedLimit = roundUp(Math.max(most(trace.speedMps), 0.1));
  const duties = [trace.dutyLeft, trace.dutyRight].map((duty) => duty.map((share) => 100 * share));
  const plots = [
    make('Lateral error', 'Lateral error, mm (+ left)', [-limitMm, limitMm], [curve(errorMm)]),
    make('Speed', 'Speed, m/s', [Math.min(0, least(trace.speedMps)), speedLimit], [curve(trace.speedMps)]),
    make(
      'Wheel duties',
      'Wheel duty, %',
      [-100, 100],
      [curve(duties[0]!, { label: 'left' }), curve(duties[1]!, { label: 'right', dashes: '5 3' })],
    ),
  ];
  if (trace.classIndex.some((index) => index >= 0)) {
    const ticks = classNames.map((name, i) => ({
      at: -i,
      label: name.length > 9 ? `${name.slice(0, 8)}.` : name,
    }));
    const classes = Array.from(trace.classIndex, (index) => (index < 0 ? NaN : -index));
    const range = [-Math.max(classNames.length - 1, 1) - 0.3, 0.3] as const;
    const height = Math.max(110, 50 + 18 * classNames.length);
    plots.push(
      make('Speed class', 'Speed class in force', range, [curve(classes, { isStepped: true })], {
        ticks,
        height,
      }),
    );
  }
  return plots;
}

/** The next round number of an axis. */
export function roundUp(value: number): number {
  const step = niceStep(value, 4);
  return Math.ceil(value / step - 1e-9) * step;
}

/** When the vehicle was in bends and over gaps; the tighter the bend the darker. */
function bendShades({ timeS, sM }: KeptTrace, lane: Lane): Shade[] {
  const tightest = Math.max(...lane.pieces.map((piece) => Math.abs(piece.curvaturePerM)), 1e-9);
  const shades: Shade[] = [];
  let from = 0;
  const pieceAt = (i: number): number => pieceIndex(lane, sM[i]!);
  for (let i = 1; i <= timeS.length; i++) {
    if (i < timeS.length && pieceAt(i) === pieceAt(from)) continue;
    const piece = lane.pieces[pieceAt(from)];
    const to = timeS[Math.min(i, timeS.length - 1)]!;
    if (piece?.kind === 'gap') shades.push({ from: timeS[from]!, to, opacity: 0.5, ink: MARK });
    if (piece?.kind === 'arc') {
      const opacity = (0.75 * Math.abs(piece.curvaturePerM)) / tightest;
      shades.push({ from: timeS[from]!, to, opacity });
    }
    from = i;
  }
  return shades;
}

/** Index of the piece at an arc length, m, laps counted on. */
export function pieceIndex(lane: Lane, sM: number): number {
  const lap = lane.closed ? Math.floor(sM / lane.lengthM) : 0;
  const atM = sM - lap * lane.lengthM;
  return Math.max(
    0,
    lane.pieces.findLastIndex((piece) => piece.startM <= atM),
  );
}
