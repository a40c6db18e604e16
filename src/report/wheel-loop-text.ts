/** The wheel loop as a person reads it. */
import type { WheelLoopDesign } from '../design/wheel-loop-design.js';
import { WHEEL_MARGINS } from '../design/wheel-loop-design.js';
import { sToMs } from '../sheet/units.js';
import { table } from './text-table.js';

/** Paragraphs about the wheel loop; none without encoders. */
export function wheelLoopLines(design: WheelLoopDesign | undefined): string[] {
  if (design === undefined) return [];
  const { windowSamples, edgesAtTop, delayS, closedLoopTimeS, gain, integralTimeS, margins, worstMargins } =
    design;
  const told = ({ gainMargin, phaseMarginDeg, ms }: typeof margins) =>
    `GM ${gainMargin.toFixed(1)}, PM ${phaseMarginDeg.toFixed(0)} deg, Ms ${ms.toFixed(2)}`;
  const rows = [
    [
      'edges counted over',
      `${windowSamples} samples`,
      `${edgesAtTop.toFixed(0)} edges at full speed: steps of ${(100 / edgesAtTop).toFixed(1)} %`,
    ],
    ['delay', `${sToMs(delayS).toFixed(1)} ms`, 'command and half the window'],
    ['closed-loop time', `${sToMs(closedLoopTimeS).toFixed(1)} ms`, 'the quickest that keeps the margins'],
    ['gain', gain.toFixed(2), 'SIMC: lag / (closed-loop time + delay)'],
    ['integral time', `${sToMs(integralTimeS).toFixed(0)} ms`, 'and tracking time of the anti-windup'],
    ['nominal', told(margins), ''],
    ['worst corner', told(worstMargins), `required ${told(WHEEL_MARGINS)}`],
  ];
  return ['Wheel loop: PI on top of the command, by the encoders', table(rows)];
}
