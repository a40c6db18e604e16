/** `fairlead survey [SHEET]`: the questionnaire, or a sheet from a file of answers. */
import type { Command } from 'commander';
import { FairleadError } from '../sheet/problem.js';
import { shellWord } from '../report/shell-word.js';
import type { Io } from './io.js';

const HELP = `
On a terminal it asks: Enter takes the value offered, ? explains, < goes back. Every answer is kept at once in a hidden
file beside the sheet (.cart.draft.json; without SHEET .fairlead-survey.draft.json); the next survey goes on from there.

An answers file holds a sheet, a part of one, or JSON pointers with values; numbers may be text with a unit:
  { "/name": "bench-cart", "/target/board": "nano", "/line/widthMm": "2.5 cm", "sensors": { "count": 8 } }
The rest comes from SHEET if it exists, else from the defaults. A file that is there is left alone if it says the same;
one that says something else is replaced only with --replace.

Examples:
  fairlead survey cart.json
  fairlead survey cart.json --answers answers.json
  fairlead survey --defaults --json

Exit codes: 0 done, or stopped on request; 2 bad input; 130 interrupted, answers kept.
`;

/** What shells report for a program that Ctrl-C has ended: 128 and the number of SIGINT. */
const INTERRUPTED = 130;

interface SurveyOptions {
  answers?: string;
  defaults?: boolean;
  replace?: boolean;
  json?: boolean;
}

export function register(program: Command, io: Io): void {
  program
    .command('survey')
    .description('ask for the figures of a vehicle, or take them from a file, and write its build sheet')
    .argument('[sheet]', 'build sheet to write; if it exists, its values are offered (default: <name>.json)')
    .option('--answers <file>', 'take the answers from a JSON file instead of asking')
    .option('--defaults', 'take the default for everything that no file answers')
    .option('--replace', 'with --answers or --defaults: replace a sheet that says something else')
    .option('--json', 'print one JSON document: { ok, file, sheet }')
    .addHelpText('after', HELP)
    .action((sheet: string | undefined, options: SurveyOptions) =>
      options.answers !== undefined || options.defaults
        ? unattended(sheet, options, io)
        : interactive(sheet, options.json === true, io),
    );
}

async function unattended(sheetFile: string | undefined, options: SurveyOptions, io: Io): Promise<void> {
  const { surveyUnattended } = await import('../survey/unattended.js');
  const { file, sheet, changed } = await surveyUnattended({
    sheetFile,
    folder: '.',
    answersFile: options.answers,
    replace: options.replace === true,
  });
  if (options.json) io.json({ ok: true, file, sheet });
  else io.stdout(changed ? writtenText(file) : `${file} says so already; nothing was written.\n`);
}

async function interactive(sheetFile: string | undefined, asJson: boolean, io: Io): Promise<void> {
  const screenIsTerminal = asJson ? io.isTerminalErr : io.isTerminalOut;
  if (!io.isTerminalIn || !screenIsTerminal) {
    const message = 'The survey asks questions and needs a terminal.';
    const fix = 'Give the answers with --answers FILE, or take the defaults with --defaults.';
    throw new FairleadError(message, { problems: [{ pointer: '', message, fix }] });
  }
  const { surveyOnTerminal } = await import('../survey/interactive.js');
  const { terminalSurface } = await import('../survey/ask.js');
  // With --json stdout is for the document alone, so the conversation takes the other way.
  const surface = asJson
    ? terminalSurface(
        process.stderr,
        (text) => io.stderr(text),
        (format, text) => io.styleErr(format, text),
      )
    : terminalSurface(
        process.stdout,
        (text) => io.stdout(text),
        (format, text) => io.style(format, text),
      );
  const result = await surveyOnTerminal(surface, sheetFile, '.');
  if (result.kind === 'written') {
    const { file, sheet } = result;
    if (asJson) io.json({ ok: true, file, sheet });
    else io.stdout(`\n${writtenText(file)}`);
    return;
  }
  const { draftFile, interrupted } = result;
  const again = ['fairlead survey', ...(sheetFile === undefined ? [] : [shellWord(sheetFile)])].join(' ');
  const message =
    draftFile === undefined
      ? 'Stopped. There was no answer to keep.'
      : `Stopped. Your answers are kept in ${draftFile}.\nTo go on, type: ${again}`;
  if (interrupted) process.exitCode = INTERRUPTED;
  if (asJson) io.json({ ok: false, problems: [{ pointer: '', message: message.replace('\n', ' ') }] });
  else io.stdout(`\n${message}\n`);
}

function writtenText(file: string): string {
  return `Written: ${file}\nBeside it, for editors: sheet.schema.json\nNext, type: fairlead derive ${shellWord(file)}\n`;
}
