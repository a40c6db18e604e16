/** One run: where it drove, how it went over time, and the same as a table. */
import type { Lane } from '../../course/lane.js';
import { mToMm } from '../../sheet/units.js';
import { driveMap } from '../drive-map.js';
import { most } from '../driven-run.js';
import { pieceWords, runSummary } from '../rehearsal-text.js';
import { speedSteps, type SpeedStep } from '../speed-scale.js';
import { element } from '../svg-text.js';
import { keptTrace, traceColumns, type KeptTrace } from './kept-trace.js';
import { details, markup, raw, tableOf, type Raw } from './markup.js';
import type { ReportData, ShownRun } from './report-data.js';
import { pieceIndex, runPlots } from './run-plots.js';
import { inTwoWidths } from './two-widths.js';

export function runSection({ lane, design, report }: ReportData, { why, result }: ShownRun, at: number): Raw {
  const { kept, every } = keptTrace(result.trace);
  const steps = speedSteps(result.trace.speedMps);
  const summary = runSummary(result, report.engine, report.boundLapS);
  const classNames = design.classes.map(({ name }) => name);
  const plots = runPlots(kept, lane, classNames).map(({ name, draw }) => {
    return raw(markup`<div class="plot" data-name="${name}">${inTwoWidths(draw)}</div>`);
  });
  const data = {
    ...traceColumns(kept),
    classes: classNames,
    lapMm: lane.closed ? mToMm(lane.lengthM) : 0,
    pieces: lane.pieces.map((piece) => [Math.round(mToMm(piece.startM)), pieceWords(piece)]),
  };
  const thinning =
    every === 1
      ? 'Every recorded sample is drawn'
      : `Of the recorded samples one in ${every} and the last are drawn`;
  return raw(
    markup`<section class="run" id="run-${at}" aria-labelledby="run-${at}-head">
      <h3 id="run-${at}-head">Seed ${result.seed}: ${why}</h3>
      <p>${summary}.</p>
      <p class="readout" aria-hidden="true">
        Point at a plot, or go to one with Tab and use the arrow keys: all plots and the map show the same
        moment.
      </p>
      ${legend(steps)}
      <div class="map">
        ${inTwoWidths((width) => mapSvg({ lane, trace: { ...result.trace, ...kept }, ...lossOf(result) }, steps, width, summary))}
      </div>
      ${plots}
      <p class="small">
        Shaded: bends, the darker the tighter; blue: gaps. ${thinning}; the figures in words are from all.
      </p>
      ${details('The same as a table, piece by piece of the lane', pieceTable(kept, lane, result.seed))}
      <script type="application/json" class="run-data">
        ${raw(json(data))}
      </script>
    </section>`,
  );
}

function lossOf({ loss }: ShownRun['result']) {
  return loss === undefined ? {} : { loss };
}

/** JSON that can stand in a script element: no "<" begins a tag in it. */
export function json(data: unknown): string {
  return JSON.stringify(data)
    .replaceAll('<', '\\u003c')
    .replaceAll('\u2028', '\\u2028')
    .replaceAll('\u2029', '\\u2029');
}

function mapSvg(
  run: Parameters<typeof driveMap>[0],
  steps: readonly SpeedStep[],
  width: number,
  summary: string,
): string {
  const { svg, height, frame } = driveMap(run, steps, width);
  const { leftM, topM, perM } = frame;
  const kept = `data-left="${mToMm(leftM).toFixed(2)}" data-top="${mToMm(topM).toFixed(2)}" data-per="${(perM / mToMm(1)).toFixed(6)}"`;
  const marker = `<g class="marker" ${kept} visibility="hidden"><circle r="9" fill="none" stroke="#ffffff" stroke-width="6"/><circle r="9" fill="none" stroke="#a3161f" stroke-width="3"/></g>`;
  const label = `Map of the lane with the driven path, darker and broader where slower. ${summary}`;
  const box = {
    viewBox: `0 0 ${width} ${height.toFixed(1)}`,
    width,
    height,
    role: 'img',
    'aria-label': label,
  };
  return element('svg', box, `\n${svg}\n${marker}\n`);
}

function legend(steps: readonly SpeedStep[]): Raw {
  const items = steps.map(({ color, width, label }) => {
    const line = element('path', { d: 'M0 5h30', stroke: color, 'stroke-width': width, fill: 'none' });
    const svg = element('svg', { viewBox: '0 0 30 10', width: 30, height: 10, 'aria-hidden': 'true' }, line);
    return raw(markup`<li>${raw(svg)} ${label}</li>`);
  });
  return raw(
    markup`<p class="legend-head">Speed, m/s (slower is broader)</p>
      <ul class="legend">
        ${items}
      </ul>`,
  );
}

/** A row for each piece of the lane in each lap. */
function pieceTable(trace: KeptTrace, lane: Lane, seed: number): Raw {
  const rows: (string | number)[][] = [];
  let from = 0;
  for (let i = 1; i <= trace.timeS.length; i++) {
    if (i < trace.timeS.length && pieceIndex(lane, trace.sM[i]!) === pieceIndex(lane, trace.sM[from]!))
      continue;
    const piece = lane.pieces[pieceIndex(lane, trace.sM[from]!)];
    const error = mToMm(most(trace.lateralM.subarray(from, i).map(Math.abs)));
    const speeds = trace.speedMps.subarray(from, i);
    rows.push([
      trace.timeS[from]!.toFixed(2),
      trace.sM[from]!.toFixed(2),
      piece === undefined ? '' : pieceWords(piece),
      error.toFixed(1),
      (speeds.reduce((sum, speed) => sum + speed, 0) / speeds.length).toFixed(2),
    ]);
    from = i;
  }
  const head = ['from, s', 'from, m', 'piece', 'greatest error, mm', 'mean speed, m/s'];
  return tableOf(`Seed ${seed}, piece by piece`, head, rows);
}
