/**
 * The rule table for reading and annotating: each state as a strip of the bar with the wheels' arrows, its kind and the offsets
 * that cause it.
 *
 * With many sensors only the states that a single line causes are shown; what the others do follows from these, and
 * `derive --json` lists them all.
 */
import type { Design, RuleRow } from '../../design/design.js';
import { stateTable } from '../../design/state-table.js';
import { FULL_PRINT_SENSORS } from '../rule-text.js';
import { MARGIN, WIDTH, WORDS, svgDocument } from '../svg-document.js';
import { textAt } from '../svg-text.js';
import { ROW_PX, columnHead, kindWords, rowLayout, ruleRow } from './rule-row.js';

const FONT = 13;
const TOP = 124;
const COLUMN_GAP = 30;
/** Up to this number of rows one column does. */
const ONE_COLUMN_ROWS = 16;
/** A single column is no wider than reads well, px. */
const WIDEST_COLUMN = 620;
const NOTE_PX = 20;

/** Kinds in the order in which they are shown, with what they mean. */
const KINDS: Readonly<Record<RuleRow['kind'], string>> = {
  line: 'line: what a single line causes, with the offsets of its middle, mm to the left of the middle of the bar',
  split: 'split: several runs, each of which a single line could cause',
  wide: 'wide: as many sensors as a crossing covers',
  none: 'none: a gap or a lost line, decided by where the line was last',
  impossible: 'impossible: neither a line nor two lines cause this; a faulty sensor',
};
const ORDER = Object.keys(KINDS);

/** Rows grouped by kind; lines from left to right, the others by number. */
function shownRows({ vehicle, controller }: Design): { rows: RuleRow[]; all: number } {
  const table = stateTable(vehicle, controller);
  const isFull = controller.sensing.sensorCount <= FULL_PRINT_SENSORS;
  const rows = isFull ? table : table.filter(({ kind }) => kind === 'line');
  const offsetM = ({ fromM = 0, toM = 0 }: RuleRow) => fromM + toM;
  rows.sort(
    (a, b) => ORDER.indexOf(a.kind) - ORDER.indexOf(b.kind) || offsetM(b) - offsetM(a) || a.state - b.state,
  );
  return { rows, all: table.length };
}

/** The picture as an SVG document; undefined for a controller without rules. */
export function ruleTableFigure(design: Design): string | undefined {
  const { vehicle, controller } = design;
  if (controller.rules === undefined) return undefined;
  const { rows, all } = shownRows(design);
  const columns = rows.length <= ONE_COLUMN_ROWS ? 1 : 2;
  const perColumn = Math.ceil(rows.length / columns);
  const inner = WIDTH - 2 * MARGIN;
  const width = columns === 1 ? Math.min(WIDEST_COLUMN, inner) : (inner - COLUMN_GAP) / 2;
  const parts = Array.from({ length: columns }, (_, i) => {
    const layout = rowLayout(vehicle, rows, MARGIN + i * (width + COLUMN_GAP), width);
    const own = rows.slice(i * perColumn, (i + 1) * perColumn);
    return [
      columnHead(layout, TOP, own.length * ROW_PX),
      ...own.map((row, k) => ruleRow(vehicle, row, layout, TOP + k * ROW_PX)),
    ].join('\n');
  });
  const notesTop = TOP + perColumn * ROW_PX + 28;
  const notes = notesOn(rows, all);
  const rest = all > rows.length ? `, the ${rows.length} of a single line` : '';
  return svgDocument({
    title: `${vehicle.name}: rule table`,
    summary: `${all} states${rest}. Filled spots see the line. Arrows: left wheel above, right wheel below, in times of base speed.`,
    description: rows
      .map(
        (row) =>
          `${row.state}: ${kindWords(row)}, left ${row.left.toFixed(2)}, right ${row.right.toFixed(2)}.`,
      )
      .join(' '),
    height: notesTop + (notes.length - 1) * NOTE_PX + MARGIN,
    fontSize: FONT,
    parts: [
      ...parts,
      ...notes.map((note, i) => textAt(MARGIN, notesTop + i * NOTE_PX, note, { fill: WORDS })),
    ],
  });
}

function notesOn(rows: readonly RuleRow[], all: number): string[] {
  const kinds = new Set(rows.map(({ kind }) => kind));
  const notes = [...kinds].map((kind) => KINDS[kind]);
  notes.push(
    'Grey: the line in the middle of its offsets. The number is the state in binary, the leftmost sensor highest.',
  );
  if (all > rows.length) notes.push(`The other ${all - rows.length} states are in derive --json.`);
  return notes;
}
