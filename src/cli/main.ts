/**
 * The command line: finds the command, runs it, and turns whatever goes wrong into a message and an exit code.
 *
 * Command modules are loaded only when they are named (all of them for the overall help), and load their heavy parts
 * inside their action, so that a help text appears at once. Only here the process is ended.
 */
import { Command, CommanderError } from 'commander';
import { EXIT, FairleadError } from '../sheet/problem.js';
import { VERSION } from '../version.js';
import { processIo, type Io } from './io.js';
import { failureJson, failureText, toFailure } from './problem-text.js';

interface CommandModule {
  register(program: Command, io: Io): void;
}

/** The commands in the order in which a vehicle comes about; the help lists them so. */
const COMMANDS: Readonly<Record<string, () => Promise<CommandModule>>> = {
  survey: () => import('./survey.js'),
  check: () => import('./check.js'),
  derive: () => import('./derive.js'),
  render: () => import('./render.js'),
  rehearse: () => import('./rehearse.js'),
  demo: () => import('./demo.js'),
};

const EXAMPLES = `
Without a command, fairlead opens the questionnaire; without a terminal it takes the demo cart through the whole way.

Examples:
  fairlead survey cart.json                answer questions, get a build sheet
  fairlead check cart.json                 all its problems at once
  fairlead derive cart.json                the numbers, and where each comes from
  fairlead render cart.json --out build    write the firmware
  fairlead rehearse cart.json --course lane.json

Exit codes: 0 done, 1 a defect of fairlead, 2 bad input, 3 no design meets the sheet,
4 generated files differ from the sheet or were edited, 5 a needed tool is missing.
`;

/** Options of the program itself. */
const FOR_PROGRAM = new Set(['-h', '--help', '--version']);

/** Exits of commander that are no failures. */
const SHOWN = new Set(['commander.helpDisplayed', 'commander.help', 'commander.version']);

async function buildProgram(words: readonly string[], io: Io, wantsJson: boolean): Promise<Command> {
  const program = new Command('fairlead')
    .description(
      'Turns the description of a small line-tracking vehicle into firmware that is proven before it is flashed.',
    )
    .version(VERSION, '--version', 'print the version')
    .helpOption('-h, --help', 'print this help')
    .addHelpText('after', EXAMPLES)
    .exitOverride()
    .configureOutput({
      writeOut: (text) => io.stdout(text),
      writeErr: (text) => io.stderr(text),
      outputError: (text, write) => {
        if (!wantsJson) write(text);
      },
    });
  const [named = ''] = words;
  const load = Object.hasOwn(COMMANDS, named) ? COMMANDS[named] : undefined;
  const loads = load ? [load] : Object.values(COMMANDS);
  for (const module of await Promise.all(loads.map((each) => each()))) module.register(program, io);
  return program;
}

/** What `fairlead` does without a command: the questionnaire where somebody can answer, else the demo. */
function withDefaultCommand(words: readonly string[], io: Io): string[] {
  const [first] = words;
  const isForProgram = first !== undefined && (!first.startsWith('-') || FOR_PROGRAM.has(first));
  if (isForProgram || words.some((word) => Object.hasOwn(COMMANDS, word))) return [...words];
  return [io.isTerminalIn && io.isTerminalOut ? 'survey' : 'demo', ...words];
}

function usageFailure(error: CommanderError): FairleadError {
  const text = error.message.replace(/^error: /, '').replace(/\s*\n\s*/g, ' ');
  return new FairleadError(text, { exitCode: EXIT.badInput, cause: error });
}

/** Runs one command line to its end and sets the exit code of the process. */
export async function run(argv: readonly string[]): Promise<void> {
  const io = processIo();
  const words = withDefaultCommand(argv.slice(2), io);
  const wantsJson = words.includes('--json');
  endQuietlyWithoutReader();
  process.on('uncaughtException', (error) => {
    report(error, io, wantsJson);
    endProcess();
  });
  try {
    const program = await buildProgram(words, io, wantsJson);
    await program.parseAsync(words, { from: 'user' });
  } catch (error) {
    report(error, io, wantsJson);
  }
}

function report(error: unknown, io: Io, wantsJson: boolean): void {
  if (error instanceof CommanderError && SHOWN.has(error.code)) return;
  const isUsage = error instanceof CommanderError;
  const failure = toFailure(isUsage ? usageFailure(error) : error);
  process.exitCode = failure.exitCode;
  if (wantsJson) io.json(failureJson(failure));
  // Commander has written its usage errors itself, with the nearest command or option.
  else if (!isUsage) io.stderr(`${io.styleErr('red', failureText(failure))}\n`);
  if (process.env['DEBUG'] && error instanceof Error) io.stderr(`${error.stack ?? error.message}\n`);
}

/** A reader such as `head` may close our output early; that is its right and no fault. */
function endQuietlyWithoutReader(): void {
  const onError = (error: NodeJS.ErrnoException): void => {
    if (error.code !== 'EPIPE') throw error;
    process.exitCode = EXIT.done;
    endProcess();
  };
  process.stdout.on('error', onError);
  process.stderr.on('error', onError);
}

/** The one place where the process is ended without waiting for what it has open. */
function endProcess(): never {
  process.exit();
}
