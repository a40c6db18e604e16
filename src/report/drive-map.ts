/** The lane from above as SVG, as a pale band of its true width, with the driven path over it, coloured by speed. */
import type { Pose } from '../course/arc.js';
import { CROSSING_LENGTH_M } from '../course/lane-strips.js';
import type { LanePiece } from '../course/layout.js';
import { mToMm, radToDeg } from '../sheet/units.js';
import { niceStep } from './axis-steps.js';
import { extentOf, type DrivenRun } from './driven-run.js';
import { stepOf, type SpeedStep } from './speed-scale.js';
import { HALO, LOST, SHADE, WORDS } from './svg-document.js';
import { coordinate, element, pathThrough, textAt } from './svg-text.js';

/** Space around the lane for marks and their words, m. */
const BORDER_M = 0.1;
/** The same on a small map, about, px. */
const BORDER = 36;
const MOST_HEIGHT = 620;

export interface SvgPart {
  svg: string;
  height: number;
}

/** Where a point of the floor lies in a map: x px = (xM - leftM) perM, y px = (topM - yM) perM. */
export interface MapFrame {
  leftM: number;
  topM: number;
  perM: number;
}

/** @param width px; the height follows from the lane's shape */
export function driveMap(
  run: DrivenRun,
  steps: readonly SpeedStep[],
  width: number,
): SvgPart & { frame: MapFrame } {
  const { lane, trace, loss } = run;
  const extent = extentOf(run);
  const halfM = CROSSING_LENGTH_M / 2;
  const acrossM = extent.right - extent.left;
  const borderM = Math.max(BORDER_M, (BORDER * acrossM) / width);
  const widthM = acrossM + 2 * borderM;
  const heightM = extent.top - extent.bottom + 2 * borderM;
  const perM = Math.min(width / widthM, MOST_HEIGHT / heightM);
  const height = heightM * perM;
  const leftM = extent.left - borderM - (width / perM - widthM) / 2;
  const x = (xM: number): number => (xM - leftM) * perM;
  const y = (yM: number): number => (extent.top + borderM - yM) * perM;
  const beside = (pose: Pose, leftwardM: number): [number, number] => [
    x(pose.xM - leftwardM * Math.sin(pose.headingRad)),
    y(pose.yM + leftwardM * Math.cos(pose.headingRad)),
  ];
  const along = (piece: LanePiece): [number, number][] => {
    const parts = piece.kind === 'arc' ? Math.ceil((piece.lengthM * perM) / 4) : 1;
    return Array.from({ length: parts + 1 }, (_, i) =>
      // Held within the piece: at its very end the next one begins.
      beside(lane.poseAt(piece.startM + piece.lengthM * Math.min(i / parts, 1 - 1e-9)), 0),
    );
  };

  const painted = lane.pieces
    .filter((piece) => piece.kind !== 'gap')
    .map((piece) => pathThrough(along(piece)));
  const across = lane.crossings.map((crossing) =>
    pathThrough([beside(crossing, halfM), beside(crossing, -halfM)]),
  );
  const band = { fill: 'none', stroke: SHADE, 'stroke-width': Math.max(3, lane.lineWidthM * perM) };
  const parts = [
    element('path', { ...band, d: across.join('') }),
    element('path', { ...band, 'stroke-linejoin': 'round', d: painted.join('') }),
    ...speedPaths(run, steps, x, y),
    ...lane.crossings.map((crossing) => words(beside(crossing, -halfM - 14 / perM), 'crossing')),
    ...lane.pieces
      .filter((piece) => piece.kind === 'gap')
      .flatMap((gap) => {
        const middle = lane.poseAt(gap.startM + gap.lengthM / 2);
        return [words(beside(middle, -30 / perM), `gap ${mToMm(gap.lengthM).toFixed(0)} mm`)];
      }),
    startMark(lane.poseAt(0), beside, perM),
    scaleBar(perM, width, height),
  ];
  if (loss !== undefined) parts.push(...lossMark(x(loss.xM), y(loss.yM)));
  if (trace.timeS.length === 0) parts.push(textAt(width / 2, height / 2, 'nothing was driven', HALO));
  return { svg: parts.join('\n'), height, frame: { leftM, topM: extent.top + borderM, perM } };
}

/** The path cut where the speed changes from one step to another; slow parts lie over fast ones. */
function speedPaths(
  { trace }: DrivenRun,
  steps: readonly SpeedStep[],
  x: (xM: number) => number,
  y: (yM: number) => number,
): string[] {
  const strokes = steps.map((): string[] => []);
  let from = 0;
  const stepAt = (i: number): number => stepOf(steps, trace.speedMps[i]!);
  for (let i = 1; i < trace.timeS.length; i++) {
    if (i < trace.timeS.length - 1 && stepAt(i) === stepAt(from)) continue;
    const points = Array.from({ length: i - from + 1 }, (_, k): [number, number] => [
      x(trace.xM[from + k]!),
      y(trace.yM[from + k]!),
    ]);
    strokes[stepAt(from)]!.push(pathThrough(points));
    from = i;
  }
  return steps
    .map(({ color, width }, i) => {
      const d = strokes[i]!.join('');
      return element('path', {
        fill: 'none',
        stroke: color,
        'stroke-width': width,
        'stroke-linejoin': 'round',
        d,
      });
    })
    .toReversed();
}

function words([x, y]: readonly [number, number], text: string): string {
  return textAt(x, y + 4, text, { ...HALO, 'text-anchor': 'middle' });
}

/** An arrowhead in driving direction beside the start. */
function startMark(
  start: Pose,
  beside: (pose: Pose, leftwardM: number) => [number, number],
  perM: number,
): string {
  const [x, y] = beside(start, -16 / perM);
  const turn = coordinate(-radToDeg(start.headingRad));
  const head = element('path', {
    d: 'M-7 -5L7 0L-7 5Z',
    transform: `translate(${coordinate(x)} ${coordinate(y)}) rotate(${turn})`,
  });
  return `${head}\n${words(beside(start, -34 / perM), 'start')}`;
}

function lossMark(x: number, y: number): string[] {
  const d = 'M-8 -8L8 8M-8 8L8 -8';
  const transform = `translate(${coordinate(x)} ${coordinate(y)})`;
  const cross = { d, transform, fill: 'none' };
  return [
    element('path', { ...cross, stroke: '#ffffff', 'stroke-width': 7 }),
    element('path', { ...cross, stroke: LOST, 'stroke-width': 3.5 }),
    textAt(x + 13, y - 8, 'lost', { ...HALO, fill: LOST, 'font-weight': 'bold' }),
  ];
}

function scaleBar(perM: number, width: number, height: number): string {
  const lengthM = niceStep(width / perM, 6);
  const [x0, x1, y] = [width - 8 - lengthM * perM, width - 8, height - 8];
  const label = lengthM >= 1 ? `${lengthM} m` : `${Math.round(mToMm(lengthM))} mm`;
  return [
    element('path', {
      d: `M${coordinate(x0)} ${coordinate(y - 5)}V${coordinate(y)}H${coordinate(x1)}V${coordinate(y - 5)}`,
      fill: 'none',
      stroke: WORDS,
    }),
    textAt((x0 + x1) / 2, y - 7, label, { 'text-anchor': 'middle', fill: WORDS }),
  ].join('\n');
}
