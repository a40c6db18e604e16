/**
 * The report of a rehearsal as one HTML page that needs nothing beside it: no network, no file. The same data gives the same bytes.
 *
 * A content security policy allows the page's own style and script by their digests, and nothing else.
 */
import { createHash } from 'node:crypto';
import { CAUTIONS } from '../../firmware/header.js';
import { VERSION } from '../../version.js';
import { extremes, finishedWords, headline } from '../rehearsal-text.js';
import { designSection, sheetSection } from './design-section.js';
import { darkInkRules } from './inks.js';
import { exactly, markup, raw, tableOf, type Raw } from './markup.js';
import type { ReportAssets, ReportData } from './report-data.js';
import { runSection } from './run-section.js';
import { lostSection, spreadSection } from './spread-section.js';

const PARTS = [
  ['outcome', 'Outcome'],
  ['lost', 'Lost runs'],
  ['runs', 'Runs shown'],
  ['spread', 'Spread of the runs'],
  ['design', 'Design'],
  ['sheet', 'Build sheet'],
  ['cautions', 'Cautions'],
] as const;

export function reportHtml(data: ReportData, assets: ReportAssets): string {
  const style = assets.style + darkInkRules();
  const policy = `default-src 'none'; style-src ${hashOf(style)}; script-src ${hashOf(assets.script)}; base-uri 'none'; form-action 'none'`;
  const title = `${data.names.vehicle} on ${data.names.course}: rehearsal`;
  const shown = data.shown.map((run, i) => runSection(data, run, i + 1));
  return markup`<!doctype html>
    <html lang="en">
      <head>
        <meta charset="utf-8" />
        <meta http-equiv="Content-Security-Policy" content="${policy}" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <meta name="color-scheme" content="light dark" />
        <title>${title}</title>
        ${exactly('style', raw(style))}
      </head>
      <body>
        <a class="skip" href="#main">Skip to the outcome</a>
        <header><h1>${title}</h1></header>
        <nav aria-label="Parts of this report">
          <ul>
            ${PARTS.map(([id, words]) => raw(markup`<li><a href="#${id}">${words}</a></li>`))}
          </ul>
        </nav>
        <main id="main" tabindex="-1">
          ${outcomeSection(data)} ${lostSection(data)}
          <section id="runs" aria-labelledby="runs-head">
            <h2 id="runs-head">Runs shown</h2>
            ${shown}
          </section>
          ${spreadSection(data)} ${designSection(data)} ${sheetSection(data)}
          <section id="cautions" aria-labelledby="cautions-head">
            <h2 id="cautions-head">Cautions</h2>
            <p>
              A rehearsal is a calculation. It shows what the described vehicle would do on the described
              course, not that a real one is safe.
            </p>
            <ul>
              ${CAUTIONS.map((caution) => raw(markup`<li>${caution}</li>`))}
            </ul>
          </section>
        </main>
        <footer><p>Written by fairlead ${VERSION}.</p></footer>
        ${exactly('script', raw(assets.script))}
      </body>
    </html> `;
}

function hashOf(text: string): string {
  return `'sha256-${createHash('sha256').update(text).digest('base64')}'`;
}

function outcomeSection({ report, lane, names }: ReportData): Raw {
  const rows: string[][] = [['Finished', finishedWords(report)]];
  if (report.lapS !== null && report.ratio !== null) {
    rows.push([report.finished > 1 ? 'Lap, median' : 'Lap', `${report.lapS.toFixed(2)} s`]);
    rows.push(['Physical bound of the lap', `${report.boundLapS.toFixed(2)} s`]);
    rows.push(['Lap over bound', report.ratio.toFixed(2)]);
    if (report.finished > 1) rows.push(['Quickest, slowest', extremes(report)]);
  }
  rows.push(['Lateral error, rms', `${report.rmsLateralMm.toFixed(1)} mm`]);
  rows.push(['Lateral error, greatest', `${report.maxLateralMm.toFixed(1)} mm`]);
  const notes = report.notes.map((note) => raw(markup`<li>${note}</li>`));
  return raw(
    markup`<section id="outcome" aria-labelledby="outcome-head">
      <h2 id="outcome-head">Outcome</h2>
      ${headline(report, lane, names)
        .split('\n')
        .map((line) => raw(markup`<p>${line}.</p>`))}
      ${tableOf('Outcome of all runs', ['figure', 'value'], rows)}
      ${
        notes.length > 0
          ? raw(
              markup`<ul class="notes">
                ${notes}
              </ul>`,
            )
          : raw('')
      }
    </section>`,
  );
}
