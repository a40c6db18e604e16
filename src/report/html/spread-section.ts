/** All runs together: error over the lane as a band, lap times, those that were lost, and the list. */
import type { RunRecord } from '../../rehearsal/metrics.js';
import { mToMm } from '../../sheet/units.js';
import { least, most } from '../driven-run.js';
import { placeWords, REASONS } from '../rehearsal-text.js';
import { STRETCHES } from './error-band.js';
import { histogram } from './histogram.js';
import { details, exactly, lines, markup, raw, tableOf, type Raw } from './markup.js';
import { plotSvg } from './plot.js';
import { repeatCommand } from './repeat-command.js';
import type { ReportData } from './report-data.js';
import { roundUp } from './run-plots.js';
import { json } from './run-section.js';
import { inTwoWidths } from './two-widths.js';

/** Runs that are listed one by one; lost ones come first. */
const MOST_LISTED = 200;
const MOST_LOST = 50;

export function spreadSection(data: ReportData): Raw {
  const laps = data.report.list.flatMap((run) => (run.finished && run.lapS !== null ? [run.lapS] : []));
  return raw(
    markup`<section id="spread" aria-labelledby="spread-head">
      <h2 id="spread-head">Spread of the runs</h2>
      ${errorBand(data)} ${laps.length > 1 ? histogram(laps) : raw('')}
      ${details('All runs as a table', runTable(data))}
    </section>`,
  );
}

function errorBand({ band, lane }: ReportData): Raw {
  const at = Array.from(band.atM);
  const mm = (values: Float64Array): number[] => Array.from(values, mToMm);
  const [low, high, rms] = [mm(band.leastM), mm(band.mostM), mm(band.rmsM)];
  const seen = [...low, ...high].filter(Number.isFinite);
  if (seen.length === 0) return raw('');
  const limit = roundUp(Math.max(most(seen), -least(seen), 1));
  const there = at.map((_, i) => i).filter((i) => Number.isFinite(low[i]));
  const outline: [number, number][] = [
    ...there.map((i): [number, number] => [at[i]!, high[i]!]),
    ...there.toReversed().map((i): [number, number] => [at[i]!, low[i]!]),
  ];
  const runs = band.runs === 1 ? 'one run' : `${band.runs} runs`;
  const draw = (width: number): string =>
    plotSvg({
      label: `Lateral error over the lane, band of ${runs}`,
      title: 'Lateral error, mm (+ left)',
      width,
      height: 190,
      end: lane.lengthM,
      unit: 'm',
      from: -limit,
      to: limit,
      curves: [
        { points: outline, isArea: true },
        { points: at.map((x, i): [number, number] => [x, rms[i]!]), label: 'rms', dashes: '5 3' },
      ],
    });
  const tenths = (values: readonly number[]) =>
    values.map((v) => (Number.isFinite(v) ? Math.round(v * 10) : null));
  const columns = {
    s: at.map((x) => Math.round(mToMm(x))),
    lo: tenths(low),
    hi: tenths(high),
    rms: tenths(rms),
  };
  const rows = there
    .filter((_, i) => i % 8 === 0)
    .map((i) => [at[i]!.toFixed(2), low[i]!.toFixed(1), high[i]!.toFixed(1), rms[i]!.toFixed(1)]);
  return raw(
    markup`<h3>Lateral error over the lane</h3>
      <p>
        Least and greatest error of ${runs}, all laps laid over each other, in ${STRETCHES} stretches of the
        lane; dashed: root mean square.
      </p>
      <div class="band">
        <div class="plot" data-name="Band of the lateral error">${inTwoWidths(draw)}</div>
        <p class="readout" aria-hidden="true">
          Point at the band, or use the arrow keys: the map above shows the place.
        </p>
        <script type="application/json" class="band-data">
          ${raw(json(columns))}
        </script>
      </div>
      ${details('The band as a table, every eighth stretch', tableOf('Lateral error over the lane', ['at, m', 'least, mm', 'greatest, mm', 'rms, mm'], rows))}`,
  );
}

/** Lost runs, each with the command that drives it alone; nothing where all finished. */
export function lostSection(data: ReportData): Raw {
  const { report, lane } = data;
  const lost = report.list.filter((run) => !run.finished);
  const rows = lost
    .slice(0, MOST_LOST)
    .map((run) => [
      run.seed,
      run.timeS.toFixed(2),
      placeWords(run, lane),
      reasonOf(run),
      repeatCommand(data, run.seed),
    ]);
  const more = lost.length > MOST_LOST ? ` The first ${MOST_LOST} of ${lost.length} are listed.` : '';
  const said = lost.find((run) => run.detail !== undefined);
  const body =
    lost.length === 0
      ? raw(markup`<p>No run was lost.</p>`)
      : raw(
          markup`<p>
              Each can be driven again alone, to the last bit, with the command beside it, in the folder of
              the sheet and the course.${more}
            </p>
            ${tableOf('Lost runs', ['seed', 'after, s', 'where', 'why', 'to repeat it'], rows)}
            ${
              said === undefined
                ? raw('')
                : raw(
                    markup`<p>What the firmware said, seed ${said.seed}:</p>
                      ${exactly('pre', raw(lines(said.detail ?? '')), 'What the firmware said')}`,
                  )
            }`,
        );
  return raw(
    markup`<section id="lost" aria-labelledby="lost-head">
      <h2 id="lost-head">Lost runs</h2>
      ${body}
    </section>`,
  );
}

const reasonOf = ({ reason }: RunRecord): string => (reason === undefined ? '' : REASONS[reason]);

function runTable({ report }: ReportData): Raw {
  const sorted = [
    ...report.list.filter((run) => !run.finished),
    ...report.list.filter((run) => run.finished),
  ];
  const rows = sorted
    .slice(0, MOST_LISTED)
    .map((run) => [
      run.seed,
      run.finished ? 'finished' : `lost: ${reasonOf(run)}`,
      run.lapS === null ? '-' : run.lapS.toFixed(2),
      run.rmsLateralMm.toFixed(1),
      run.maxLateralMm.toFixed(1),
    ]);
  const cut =
    sorted.length > MOST_LISTED ? ` (${MOST_LISTED} of ${sorted.length}; rehearse --json lists all)` : '';
  return tableOf(
    `Runs, lost ones first${cut}`,
    ['seed', 'verdict', 'lap, s', 'rms error, mm', 'greatest, mm'],
    rows,
  );
}
