/** What the demo says, stage by stage. */
import { basename, relative } from 'node:path';
import { table } from '../report/text-table.js';
import { counted } from '../sheet/words.js';
import { BOARDS } from '../vehicle/boards.js';
import type { DemoSheet, DemoVehicle, Driven, Picture, RenderedDemo } from './demo-stages.js';

const INDENT = '   ';

/** A path as the reader would type it. */
export function shortPath(path: string): string {
  const short = relative('.', path);
  return short.startsWith('..') ? path : short;
}

function indented(rows: readonly (readonly string[])[]): string {
  return `${table(rows).replaceAll(/^/gm, INDENT)}\n`;
}

/** Stage 1: the sheets that were found sound. */
export function checkText(sheets: readonly DemoSheet[]): string {
  const rows = sheets.map(({ path, notes, sheet: { target } }) => [
    shortPath(path),
    `sound, ${counted(notes.length, 'note')}`,
    `${target.language === 'arduino' ? 'Arduino C++' : 'MicroPython'} for ${BOARDS[target.board].title}`,
  ]);
  return indented(rows);
}

/** Stage 2: each design in one line. */
export function deriveText(vehicles: readonly DemoVehicle[]): string {
  const rows = vehicles.map(({ sheet, design: { classes } }) => {
    const speedsMps = classes.map(({ speedMps }) => speedMps);
    const gainMargins = classes.map(({ worstMargins }) => worstMargins.gainMargin);
    const phaseMarginsDeg = classes.map(({ worstMargins }) => worstMargins.phaseMarginDeg);
    return [
      sheet.name,
      `${classes.length} speed classes, ${Math.min(...speedsMps).toFixed(2)} to ${Math.max(...speedsMps).toFixed(2)} m/s`,
      `gain margin ${Math.min(...gainMargins).toFixed(1)}`,
      `phase margin ${Math.min(...phaseMarginsDeg).toFixed(0)} deg`,
    ];
  });
  return `${indented(rows)}${INDENT}Margins: the least over all classes and all corners of the tolerances.\n`;
}

/** Stage 3: where the firmware is. */
export function renderText(rendered: readonly RenderedDemo[]): string {
  return indented(
    rendered.map(({ folder, files, written }) => [
      folder,
      `${files} files, ${written === 0 ? 'unchanged' : `${written} written`}`,
    ]),
  );
}

/** The table of rehearsals grows line by line, so its columns are fixed. */
const WIDTHS = [17, 13, 12, 12, 8, 13];

function line(cells: readonly string[]): string {
  return `${INDENT}${cells.map((cell, i) => cell.padEnd(WIDTHS[i] ?? 0)).join('')}`.trimEnd() + '\n';
}

export function rehearsalHead(): string {
  return line(['sheet', 'engine', 'controller', 'finished', 'lap, s', 'times bound', 'error rms, max, mm']);
}

export function rehearsalLine(driven: Driven): string {
  const names = [driven.vehicle.sheet.name, driven.engine, driven.control];
  if ('missing' in driven) return line([...names, driven.missing]);
  const { report } = driven.rehearsal;
  const finished = report.runs === 1 ? (report.finished === 1 ? 'yes' : 'no') : undefined;
  return line([
    ...names,
    finished ?? `${report.finished} of ${report.runs}`,
    report.lapS?.toFixed(2) ?? '-',
    report.ratio?.toFixed(2) ?? '-',
    `${report.rmsLateralMm.toFixed(1)}, ${report.maxLateralMm.toFixed(1)}`,
  ]);
}

/** What the columns mean, below the table. */
export function rehearsalFoot(drawn: number): string {
  return (
    `${INDENT}Lap: flying, the median where there are several. Bound: what no such cart can do quicker.\n` +
    `${INDENT}The twin drives ${drawn} carts drawn from the sheet's tolerances, chip and interpreter the cart of the sheet.\n`
  );
}

/** Stage 5: where the pictures are. */
export function pictureText(pictures: readonly Picture[]): string {
  return indented(pictures.map(({ file, summary }) => [file, summary]));
}

/** What to do with all this, and how not to come to harm. */
export function nextText(rendered: readonly RenderedDemo[]): string {
  const self = process.env['npm_lifecycle_event'] === 'start' ? 'npm start --' : 'fairlead';
  const steps = rendered.map(({ folder, vehicle }) =>
    vehicle.design.vehicle.language === 'arduino'
      ? ['Arduino', `open ${folder}/${basename(folder)}.ino in the Arduino IDE, choose the board, upload`]
      : ['MicroPython', `copy ${folder}/*.py to the board, for example with: mpremote cp ${folder}/*.py :`],
  );
  const others = [
    ['Your own cart', `${self} survey cart.json`],
    ['All commands', `${self} --help`],
  ];
  return `${indented([...steps, ...others])}
First run: wheels off the floor, a hand on the battery plug, and see that each wheel turns the right way. Nothing moves
before the start button. The firmware is no safety function: where a vehicle could hurt someone, guarding, emergency stop
and personnel detection are separate, rated equipment under local codes and competent, licensed people (ISO 3691-4,
IEC 60204-1). Never short, pierce or overheat the battery; disconnect it before changing wires.
`;
}
