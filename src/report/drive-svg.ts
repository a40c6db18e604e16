/**
 * One run as a picture: the lane with the driven path, coloured by speed, and the lateral error below it.
 *
 * Written as plain SVG, not by a charting library: the map needs one scale for both axes and line widths to that scale, and the
 * same run must give the same bytes.
 */
import { driveMap } from './drive-map.js';
import type { DrivenRun } from './driven-run.js';
import { errorPlot } from './error-plot.js';
import { speedSteps, type SpeedStep } from './speed-scale.js';
import { groupAt, MARGIN, svgDocument, WIDTH, WORDS } from './svg-document.js';
import { element, textAt } from './svg-text.js';

const INNER = WIDTH - 2 * MARGIN;

export interface DriveSvgText {
  title: string;
  /** One line below the title: what came out. */
  summary: string;
}

/** The picture as an SVG document. */
export function driveSvg(run: DrivenRun, text: DriveSvgText): string {
  const steps = speedSteps(run.trace.speedMps);
  const map = driveMap(run, steps, INNER);
  const plot = errorPlot(run, INNER);
  const mapTop = 108;
  const plotTop = mapTop + map.height + 28;
  return svgDocument({
    ...text,
    description: `${text.summary}. The path is darker and broader where the vehicle was slower.`,
    height: plotTop + plot.height + MARGIN,
    fontSize: 12,
    parts: [
      groupAt(MARGIN, 70, speedLegend(steps)),
      groupAt(MARGIN, mapTop, map.svg),
      groupAt(MARGIN, plotTop, plot.svg),
    ],
  });
}

function speedLegend(steps: readonly SpeedStep[]): string {
  const words = textAt(0, 18, 'Speed, m/s', { fill: WORDS, 'font-weight': 'bold' });
  const entries = steps.map(({ color, width, label }, i) => {
    const x = 90 + i * 130;
    const line = element('path', { d: `M${x} 14h34`, fill: 'none', stroke: color, 'stroke-width': width });
    return `${line}\n${textAt(x + 42, 18, label, { fill: WORDS })}`;
  });
  return [words, ...entries].join('\n');
}
