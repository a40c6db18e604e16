/** `fairlead rehearse SHEET --course FILE`: drives the design on a course and says how that went. */
import { Option, type Command } from 'commander';
import type { EngineName } from '../rehearsal/engine.js';
import type { Io } from './io.js';
import {
  MOST_JOBS,
  MOST_LAPS,
  MOST_RUNS,
  MOST_SEED,
  type RehearseOptions,
  reportName,
  shardOf,
  svgName,
} from './rehearse-options.js';
import { faultOption, faultsHelp } from './rehearse-faults.js';
import { wholeNumber } from './whole-number.js';

const EXAMPLES = `
Examples:
  fairlead rehearse cart.json --course lane.json                        once, the vehicle just as in the sheet
  fairlead rehearse cart.json --course lane.json --runs 200             200 vehicles drawn from the tolerances
  fairlead rehearse cart.json --course lane.json --seed 17 --svg run.svg    one of them alone, as a picture
  fairlead rehearse cart.json --course lane.json --runs 100 --report lane.html   all of it as a page to read and print
  fairlead rehearse cart.json --course lane.json --on chip              the compiled firmware on the emulated chip

Two sheets on the same course and seeds, in pairs, with the interval of the difference:
  fairlead rehearse cart.json other.json --course lane.json --runs 200

How much speed costs in finish rate, in figures and as a picture:
  fairlead rehearse cart.json --course lane.json --curve --runs 300 --svg curve.svg

A study in parts, on several machines or as an array of jobs; the parts give exactly what one command would:
  fairlead rehearse cart.json --course lane.json --runs 10000 --shard 3/8 --out part-3.json
  fairlead rehearse --merge part-*.json

A closed lane is driven for two laps by default: one from standing, one flying. The lap time is that of flying laps.
Exit codes: 0 done, also where runs were lost; 2 bad input; 3 no design meets the sheet; 5 a tool is missing; 130 interrupted.
`;

/** Names as in src/rehearsal/engines.ts, which is loaded later. */
const ENGINE_NAMES: readonly EngineName[] = ['twin', 'chip', 'micropython'];

export function register(program: Command, io: Io): void {
  const command = program
    .command('rehearse')
    .description('drive the design on a course: laps, errors, verdict')
    .argument('[sheets...]', 'build sheet; two of them are compared')
    .option('--course <file>', 'the course to drive on')
    .addOption(new Option('--on <engine>', 'what drives').choices(ENGINE_NAMES).default('twin'))
    .addOption(
      new Option('--on-second <engine>', 'what drives the second sheet (default: as the first)').choices(
        ENGINE_NAMES,
      ),
    )
    .option(
      '--runs <n>',
      'how many vehicles to drive (default: 1; of two sheets 100)',
      wholeNumber(1, MOST_RUNS),
    )
    .option(
      '--seed <n>',
      'seed of the first vehicle, the next ones count up; 0 is the vehicle just as in the sheet (default: 0 for one run, else 1)',
      wholeNumber(0, MOST_SEED),
    )
    .option('--laps <n>', 'laps of a closed lane', wholeNumber(1, MOST_LAPS), 2)
    .option('--jobs <n>', 'worker threads (default: one for each core)', wholeNumber(1, MOST_JOBS))
    .option('--shard <k/n>', 'drive only part K of N, and write it for --merge', shardOf)
    .option('--out <file>', 'with --shard: the file for the part (default: stdout)')
    .option('--merge <files...>', 'join the parts of a study')
    .option('--curve', 'drive at speeds from below to above those of the design: speed against finish rate')
    .option(
      '--spreads',
      'drive nothing; show what differs between drawn vehicles, and where each range comes from',
    )
    .option('--fault <fault>', 'a fault to inject, see below; can be given several times', faultOption)
    .option('--svg <file>', 'draw the driven path, or where it was lost, as an SVG picture', svgName)
    .option(
      '--report <file>',
      'write a report of all runs as one HTML page that needs no network',
      reportName,
    )
    .option('--json', 'print one JSON document: runs, finished, lost, lapS, boundLapS, ratio, ..., list')
    .addHelpText('after', () => `${EXAMPLES}\n${faultsHelp()}`)
    .action((paths: string[], options: RehearseOptions) => rehearseCommand(command, paths, options, io));
}

async function rehearseCommand(
  command: Command,
  paths: readonly string[],
  options: RehearseOptions,
  io: Io,
): Promise<void> {
  const { merge, shard, course } = options;
  const [path, second, ...more] = paths;
  if (merge !== undefined) {
    if (options.report !== undefined) command.error('error: --report does not go with --merge');
    if (path !== undefined || course !== undefined)
      command.error('error: --merge takes the parts alone, no sheet and no course');
    await (await import('./rehearse-merge.js')).mergeCommand(merge, options.json === true, io);
    return;
  }
  if (path === undefined) command.error("error: missing required argument 'sheet'");
  if (options.spreads === true) {
    await (await import('./rehearse-spreads.js')).spreadsCommand(path, options.json === true, io);
    return;
  }
  if (course === undefined) command.error("error: required option '--course <file>' not specified");
  if (more.length > 0) command.error('error: at most two sheets can be compared');
  if (second !== undefined) {
    if (
      shard !== undefined ||
      options.svg !== undefined ||
      options.curve === true ||
      options.fault !== undefined
    )
      command.error('error: --shard, --svg, --curve and --fault take one sheet');
    const { compareCommand } = await import('./rehearse-compare.js');
    await compareCommand([path, second], course, options, io);
    return;
  }
  if (options.onSecond !== undefined) command.error('error: --on-second goes with two sheets');
  if (options.curve === true) {
    if (shard !== undefined || options.on !== 'twin' || options.fault !== undefined)
      command.error('error: --curve drives the twin, not in parts and without faults');
    await (await import('./rehearse-curve.js')).curveCommand(path, course, options, io);
    return;
  }
  const { rehearsePart, rehearseRuns } = await import('./rehearse-runs.js');
  if (shard === undefined) {
    if (options.out !== undefined) command.error('error: --out goes with --shard');
    await rehearseRuns(path, course, options, io);
    return;
  }
  if (options.svg !== undefined) command.error('error: --svg does not go with --shard');
  if (options.report !== undefined) command.error('error: --report does not go with --shard');
  await rehearsePart(path, course, { ...options, shard }, io);
}
