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
import { coordinate, element, escaped, textAt } from './svg-text.js';

const WIDTH = 960;
const MARGIN = 24;
const INNER = WIDTH - 2 * MARGIN;
const WORDS = '#4a463c';

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
  const height = plotTop + plot.height + MARGIN;
  const at = (y: number, content: string): string => {
    return element('g', { transform: `translate(${MARGIN} ${coordinate(y)})` }, `\n${content}\n`);
  };
  const parts = [
    element('title', {}, escaped(text.title)),
    element(
      'desc',
      {},
      escaped(`${text.summary}. The path is darker and broader where the vehicle was slower.`),
    ),
    element('rect', { width: WIDTH, height, fill: '#ffffff' }),
    textAt(MARGIN, 38, text.title, { 'font-size': '20', 'font-weight': 'bold', fill: WORDS }),
    textAt(MARGIN, 60, text.summary, { 'font-size': '14', fill: WORDS }),
    at(70, speedLegend(steps)),
    at(mapTop, map.svg),
    at(plotTop, plot.svg),
  ];
  const root = {
    xmlns: 'http://www.w3.org/2000/svg',
    viewBox: `0 0 ${WIDTH} ${coordinate(height)}`,
    width: WIDTH,
    height,
    role: 'img',
    'font-family': "system-ui, 'Helvetica Neue', Arial, 'DejaVu Sans', sans-serif",
    'font-size': '12',
  };
  return `${element('svg', root, `\n${parts.join('\n')}\n`)}\n`;
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
