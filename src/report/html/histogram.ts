/** Lap times as columns. */
import { niceStep } from '../axis-steps.js';
import { least, most } from '../driven-run.js';
import { INK, SHADE, WORDS } from '../svg-document.js';
import { element, textAt } from '../svg-text.js';
import { details, markup, raw, tableOf, type Raw } from './markup.js';
import { inTwoWidths } from './two-widths.js';

const HEIGHT = 150;
const BOTTOM = 24;
const TOP = 28;
const SIDE = 24;
/** Least width of a column, s: lap times are told to hundredths. */
const LEAST_STEP_S = 0.01;

interface Column {
  fromS: number;
  toS: number;
  runs: number;
}

/** Columns of a round width that cover the laps, s. */
export function columnsOf(lapsS: readonly number[]): Column[] {
  const range = most(lapsS) - least(lapsS);
  const step = Math.max(LEAST_STEP_S, niceStep(Math.max(range, LEAST_STEP_S), 16));
  const first = Math.floor(least(lapsS) / step + 1e-9);
  const count = Math.floor(most(lapsS) / step + 1e-9) - first + 1;
  const columns = Array.from({ length: count }, (_, i): Column => {
    return { fromS: (first + i) * step, toS: (first + i + 1) * step, runs: 0 };
  });
  for (const lap of lapsS)
    columns[Math.min(count - 1, Math.max(0, Math.floor(lap / step + 1e-9) - first))]!.runs++;
  return columns;
}

export function histogram(lapsS: readonly number[]): Raw {
  const columns = columnsOf(lapsS);
  const highest = most(columns.map(({ runs }) => runs));
  const label = `Lap times of ${lapsS.length} finished runs, from ${least(lapsS).toFixed(2)} to ${most(lapsS).toFixed(2)} s`;
  const draw = (width: number): string => {
    const per = (width - 2 * SIDE) / columns.length;
    const every = Math.ceil(54 / per);
    const parts = columns.flatMap(({ fromS, runs }, i) => {
      const height = (runs / highest) * (HEIGHT - TOP - BOTTOM);
      const box = { x: SIDE + i * per + 0.5, y: HEIGHT - BOTTOM - height, width: per - 1, height };
      const middle = { 'text-anchor': 'middle', fill: WORDS };
      return [
        element('rect', { ...box, fill: SHADE, stroke: INK, 'stroke-width': 0.8 }),
        ...(runs > 0 ? [textAt(box.x + per / 2, box.y - 4, String(runs), middle)] : []),
        ...(i % every === 0 ? [textAt(SIDE + i * per, HEIGHT - 7, fromS.toFixed(2), middle)] : []),
      ];
    });
    return element(
      'svg',
      { viewBox: `0 0 ${width} ${HEIGHT}`, width, height: HEIGHT, role: 'img', 'aria-label': label },
      parts.join('\n'),
    );
  };
  const rows = columns
    .filter(({ runs }) => runs > 0)
    .map(({ fromS, toS, runs }) => [fromS.toFixed(2), toS.toFixed(2), runs]);
  return raw(
    markup`<h3>Lap times, s</h3>
      <p>${label}; one lap a run, the median of its flying ones.</p>
      ${inTwoWidths(draw)}
      ${details('Lap times as a table', tableOf('Lap times', ['from, s', 'below, s', 'runs'], rows))}`,
  );
}
