/** `fairlead rehearse SHEET --course FILE`: drives the design on a course and says how that went. */
import { basename } from 'node:path';
import { InvalidArgumentError, Option, type Command } from 'commander';
import type { Lane } from '../course/lane.js';
import type { Engine, EngineName, RunResult } from '../rehearsal/engine.js';
import type { Rehearsal } from '../rehearsal/runner.js';
import type { DrivenRun } from '../report/driven-run.js';
import type { Vehicle } from '../vehicle/vehicle.js';
import { wholeNumber } from './whole-number.js';
import type { Io } from './io.js';

const EXAMPLES = `
Examples:
  fairlead rehearse cart.json --course lane.json                        once, the vehicle just as in the sheet
  fairlead rehearse cart.json --course lane.json --runs 200             200 vehicles drawn from the tolerances
  fairlead rehearse cart.json --course lane.json --seed 17 --svg run.svg    one of them alone, as a picture
  fairlead rehearse cart.json --course lane.json --on chip              the compiled firmware on the emulated chip

A closed lane is driven for two laps by default: one from standing, one flying. The lap time is that of flying laps.
Exit codes: 0 done, also where runs were lost; 2 bad input; 3 no design meets the sheet; 5 a tool is missing.
`;

/** Names as in src/rehearsal/engines.ts, which is loaded later. */
const ENGINE_NAMES: readonly EngineName[] = ['twin', 'chip', 'micropython'];
const MOST_RUNS = 1_000_000;
const MOST_LAPS = 100;
const MOST_SEED = 2 ** 32 - 1 - MOST_RUNS;

interface RehearseOptions {
  course: string;
  on: EngineName;
  runs: number;
  seed?: number;
  laps: number;
  svg?: string;
  json?: boolean;
}

export function register(program: Command, io: Io): void {
  program
    .command('rehearse')
    .description('drive the design on a course: laps, errors, verdict')
    .argument('<sheet>', 'build sheet')
    .requiredOption('--course <file>', 'the course to drive on')
    .addOption(new Option('--on <engine>', 'what drives').choices(ENGINE_NAMES).default('twin'))
    .option('--runs <n>', 'how many vehicles to drive', wholeNumber(1, MOST_RUNS), 1)
    .option(
      '--seed <n>',
      'seed of the first vehicle, the next ones count up; 0 is the vehicle just as in the sheet (default: 0 for one run, else 1)',
      wholeNumber(0, MOST_SEED),
    )
    .option('--laps <n>', 'laps of a closed lane', wholeNumber(1, MOST_LAPS), 2)
    .option('--svg <file>', 'draw the driven path, or where it was lost, as an SVG picture', svgName)
    .option('--json', 'print one JSON document: runs, finished, lost, lapS, boundLapS, ratio, ..., list')
    .addHelpText('after', EXAMPLES)
    .action((path: string, options: RehearseOptions) => rehearseCommand(path, options, io));
}

async function rehearseCommand(path: string, options: RehearseOptions, io: Io): Promise<void> {
  const { loadDesign } = await import('./load-design.js');
  const { loadCourse } = await import('../course/load-course.js');
  const { engineFor } = await import('../rehearsal/engines.js');
  const { rehearse } = await import('../rehearsal/runner.js');
  const { courseNotes } = await import('../rehearsal/course-fit.js');
  const { rehearsalText } = await import('../report/rehearsal-text.js');

  io.progress('designing ...');
  const { sheet, digest, design } = await loadDesign(path);
  const { lane } = await loadCourse(options.course);
  io.progress('making the engine ready ...');
  const engine = await engineFor(options.on, { digest }, design);
  const { runs, laps } = options;
  const seed = options.seed ?? (runs === 1 ? 0 : 1);
  const onRun = progressOf(runs, io);
  const rehearsal = await rehearse({ vehicle: design.vehicle, lane, engine, runs, seed, laps, onRun });
  io.progress('');

  const names = { vehicle: sheet.name, course: basename(options.course), laps };
  const isPlotted = io.isTerminalOut && options.json !== true;
  const run =
    isPlotted || options.svg !== undefined
      ? await drawnRun(rehearsal, engine, design.vehicle, lane, laps)
      : undefined;
  if (run !== undefined && options.svg !== undefined) await writePicture(options.svg, run, rehearsal, names);
  const notes = courseNotes(design.vehicle, lane);
  if (options.json === true) {
    io.json({ ...rehearsal.report, notes });
    return;
  }
  io.stdout(rehearsalText(rehearsal.report, lane, names));
  for (const note of notes) io.stdout(`Note: ${note}\n`);
  if (run !== undefined && isPlotted) {
    const { terminalPlot } = await import('../report/terminal-plot.js');
    const { isUtf8Locale } = await import('../report/dot-canvas.js');
    io.stdout(`\n${terminalPlot(run.driven, { columns: io.columns, unicode: isUtf8Locale(process.env) })}`);
  }
  if (options.svg !== undefined) io.stdout(`\nPicture: ${options.svg}\n`);
}

/** Shows how far it is, ten times a second at most. */
function progressOf(runs: number, io: Io): (done: number) => void {
  let nextMs = 0;
  return (done) => {
    if (performance.now() < nextMs) return;
    nextMs = performance.now() + 100;
    io.progress(`driving: ${done} of ${runs} runs`);
  };
}

/** The name of a picture: not by mistake that of the sheet. */
function svgName(text: string): string {
  if (!text.toLowerCase().endsWith('.svg')) throw new InvalidArgumentError('Its name must end in .svg.');
  return text;
}

interface DrawnRun {
  result: RunResult;
  driven: DrivenRun;
}

/** The run worth a picture: the first one that was lost, or else the first; driven again where it kept no trace. */
async function drawnRun(
  { results }: Rehearsal,
  engine: Engine,
  vehicle: Vehicle,
  lane: Lane,
  laps: number,
): Promise<DrawnRun | undefined> {
  const chosen = results.find((result) => result.loss !== undefined) ?? results[0];
  if (chosen === undefined) return undefined;
  const { runSetup } = await import('../rehearsal/runner.js');
  const result = chosen.trace ? chosen : await engine.run(runSetup(vehicle, lane, chosen.seed, laps, true));
  const { trace, loss } = result;
  return trace && { result, driven: { lane, trace, ...(loss === undefined ? {} : { loss }) } };
}

async function writePicture(
  file: string,
  { result, driven }: DrawnRun,
  { report, bound }: Rehearsal,
  names: { vehicle: string; course: string },
): Promise<void> {
  const { driveSvg } = await import('../report/drive-svg.js');
  const { runSummary } = await import('../report/rehearsal-text.js');
  const { default: writeFileAtomic } = await import('write-file-atomic');
  const title = `${names.vehicle} on ${names.course}`;
  await writeFileAtomic(
    file,
    driveSvg(driven, { title, summary: runSummary(result, report.engine, bound.lapS) }),
  );
}
