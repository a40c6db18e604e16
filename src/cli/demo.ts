/** `fairlead demo`, also a bare `fairlead` without a terminal: the demo cart through the whole way. */
import type { Command } from 'commander';
import { EXIT, type Problem } from '../sheet/problem.js';
import { COURSE, SHEETS } from './demo-files.js';
import type { DemoSheet, Driven, Picture, RenderedDemo } from './demo-stages.js';
import type { Io } from './io.js';
import { problemLine } from './problem-text.js';
import { wholeNumber } from './whole-number.js';

const EXAMPLES = `
The cart of the examples, once as an Arduino and once as a MicroPython vehicle: its sheets are checked, the numbers derived,
the firmware written, and driven round the nursery lane: many vehicles drawn from the tolerances on the twin, then the
compiled firmware on the emulated chip (where the AVR compiler is there) and the MicroPython firmware in its interpreter.

Examples:
  fairlead demo
  fairlead demo --out /tmp/demo --json

Exit codes: 0 done, 1 the firmware lost the lane, 2 the folder cannot be written, 4 files in it were edited by hand.
`;

const MOST_DRAWN = 100_000;

interface DemoOptions {
  out: string;
  runs: number;
  json?: boolean;
}

export function register(program: Command, io: Io): void {
  program
    .command('demo')
    .description('take the demo cart through check, derive, render and rehearse')
    .option('--out <dir>', 'folder for firmware and pictures', 'fairlead-demo')
    .option('--runs <n>', 'vehicles drawn from the tolerances on the twin', wholeNumber(1, MOST_DRAWN), 100)
    .option('--json', 'print one JSON document: { ok, vehicles, rehearsals, problems }')
    .addHelpText('after', EXAMPLES)
    .action((options: DemoOptions) => demo(options, io));
}

async function demo({ out, runs, json }: DemoOptions, io: Io): Promise<void> {
  const say = (text: string): void => {
    if (json !== true) io.stdout(text);
  };
  const begin = (title: string): void => say(`\n${io.style('bold', title)}\n`);
  say('The demo cart, from build sheet to driven lane\n');
  const text = await import('./demo-text.js');
  const { loadSheet } = await import('../sheet/load.js');
  begin('1  Check');
  const sheets: DemoSheet[] = [];
  for (const path of SHEETS) sheets.push({ path, ...(await loadSheet(path)) });
  say(text.checkText(sheets));

  const stages = await import('./demo-stages.js');
  begin('2  Derive');
  const vehicles = sheets.map((sheet) => stages.derive(sheet));
  say(text.deriveText(vehicles));

  const rendered: RenderedDemo[] = [];
  for (const vehicle of vehicles) rendered.push(await stages.render(vehicle, out));
  begin('3  Render');
  say(text.renderText(rendered));

  const { loadCourse } = await import('../course/load-course.js');
  const { lane } = await loadCourse(COURSE);
  begin(`4  Rehearse, two laps of ${text.shortPath(COURSE)}`);
  say(text.rehearsalHead());
  const drives: Driven[] = [];
  for (const task of vehicles.flatMap((vehicle) => stages.tasksOf(vehicle, runs))) {
    io.progress(`   driving ${task.vehicle.sheet.name} on ${task.engine} ...`);
    const driven = await stages.drive(task, lane);
    drives.push(driven);
    say(text.rehearsalLine(driven));
  }
  say(text.rehearsalFoot(runs));

  begin('5  Draw');
  const pictures: Picture[] = [];
  for (const vehicle of vehicles) {
    const picture = await stages.draw(vehicle, drives, lane, out);
    if (picture) pictures.push(picture);
  }
  say(text.pictureText(pictures));
  if (pictures[0] && json !== true) io.stdout(await plot(pictures[0], io));

  begin('Next');
  say(text.nextText(rendered));
  const problems = lostFirmware(drives);
  if (problems.length > 0) process.exitCode = EXIT.defect;
  if (json === true) io.json(demoJson(rendered, drives, pictures, problems));
  else io.stderr(problems.map((problem) => `${problemLine(problem)}\n`).join(''));
}

async function plot({ run }: Picture, io: Io): Promise<string> {
  const { terminalPlot } = await import('../report/terminal-plot.js');
  const { isUtf8Locale } = await import('../report/dot-canvas.js');
  return `\n${terminalPlot(run, { columns: io.columns, unicode: isUtf8Locale(process.env) })}`;
}

/** The demo cart of the sheet itself must hold its lane on every engine; of those drawn from the tolerances a few may not. */
function lostFirmware(drives: readonly Driven[]): Problem[] {
  return drives
    .filter((each) => each.drawn === 0 && 'rehearsal' in each && each.rehearsal.report.lost > 0)
    .map(({ vehicle, engine, control }) => ({
      pointer: '',
      message: `${vehicle.sheet.name} with ${control} lost the lane on ${engine}; this is a defect of fairlead.`,
    }));
}

function demoJson(
  rendered: readonly RenderedDemo[],
  drives: readonly Driven[],
  pictures: readonly Picture[],
  problems: readonly Problem[],
): object {
  return {
    ok: problems.length === 0,
    problems,
    vehicles: rendered.map(({ vehicle, folder }) => ({
      name: vehicle.sheet.name,
      sheet: vehicle.path,
      folder,
    })),
    pictures: pictures.map(({ file }) => file),
    rehearsals: drives.map((each) => ({
      name: each.vehicle.sheet.name,
      control: each.control,
      ...('missing' in each ? { engine: each.engine, missing: each.missing } : each.rehearsal.report),
    })),
  };
}
