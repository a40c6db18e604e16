/** The design behind the rehearsal: speed classes and what limits each, its figures, and the sheet. */
import type { Design } from '../../design/design.js';
import { mToMm } from '../../sheet/units.js';
import { LIMIT_REASONS, proofLines } from '../design-text.js';
import { designFigures } from '../figures/design-figures.js';
import { exactly, lines, markup, raw, tableOf, type Raw } from './markup.js';
import type { ReportData } from './report-data.js';

export function designSection({ design }: ReportData): Raw {
  const figures = designFigures(design).map(({ svg }) => {
    return raw(
      markup`<figure class="scroll" tabindex="0" role="group" aria-label="${titleOf(svg)}">
        ${raw(svg)}
      </figure>`,
    );
  });
  return raw(
    markup`<section id="design" aria-labelledby="design-head">
      <h2 id="design-head">Design</h2>
      <p>${raw(lines(proofLines(design)))}</p>
      ${classTable(design)}
      ${
        design.remarks.length > 0
          ? raw(
              markup`<h3>Remarks of the design</h3>
                <ul>
                  ${design.remarks.map((remark) => raw(markup`<li>${remark}</li>`))}
                </ul>`,
            )
          : raw('')
      }
      <h3>Figures</h3>
      ${figures}
    </section>`,
  );
}

/** The title that a figure carries, unescaped of what svg-text.ts escapes. */
function titleOf(svg: string): string {
  const title = /<title>([^<]*)<\/title>/.exec(svg)?.[1] ?? '';
  return title
    .replaceAll('&lt;', '<')
    .replaceAll('&gt;', '>')
    .replaceAll('&quot;', '"')
    .replaceAll('&amp;', '&');
}

function classTable({ classes }: Design): Raw {
  const rows = classes.map((each) => [
    each.name,
    mToMm(each.minRadiusM).toFixed(0),
    each.speedMps.toFixed(2),
    LIMIT_REASONS[each.limitedBy],
    ...(['motor', 'grip', 'view', 'control'] as const).map((limit) => each.limits[limit].toFixed(2)),
    each.worstMargins.ms.toFixed(2),
  ]);
  const head = [
    'class',
    'radius from, mm',
    'speed, m/s',
    'limited by',
    'motor, m/s',
    'grip, m/s',
    'view, m/s',
    'control, m/s',
    'worst Ms',
  ];
  return tableOf('Speed classes and what limits each', head, rows);
}

export function sheetSection({ sheet, sheetFile, digest }: ReportData): Raw {
  return raw(
    markup`<section id="sheet" aria-labelledby="sheet-head">
      <h2 id="sheet-head">Build sheet</h2>
      <p>${sheetFile}, SHA-256 <code>${digest}</code></p>
      ${exactly('pre', raw(lines(JSON.stringify(sheet, undefined, 2))), 'Build sheet')}
    </section>`,
  );
}
