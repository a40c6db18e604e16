/** `fairlead check SHEET`: all problems of a sheet at once, and what is worth knowing about a sound one. */
import type { Command } from 'commander';
import { EXIT, FairleadError, type Problem } from '../sheet/problem.js';
import type { Io } from './io.js';
import { problemLine } from './problem-text.js';

const EXAMPLES = `
Examples:
  fairlead check cart.json
  fairlead check cart.json --json

Exit codes: 0 the sheet is sound, notes or not; 2 it has problems or cannot be read.
`;

export function register(program: Command, io: Io): void {
  program
    .command('check')
    .description('check a build sheet: its form, and whether vehicle, pins and line fit together')
    .argument('<sheet>', 'build sheet')
    .option('--json', 'print one JSON document: { ok, problems, notes }')
    .addHelpText('after', EXAMPLES)
    .action((path: string, options: { json?: boolean }) => check(path, options.json === true, io));
}

async function check(path: string, asJson: boolean, io: Io): Promise<void> {
  const { readSheetFile } = await import('../sheet/load.js');
  const { checkSheet } = await import('../sheet/check.js');
  const { data } = await readSheetFile(path);
  const { problems, notes } = checkSheet(data);
  const ok = problems.length === 0;
  if (asJson) {
    io.json({ ok, problems, notes });
    if (!ok) process.exitCode = EXIT.badInput;
    return;
  }
  if (!ok) {
    io.stderr(noteLines(notes, path, (text) => io.styleErr('dim', text)));
    throw new FairleadError(`${path} is not a sound build sheet.`, { problems, file: path });
  }
  io.stdout(`${problemLine({ pointer: '', message: 'The sheet is sound.' }, path)}\n`);
  io.stdout(noteLines(notes, path, (text) => io.style('dim', text)));
}

function noteLines(notes: readonly Problem[], path: string, dim: (text: string) => string): string {
  return notes.map((note) => `${dim(`Note: ${problemLine(note, path)}`)}\n`).join('');
}
